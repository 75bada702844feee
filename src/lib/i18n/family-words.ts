import { textDirection, type Language } from '../domain/messaging/language';
import { m } from '../paraglide/messages';

type Catalogue = typeof m;
export type FamilyKey = keyof Catalogue;

const FIRST_STRONG_ISOLATE = '\u2068';
const END_OF_ISOLATE = '\u2069';

/** Keeps a telephone number or a name whole inside a sentence that runs the other way. */
function isolated(inputs: Record<string, string>): Record<string, string> {
	const whole = (value: string) => `${FIRST_STRONG_ISOLATE}${value}${END_OF_ISOLATE}`;
	return Object.fromEntries(Object.entries(inputs).map(([name, value]) => [name, whole(value)]));
}

/** The catalogue in one family's language; a page of theirs never asks the process for its locale. */
export function familyWords(language: Language) {
	return (key: FamilyKey, inputs: Record<string, string> = {}): string => {
		const message: (inputs: never, options: { locale: Language }) => string = m[key];
		const filled = textDirection(language) === 'rtl' ? isolated(inputs) : inputs;
		return message(filled as never, { locale: language });
	};
}

export type FamilyWords = ReturnType<typeof familyWords>;

/** Text key of one answer of the check-in: `yellowArea`, `arms-or-legs` -> `public_yellowArea_arms_or_legs`. */
export function answerKey(field: string, answer: string): FamilyKey {
	const key = `public_${field}_${answer.replaceAll('-', '_')}`;
	if (!isFamilyKey(key)) throw new Error(`No words for ${key}.`);
	return key;
}

export const isFamilyKey = (key: string): key is FamilyKey => key in m;
