import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	YELLOW_AREAS,
	triageCheckIn,
	type CheckInAnswers,
	type CheckInContext,
	type CheckInResult
} from '../../src/lib/domain/guideline/index';
import { at, BORN_AT } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

const WELL: CheckInAnswers = {
	yellowArea: 'none',
	yellowChange: 'same',
	yellowDepth: 'none',
	eyesYellow: 'no',
	feedsIn24Hours: 9,
	wetIn24Hours: 6,
	dirtyIn24Hours: 4,
	hoursSinceWet: 2,
	stoolColour: 'yellow',
	urineColour: 'pale',
	waking: 'wakes-for-feeds',
	suck: 'strong',
	cry: 'normal',
	tone: 'normal',
	breathing: 'normal',
	seizure: false,
	worried: false
};

const onDay = (day: number, more: Partial<CheckInContext> = {}): CheckInContext => ({
	bornAt: BORN_AT,
	now: at((day - 1) * 24 + 8),
	...more
});

const triage = (changes: Partial<CheckInAnswers>, context = onDay(4)): CheckInResult =>
	triageCheckIn({ ...WELL, ...changes }, context).result;

const CASES: readonly (readonly [CheckInResult, Partial<CheckInAnswers>])[] = [
	['emergency', { waking: 'cannot-be-woken' }],
	['emergency', { tone: 'limp' }],
	['emergency', { tone: 'arching' }],
	['emergency', { cry: 'high-pitched' }],
	['emergency', { breathing: 'pauses' }],
	['emergency', { seizure: true }],
	['emergency', { suck: 'will-not-feed' }],
	['emergency', { temperatureCelsius: 38 }],
	['as-planned', { temperatureCelsius: 37.9 }],
	['today', { temperatureCelsius: 35.9 }],
	['as-planned', { temperatureCelsius: 36 }],
	['today', { yellowArea: 'belly' }],
	['today', { yellowArea: 'arms-or-legs' }],
	['today', { yellowArea: 'hands-or-feet' }],
	['as-planned', { yellowArea: 'chest', yellowDepth: 'clear' }],
	['call-back', { yellowArea: 'face', yellowChange: 'more' }],
	['today', { yellowArea: 'face', yellowDepth: 'deep-or-orange' }],
	['today', { eyesYellow: 'yes-and-more' }],
	['call-back', { eyesYellow: 'yes' }],
	['today', { waking: 'hard-to-wake' }],
	['today', { suck: 'weak' }],
	['today', { hoursSinceWet: 8 }],
	['as-planned', { hoursSinceWet: 7.9 }],
	['today', { stoolColour: 'pale-or-white' }],
	['today', { urineColour: 'dark' }],
	['call-back', { feedsIn24Hours: 7 }],
	['as-planned', { feedsIn24Hours: 8 }],
	['call-back', { wetIn24Hours: 3 }],
	['as-planned', { wetIn24Hours: 4 }],
	['call-back', { dirtyIn24Hours: 2 }],
	['call-back', { worried: true }],
	['as-planned', {}]
];

