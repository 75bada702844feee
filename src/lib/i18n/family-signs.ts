import { EMERGENCY_SIGN_IDS, HOME_LIMITS, type EmergencySignId } from '../domain/guideline';
import type { Language } from '../domain/messaging/language';
import { familyWords, type FamilyKey } from './family-words';

const NO_BREAK = '\u00a0';

const SIGN_KEYS: Readonly<Record<EmergencySignId, FamilyKey>> = {
	'cannot-be-woken': 'public_sign_cannot_be_woken',
	'will-not-feed': 'public_sign_will_not_feed',
	limp: 'public_sign_limp',
	arching: 'public_sign_arching',
	'high-pitched-cry': 'public_sign_high_pitched_cry',
	'pauses-in-breathing': 'public_sign_pauses_in_breathing',
	seizure: 'public_sign_seizure',
	fever: 'public_sign_fever'
};

/** "38.0 °C (100.4 °F)" as one word, so that neither a line's end nor a sentence from right to left tears it. */
function bothScales(celsius: number, fahrenheit: number): string {
	return `${celsius.toFixed(1)} °C (${fahrenheit.toFixed(1)} °F)`.replaceAll(' ', NO_BREAK);
}

/** The guideline's figures for the sentences of the catalogues, which hold none themselves. */
export const LIMIT_INPUTS: Readonly<Record<string, string>> = {
	fever: bothScales(HOME_LIMITS.feverCelsius, HOME_LIMITS.feverFahrenheit),
	cold: bothScales(HOME_LIMITS.coldCelsius, HOME_LIMITS.coldFahrenheit),
	hours: String(HOME_LIMITS.hoursWithoutWet),
	fewest: String(HOME_LIMITS.fewestFeeds),
	most: String(HOME_LIMITS.mostFeeds),
	fromDay: String(HOME_LIMITS.strongestFromDay),
	untilDay: String(HOME_LIMITS.strongestUntilDay)
};

/** What a family is to watch for, in the order of the page and of the sheet. */
export const WATCH_KEYS = [
	'public_watch_yellow',
	'public_watch_sleepy',
	'public_watch_wet',
	'public_watch_stool',
	'public_watch_cold'
] as const satisfies readonly FamilyKey[];

/** "If your baby cannot be woken, …: call 911 now.", with every sign that the check-in judges an emergency. */
export function emergencyLine(language: Language, number: string): string {
	const words = familyWords(language);
	const told = EMERGENCY_SIGN_IDS.map((id) => words(SIGN_KEYS[id], LIMIT_INPUTS));
	const signs = new Intl.ListFormat(language, { type: 'disjunction' }).format(told);
	return words('public_emergency_line', { signs, number });
}
