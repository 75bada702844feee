import { readFileSync } from 'node:fs';
import { describe, expect, it, test } from 'vitest';
import {
	CHANNELS,
	MESSAGE_KINDS,
	type Channel,
	type MessageKind
} from '../../src/lib/domain/messaging/kinds';
import { LANGUAGES, type Language } from '../../src/lib/domain/messaging/language';
import { smsReferenceSuffix } from '../../src/lib/domain/messaging/reference';
import { textSize } from '../../src/lib/domain/messaging/segments';
import { fieldsIn, render } from '../../src/lib/domain/messaging/template';
import { faultsOf, isForFamilies, KIND_WORDING, MOST_SEGMENTS } from '../../src/lib/domain/messaging/wording';
import { DEFAULT_WORDING } from '../../src/lib/server/wording/default-texts';
import { fieldValues, type FieldFacts } from '../../src/lib/server/wording/field-values';
import { mailHtml } from '../../src/lib/server/wording/mail-html';
import { englishGrade, longestSentence, spanishGrade } from '../support/reading-grade';

const CHECK_IN_RESULTS = ['emergency', 'today', 'call-back', 'as-planned'] as const;

interface Text {
	readonly language: Language;
	readonly kind: MessageKind;
	readonly channel: Channel;
	readonly subject: string | null;
	readonly body: string;
}

const ALL: Text[] = LANGUAGES.flatMap((language) =>
	MESSAGE_KINDS.flatMap((kind) => {
		const { sms, mail } = DEFAULT_WORDING[language].texts[kind] ?? {};
		return [
			...(sms === undefined ? [] : [{ language, kind, channel: 'sms' as const, subject: null, body: sms }]),
			...(mail === undefined ? [] : [{ language, kind, channel: 'mail' as const, ...mail }])
		];
	})
);

const named = (text: Text): [string, Text] => [`${text.language} ${text.kind} ${text.channel}`, text];

/** Values as long as they come: a long clinic name, a September Wednesday, a link of a long public name. */
function longest(
	language: Language,
	channel: Channel,
	result: (typeof CHECK_IN_RESULTS)[number]
): FieldFacts {
	return {
		language,
		channel,
		clinic: {
			name: 'North Harbor Newborn and Family Clinic',
			address: '12450 Old Lighthouse Boulevard, Suite 210, North Harbor, TX 78701',
			phone: '+15125550143',
			afterHoursPhone: '+15125550199',
			timeZone: 'America/Chicago'
		},
		emergencyNumber: '911',
		link: `https://visits.northharbor.example.org/v/${'k'.repeat(22)}`,
		visit: { startsAt: new Date('2026-09-23T17:50:00Z'), isConfirmed: false },
		checkInResult: result,
		words: 'Please bring the yellow card from the hospital. The desk is on the second floor.',
		choices: ['M (10:20 AM)', 'M (10:48 AM)', 'L'],
		finding: 'Follow-up k7f2q9 has a next step that is 5 hours late.',
		operations: 'https://visits.northharbor.example.org/operations'
	};
}

function rendered(text: Text): string[] {
	const results = text.kind === 'answer-received' ? CHECK_IN_RESULTS : (['as-planned'] as const);
	return results.map((result) => {
		const values = fieldValues(longest(text.language, text.channel, result));
		const body = render(text.body, values);
		const subject = render(text.subject ?? '', values);
		if (!body.ok || !subject.ok) throw new Error(`a field is missing in ${text.language} ${text.kind}`);
		return text.channel === 'sms' ? body.value + smsReferenceSuffix('k7f2q9abcdefghij') : body.value;
	});
}

describe('every wording of every language', () => {
	it('is there for every kind and channel', () => {
		for (const language of LANGUAGES) {
			for (const kind of MESSAGE_KINDS.filter(isForFamilies)) {
				const here = ALL.filter((text) => text.language === language && text.kind === kind);
				expect(
					here.map(({ channel }) => channel),
					`${language} ${kind}`
				).toEqual(CHANNELS.filter((channel) => KIND_WORDING[kind].channels.includes(channel)));
			}
		}
	});

	it('has the same fields as the English one', () => {
		for (const text of ALL) {
			const source = ALL.find(
				(one) => one.language === 'en' && one.kind === text.kind && one.channel === text.channel
			);
			expect(fieldsIn(text.body).sort(), named(text)[0]).toEqual(fieldsIn(source?.body ?? '').sort());
		}
	});

	it.each(ALL.map(named))('%s may be saved and leaves no field empty', (_, text) => {
		expect(faultsOf(text)).toEqual([]);
		for (const whole of rendered(text)) expect(whole).not.toMatch(/[{}]|undefined|null/);
	});

	it.each(ALL.filter(({ channel }) => channel === 'sms').map(named))('%s fits its parts', (_, text) => {
		for (const whole of rendered(text)) {
			const { encoding, segments, characters } = textSize(whole);
			expect(segments, `${characters} characters in ${encoding}: ${whole}`).toBeLessThanOrEqual(
				MOST_SEGMENTS[encoding]
			);
		}
	});

	it('keeps English, and Spanish but for the names of days, in the cheap alphabet', () => {
		const texts = ALL.filter(({ channel, language }) => channel === 'sms' && ['en', 'es'].includes(language));
		for (const text of texts) {
			for (const whole of rendered(text))
				expect(textSize(whole.replaceAll('miércoles', '')).outsideGsm, whole).toEqual([]);
		}
	});
});

