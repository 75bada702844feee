import { LANGUAGES, type Language } from '../domain/messaging/language';

/** The language asked for in the address, or else the one the family gave. */
export function familyLocale(asked: string | null, given: Language): Language {
	return LANGUAGES.find((language) => language === asked) ?? given;
}
