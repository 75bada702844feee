import { LANGUAGES, type Language } from './language';
import { WORD_LISTS, type WordList } from './word-lists';

/** What a text from a family was understood as. */
export const UNDERSTOOD = [
	'confirm',
	'other-time',
	'stop',
	'start',
	'help',
	'choice',
	'thanks',
	'words'
] as const;
export type Meaning = (typeof UNDERSTOOD)[number];

export interface Understood {
	readonly means: Meaning;
	/** A lone number, for the question which newborn is meant; 1 also confirms and 2 also asks for another time. */
	readonly number: number | null;
	/** Holds a word that could mean an emergency. */
	readonly isAlarming: boolean;
	/** The language that the alarm words, or the one word of a stop, start or help, are of; null where nothing tells. */
	readonly language: Language | null;
}

/**
 * One spelling for all: lower case, no accents (so `sí` is `si` and `đ` is `d`), one form of the Arabic letters that are
 * written in several, Latin digits, no punctuation.
 */
export function simplify(text: string): string {
	return text
		.normalize('NFKD')
		.replace(/[\u0300-\u036f\u064b-\u065f\u0670\u0640]/g, '')
		.replace(/[\u0622\u0623\u0625\u0671]/g, '\u0627')
		.replace(/\u0629/g, '\u0647')
		.replace(/[\u0660-\u0669]/g, (digit) => String(digit.charCodeAt(0) - 0x0660))
		.replace(/[\u06f0-\u06f9]/g, (digit) => String(digit.charCodeAt(0) - 0x06f0))
		.toLowerCase()
		.replace(/đ/g, 'd')
		.replace(/[^\p{L}\p{N}?]+/gu, ' ')
		.replace(/\?(?=.)|(?<=[^\s])\?/gu, ' ')
		.replace(/\s+/g, ' ')
		.trim();
}

type Simple = Readonly<Record<keyof WordList, readonly string[]>>;

const byLength = (words: readonly string[]): string[] =>
	[...new Set(words.map(simplify).filter(Boolean))].sort((a, b) => b.length - a.length);

function simplified(language: Language): Simple {
	const list = WORD_LISTS[language];
	return {
		confirm: byLength(list.confirm),
		otherTime: byLength(list.otherTime),
		stop: byLength(list.stop),
		start: byLength(list.start),
		help: byLength(list.help),
		thanks: byLength(list.thanks),
		greeting: byLength(list.greeting),
		alarm: byLength(list.alarm)
	};
}

const LISTS: Readonly<Record<Language, Simple>> = {
	en: simplified('en'),
	es: simplified('es'),
	vi: simplified('vi'),
	zh: simplified('zh'),
	ar: simplified('ar')
};

/** Letters that Arabic writes in front of a word: and, so, with, for, like, the. */
const ARABIC_PREFIX = '(?:[وفبلك]?(?:ال)?)';

/** A number stands by itself; a Chinese phrase may stand anywhere; an Arabic one may have letters before and after it. */
function holds(text: string, phrase: string, language: Language): boolean {
	if (language === 'zh' && !/^\d+$/.test(phrase)) return text.includes(phrase);
	if (language === 'ar') return new RegExp(`(?:^|\\s)${ARABIC_PREFIX}${phrase}`).test(text);
	return ` ${text} `.includes(` ${phrase} `);
}

const holdsAny = (text: string, meaning: keyof WordList): boolean =>
	LANGUAGES.some((language) => LISTS[language][meaning].some((phrase) => holds(text, phrase, language)));

/** The first language in which the text is one of these words. */
const languageWhere = (text: string, meaning: keyof WordList): Language | null =>
	LANGUAGES.find((language) => LISTS[language][meaning].includes(text)) ?? null;

const isOneOf = (text: string, meaning: keyof WordList): boolean => languageWhere(text, meaning) !== null;

/** The language with the most alarm words in the text; a number such as 911 is of none. */
function alarmLanguage(text: string): Language | null {
	const counts = LANGUAGES.map((language) => ({
		language,
		count: LISTS[language].alarm.filter((phrase) => !/^\d+$/.test(phrase) && holds(text, phrase, language))
			.length
	}));
	const most = counts.reduce((best, one) => (one.count > best.count ? one : best));
	return most.count === 0 ? null : most.language;
}

function withoutCourtesy(text: string): string {
	let rest = ` ${text} `;
	for (const language of LANGUAGES) {
		for (const phrase of [...LISTS[language].thanks, ...LISTS[language].greeting]) {
			rest = language === 'zh' ? rest.replace(phrase, ' ') : rest.replace(` ${phrase} `, '  ');
		}
	}
	return rest.replace(/\s+/g, ' ').trim();
}

/**
 * What a family's text means, whatever the language it is written in: people answer in the language of the moment.
 * Stop, start, help and confirm must be the whole message, thanks apart, so that a sentence that happens to hold such a
 * word goes to a person. An alarm word anywhere marks the text and is never taken for a confirmation.
 * Example: `understand('Sí, gracias')` means confirm; `understand('yes but he will not wake')` is alarming words in English.
 */
export function understand(text: string): Understood {
	const simple = simplify(text);
	const core = withoutCourtesy(simple);
	const number = /^\d$/.test(core) ? Number(core) : null;
	const whole = (means: 'stop' | 'start' | 'help'): Understood => ({
		means,
		number,
		isAlarming: false,
		language: languageWhere(core, means)
	});
	const quiet = (means: Meaning): Understood => ({ means, number, isAlarming: false, language: null });
	if (core === '') return quiet(holdsAny(simple, 'thanks') ? 'thanks' : 'words');
	if (isOneOf(core, 'stop')) return whole('stop');
	if (isOneOf(core, 'start')) return whole('start');
	if (holdsAny(simple, 'alarm'))
		return { means: 'words', number, isAlarming: true, language: alarmLanguage(simple) };
	if (isOneOf(core, 'help')) return whole('help');
	return quiet(quietMeaning(core, number));
}

function quietMeaning(core: string, number: number | null): Meaning {
	if (number === 1 || isOneOf(core, 'confirm')) return 'confirm';
	if (number === 2 || /^2 /.test(core) || holdsAny(core, 'otherTime')) return 'other-time';
	return number === null ? 'words' : 'choice';
}