describe('Arabic', () => {
	const arabic = ALL.filter(({ language }) => language === 'ar');

	test.each(arabic.map(named))('%s reads from right to left', (_, text) => {
		for (const whole of rendered(text)) {
			const [first] = whole.match(/\p{L}/u) ?? [];
			expect(first).toMatch(/\p{Script=Arabic}/u);
			// Groups of a number keep their order only behind a left-to-right mark.
			for (const { index } of whole.matchAll(/\(512\)/g)) {
				expect(whole[index - 1]).toBe('\u200e');
			}
		}
	});

	it('says its direction in a mail', () => {
		expect(mailHtml('مرحبا', 'ar')).toContain('<html lang="ar" dir="rtl">');
		expect(mailHtml('Hi <b>', 'en')).toContain('Hi &lt;b&gt;');
	});
});

describe('reading level', () => {
	/** Values that are not prose: a reader knows the clinic's name and dials a number. */
	const PLAIN: Readonly<Record<string, string>> = {
		clinic: 'The clinic',
		day: 'Monday',
		time: '10',
		phone: '5',
		nightPhone: '5',
		emergency: '5',
		link: '',
		address: '',
		choices: '1, 2',
		words: ''
	};
	const prose = (
		{ language, channel, body }: Text,
		result: (typeof CHECK_IN_RESULTS)[number] = 'today'
	): string => {
		const { reply, advice } = DEFAULT_WORDING[language].sentences;
		return body
			.replace('{clinic}: ', '')
			.replace('{reply}', reply[channel].open)
			.replace('{advice}', advice[result])
			.replace(/\{(\w+)\}/g, (_, name: string) => PLAIN[name] ?? '');
	};
	const inLanguage = (language: Language) =>
		ALL.filter(
			(text) => text.language === language && isForFamilies(text.kind) && text.kind !== 'desk-words'
		);

	test.each(inLanguage('en').map(named))('%s is at or below grade 6 (Flesch-Kincaid)', (_, text) => {
		for (const result of CHECK_IN_RESULTS) expect(englishGrade(prose(text, result))).toBeLessThanOrEqual(6);
		expect(longestSentence(prose(text))).toBeLessThanOrEqual(20);
	});

	test.each(inLanguage('es').map(named))('%s is at or below grade 6 (Crawford)', (_, text) => {
		for (const result of CHECK_IN_RESULTS) expect(spanishGrade(prose(text, result))).toBeLessThanOrEqual(6);
		expect(longestSentence(prose(text))).toBeLessThanOrEqual(20);
	});

	it('measures: a hard text is above grade 6 in both languages', () => {
		expect(
			englishGrade(
				'Hyperbilirubinemia necessitates immediate quantitative reassessment of serum concentrations.'
			)
		).toBeGreaterThan(12);
		expect(
			spanishGrade(
				'La hiperbilirrubinemia neonatal requiere inmediatamente una determinación cuantitativa de concentraciones.'
			)
		).toBeGreaterThan(6);
	});

	it.each([
		['en', englishGrade],
		['es', spanishGrade]
	] as const)('the pages for parents in "%s" are at or below grade 6 as a whole', (language, grade) => {
		const catalogue: unknown = JSON.parse(
			readFileSync(new URL(`../../src/lib/i18n/messages/${language}.json`, import.meta.url), 'utf8')
		);
		const words = Object.entries(catalogue ?? {}).flatMap(([key, text]) =>
			key.startsWith('public_') && typeof text === 'string' ? [`${text.replace(/\{\w+\}/g, '5')}.`] : []
		);
		expect(words.length).toBeGreaterThan(0);
		expect(grade(words.join('\n'))).toBeLessThanOrEqual(6);
	});
});
