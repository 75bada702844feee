import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { LANGUAGES } from '../../src/lib/domain/messaging/language';
import { DEFAULT_WORDING } from '../../src/lib/server/wording/default-texts';

/** Clinical limits and sentences are the engine's: screens and catalogues render them and hold none themselves. */

const root = resolve(import.meta.dirname, '../..');

interface Found {
	readonly what: string;
	readonly words: string;
}

/** One alone names an answer of the check-in; two or more in a sentence are a list that somebody wrote down. */
const SIGN =
	'\\b(?:cannot be woken|will not feed|limp|arch(?:es|ing)|high[- ]pitched|pauses in breathing|stops breathing|seizure|fever)\\b';

const LITERALS: readonly (readonly [string, RegExp])[] = [
	['a temperature', /\d+(?:[.,]\d+)?\s*(?:°\s*[CF]\b|degrees)/g],
	['a fever or cold limit', /\b3[68][.,]0\b/g],
	['a bilirubin value', /\d\s*(?:mg\/dL|[µμu]mol\/L)/g],
	['an albumin limit', /\d\s*g\/dL/g],
	['an age limit', /\b\d+\s*(?:h|hours?|days?|weeks?)\s+(?:of\s+age|of\s+gestation|old)\b/gi],
	['a number of feeds or diapers', /\b\d+\s*(?:or more\s+)?(?:feeds|wet diapers|dirty diapers)\b/gi],
	['a list of signs of danger', new RegExp(`${SIGN}[^'"<>;]{0,30}(?:,|\\bor\\b)[^'"<>;]{0,30}${SIGN}`, 'gi')],
	[
		'what a value has reached',
		/\bthreshold (?:is )?(?:met|reached|passed)\b|\bat or over the \w+ (?:threshold|line):/gi
	]
];

function literalsIn(text: string): Found[] {
	return LITERALS.flatMap(([what, pattern]) =>
		[...text.matchAll(pattern)].map(([words]) => ({ what, words }))
	);
}

/** Comments may give examples; styles hold no words. */
const withoutComments = (source: string): string =>
	source
		.replace(/<style[\s\S]*?<\/style>/g, '')
		.replace(/<!--[\s\S]*?-->/g, '')
		.replace(/\/\*[\s\S]*?\*\//g, '')
		.replace(/(^|\s)\/\/.*$/gm, '$1');

const filesIn = (folder: string): string[] =>
	readdirSync(resolve(root, folder), { recursive: true, encoding: 'utf8' }).map(
		(file) => `${folder}/${file}`
	);

/** Words of screens: components, and the modules of words beside them. */
const SCREENS = ['src/lib/ui', 'src/lib/format', 'src/lib/i18n', 'src/routes']
	.flatMap(filesIn)
	.filter((file) => /\.(?:svelte|ts)$/.test(file) && !file.endsWith('.test.ts'));

/** Words that look like a limit and are none. */
const CITED: Readonly<Record<string, string>> = {
	'src/lib/ui/staff/clinician/measure-words.ts': '6 days of age' // how the study that is cited defines its count
};

/** Bounds of a form's field, told when what was typed is outside them: what may be typed, not what it means. */
const FIELD_BOUNDS = /^public_error_/;
/** Keys whose sentences tell a family what to watch for: a figure in one must be a parameter, in any script. */
const TELLS_LIMITS = /^public_(?:emergency|sign|watch)|^sheet_/;

function catalogue(language: string): [string, string][] {
	const read: unknown = JSON.parse(
		readFileSync(resolve(root, `src/lib/i18n/messages/${language}.json`), 'utf8')
	);
	return Object.entries(read ?? {}).filter(
		(entry): entry is [string, string] => !entry[0].startsWith('$') && typeof entry[1] === 'string'
	);
}

const parametersOf = (text: string): string[] =>
	[...text.matchAll(/\{(\w+)\}/g)].map(([, name]) => name ?? '').sort();

describe('no clinical literal stands outside the engine', () => {
	it('looks at every screen', () => {
		expect(SCREENS.length).toBeGreaterThan(150);
		expect(SCREENS).toContain('src/lib/ui/staff/desk/CallScript.svelte');
		expect(SCREENS).toContain('src/lib/ui/staff/clinician/result-words.ts');
	});

	it.each(SCREENS)('%s', (file) => {
		const found = literalsIn(withoutComments(readFileSync(resolve(root, file), 'utf8')));
		expect(found.filter(({ words }) => words !== CITED[file])).toEqual([]);
	});

	it.each([...LANGUAGES])('the catalogue of "%s"', (language) => {
		for (const [key, text] of catalogue(language)) {
			if (FIELD_BOUNDS.test(key)) continue;
			expect(literalsIn(text), key).toEqual([]);
			if (TELLS_LIMITS.test(key)) expect(text.replace(/\{\w+\}/g, ''), key).not.toMatch(/\p{Nd}/u);
		}
	});

	it.each([...LANGUAGES])(
		'the catalogue of "%s" has the keys and parameters of the English one',
		(language) => {
			const shape = (entries: [string, string][]) =>
				Object.fromEntries(entries.map(([key, text]) => [key, parametersOf(text)]));
			expect(shape(catalogue(language))).toEqual(shape(catalogue('en')));
		}
	);

	it.each([...LANGUAGES])('the messages of "%s"', (language) => {
		const numbers = LITERALS.filter(([what]) => what !== 'a list of signs of danger');
		const text = JSON.stringify(DEFAULT_WORDING[language]);
		expect(numbers.flatMap(([, pattern]) => text.match(pattern) ?? [])).toEqual([]);
	});
});

describe('the test itself', () => {
	it.each([
		'fever of 38.0 °C or more',
		'Less than 36,0',
		'Close to the line before 24 hours of age',
		'within 3 mg/dL',
		'over 250 µmol/L',
		'albumin under 3.0 g/dL',
		'at least 8 feeds',
		'Cannot be woken, will not feed, limp or arching, a seizure',
		'is limp, arches the back,\n\t\tstops breathing',
		'Phototherapy threshold met',
		'At or over the phototherapy threshold: treat.'
	])('catches “%s”', (text) => {
		expect(literalsIn(text).length).toBeGreaterThan(0);
	});

	it.each([
		'How many feeds in the last 24 hours?',
		'{total} mg/dL',
		"'cannot-be-woken': 'cannot be woken', 'will-not-feed': 'will not feed'",
		'We call you within 30 minutes.',
		'grid-cols-[8rem_1fr]',
		'At or over the phototherapy line at the first visit'
	])('lets “%s” pass', (text) => {
		expect(literalsIn(text)).toEqual([]);
	});

	it('reads no comments', () => {
		expect(literalsIn(withoutComments('/** "9.1 mg/dL" */\n// 38.0 °C\n<!-- 8 feeds -->'))).toEqual([]);
	});
});