describe('the parents’ check-in on day 4', () => {
	it.each(CASES)('%s for %j', (result, changes) => {
		expect(triage(changes)).toBe(result);
	});

	it('asks to be seen today for any yellow in the first 24 hours', () => {
		const first: CheckInContext = { bornAt: BORN_AT, now: at(23.9) };
		expect(triage({ yellowArea: 'face' }, first)).toBe('today');
		expect(triage({ yellowArea: 'face' }, { ...first, now: at(24) })).toBe('as-planned');
	});

	it('asks by the day of age for diapers (HSE Ireland)', () => {
		expect(triage({ wetIn24Hours: 2, dirtyIn24Hours: 2 }, onDay(2))).toBe('as-planned');
		expect(triage({ wetIn24Hours: 2, dirtyIn24Hours: 2 }, onDay(3))).toBe('call-back');
		expect(triage({ wetIn24Hours: 5 }, onDay(6))).toBe('call-back');
	});

	it('weighs lost weight, over 10 % and not at 10 %', () => {
		const context = onDay(4, { birthWeightGrams: 3000 });
		expect(triage({ weightGrams: 2700 }, context)).toBe('as-planned');
		expect(triage({ weightGrams: 2699 }, context)).toBe('today');
		expect(triage({ weightGrams: 2990 }, onDay(16, { birthWeightGrams: 3000 }))).toBe('call-back');
	});

	it('calls back when still yellow at 2 weeks, at 3 weeks if breastfed', () => {
		const yellow = { yellowArea: 'face' } as const;
		expect(triage(yellow, { bornAt: BORN_AT, now: at(14 * 24 - 1) })).toBe('as-planned');
		expect(triage(yellow, { bornAt: BORN_AT, now: at(14 * 24) })).toBe('call-back');
		expect(triage(yellow, { bornAt: BORN_AT, now: at(14 * 24), feeding: 'breast' })).toBe('as-planned');
		expect(triage(yellow, { bornAt: BORN_AT, now: at(21 * 24), feeding: 'breast' })).toBe('call-back');
	});

	it('names every answer that asked for more, worst first', () => {
		const { reasons } = triageCheckIn({ ...WELL, worried: true, suck: 'weak', seizure: true }, onDay(4));
		expect(reasons.map(({ field }) => field)).toEqual(['seizure', 'suck', 'worried']);
	});
});

/** Each answer's choices from calm to grave. */
const ORDERS: { readonly [K in keyof CheckInAnswers]?: readonly CheckInAnswers[K][] } = {
	yellowArea: YELLOW_AREAS,
	yellowChange: ['less', 'same', 'not-sure', 'more'],
	yellowDepth: ['none', 'pale', 'clear', 'deep-or-orange'],
	eyesYellow: ['no', 'yes', 'yes-and-more'],
	feedsIn24Hours: [12, 8, 7, 3, 0],
	wetIn24Hours: [8, 6, 4, 2, 0],
	dirtyIn24Hours: [8, 4, 3, 1, 0],
	hoursSinceWet: [1, 7, 8, 20],
	stoolColour: ['yellow', 'black-or-green', 'pale-or-white'],
	urineColour: ['pale', 'dark'],
	waking: ['wakes-for-feeds', 'hard-to-wake', 'cannot-be-woken'],
	suck: ['strong', 'weak', 'will-not-feed'],
	cry: ['normal', 'high-pitched'],
	tone: ['normal', 'limp'],
	breathing: ['normal', 'pauses'],
	seizure: [false, true],
	temperatureCelsius: [37, 38, 41],
	weightGrams: [3100, 2750, 2600, 2000],
	worried: [false, true]
};

const RANK: readonly CheckInResult[] = ['as-planned', 'call-back', 'today', 'emergency'];

describe('an answer made worse', () => {
	const fields = Object.keys(ORDERS);
	const steps = fc.record(Object.fromEntries(fields.map((field) => [field, fc.nat({ max: 10 })])));
	const answersOf = (picked: Record<string, number>): CheckInAnswers =>
		Object.entries(ORDERS).reduce<CheckInAnswers>(
			(answers, [field, choices]) => ({
				...answers,
				[field]: choices[Math.min(picked[field] ?? 0, choices.length - 1)]
			}),
			WELL
		);

	it('is never a calmer result', () => {
		const days = fc.integer({ min: 1, max: 30 });
		fc.assert(
			fc.property(steps, fc.constantFrom(...fields), days, (picked, field, day) => {
				const context = onDay(day, { birthWeightGrams: 3000 });
				const rank = (one: Record<string, number>) =>
					RANK.indexOf(triageCheckIn(answersOf(one), context).result);
				const worse = { ...picked, [field]: (picked[field] ?? 0) + 1 };
				expect(rank(worse)).toBeGreaterThanOrEqual(rank(picked));
			}),
			{ numRuns: 4000 }
		);
	});
});
