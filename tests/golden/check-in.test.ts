import { describe, expect, it, vi } from 'vitest';
import {
	expectedDiapers,
	triageCheckIn,
	type CheckInAnswers,
	type CheckInContext,
	type CheckInResult
} from '../../src/lib/domain/guideline/index';
import { WELL } from '../support/well-newborn';
import { atAge, onDay, triage } from './answers';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

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
	['emergency', { temperatureCelsius: NaN }],
	['today', { temperatureCelsius: 35.9 }],
	['today', { temperatureCelsius: 35.99 }],
	['today', { temperatureCelsius: -Infinity }],
	['as-planned', { temperatureCelsius: 36 }],
	['today', { yellowArea: 'belly' }],
	['today', { yellowArea: 'arms-or-legs' }],
	['today', { yellowArea: 'hands-or-feet' }],
	['as-planned', { yellowArea: 'face' }],
	['as-planned', { yellowArea: 'chest', yellowDepth: 'clear' }],
	['as-planned', { yellowArea: 'chest', yellowDepth: 'pale', yellowChange: 'not-sure' }],
	['as-planned', { yellowArea: 'face', yellowChange: 'less' }],
	['today', { yellowArea: 'face', yellowChange: 'more' }],
	['today', { yellowArea: 'face', yellowDepth: 'deep-or-orange' }],
	['today', { eyesYellow: 'yes-and-more' }],
	['call-back', { eyesYellow: 'yes' }],
	['today', { waking: 'hard-to-wake' }],
	['today', { suck: 'weak' }],
	['today', { hoursSinceWet: 8 }],
	['as-planned', { hoursSinceWet: 7.9 }],
	['today', { hoursSinceWet: NaN }],
	['today', { weightGrams: NaN }],
	['call-back', { feedsIn24Hours: NaN }],
	['call-back', { wetIn24Hours: NaN }],
	['call-back', { dirtyIn24Hours: NaN }],
	['today', { stoolColour: 'pale-or-white' }],
	['today', { urineColour: 'dark' }],
	['call-back', { feedsIn24Hours: 7 }],
	['as-planned', { feedsIn24Hours: 8 }],
	['call-back', { wetIn24Hours: 3 }],
	['as-planned', { wetIn24Hours: 4 }],
	['call-back', { dirtyIn24Hours: 2 }],
	['as-planned', { dirtyIn24Hours: 3 }],
	['as-planned', { stoolColour: 'brown' }],
	['call-back', { worried: true }],
	['as-planned', {}]
];

describe('the parents’ check-in on day 4', () => {
	it.each(CASES)('%s for %j', (result, changes) => {
		expect(triage(changes)).toBe(result);
	});

	it('names every answer that asked for more, worst first', () => {
		const { reasons } = triageCheckIn({ ...WELL, worried: true, suck: 'weak', seizure: true }, onDay(4));
		expect(reasons.map(({ field }) => field)).toEqual(['seizure', 'suck', 'worried']);
	});
});

/** FACTS 6.1 to 6.4: one row each rule that goes by age or by a limit, one step to either side of it. */
const LIMITS: readonly (readonly [string, CheckInResult, Partial<CheckInAnswers>, CheckInContext])[] = [
	['yellow at 23.99 hours', 'today', { yellowArea: 'face' }, atAge(23.99)],
	['yellow at 24 hours', 'as-planned', { yellowArea: 'face' }, atAge(24)],
	['yellow eyes at 23.99 hours', 'today', { eyesYellow: 'yes' }, atAge(23.99)],
	['yellow eyes at 24 hours', 'call-back', { eyesYellow: 'yes' }, atAge(24)],
	['no yellow at 23.99 hours', 'as-planned', {}, atAge(23.99)],
	['no feed on day 1', 'as-planned', { feedsIn24Hours: 0 }, atAge(23.99)],
	['7 feeds from day 2 on', 'call-back', { feedsIn24Hours: 7 }, atAge(24)],
	['8 feeds from day 2 on', 'as-planned', { feedsIn24Hours: 8 }, atAge(24)],
	['7 feeds on day 1', 'as-planned', { feedsIn24Hours: 7 }, onDay(1)],
	['black stools on day 5', 'as-planned', { stoolColour: 'black-or-green' }, atAge(119.99)],
	['black stools on day 6', 'call-back', { stoolColour: 'black-or-green' }, atAge(120)],
	['no stool yet on day 5', 'as-planned', { stoolColour: 'none-yet' }, atAge(119.99)],
	['no stool yet on day 6', 'call-back', { stoolColour: 'none-yet' }, atAge(120)],
	['yellow stools on day 6', 'as-planned', { stoolColour: 'yellow' }, atAge(120)],
	['brown stools on day 6', 'as-planned', { stoolColour: 'brown' }, atAge(120)],
	['pale stools on day 1', 'today', { stoolColour: 'pale-or-white' }, onDay(1)],
	['pale stools on day 40', 'today', { stoolColour: 'pale-or-white' }, onDay(40)],
	['dark urine on day 1', 'today', { urineColour: 'dark' }, onDay(1)],
	['10 % lost', 'as-planned', { weightGrams: 2700 }, onDay(4, { birthWeightGrams: 3000 })],
	['over 10 % lost', 'today', { weightGrams: 2699 }, onDay(4, { birthWeightGrams: 3000 })],
	['over 10 % lost on day 1', 'today', { weightGrams: 2699 }, onDay(1, { birthWeightGrams: 3000 })],
	['birth weight not known', 'as-planned', { weightGrams: 500 }, onDay(20)],
	[
		'1 g short before 14 days',
		'as-planned',
		{ weightGrams: 2999 },
		atAge(335.99, { birthWeightGrams: 3000 })
	],
	['1 g short at 14 days', 'call-back', { weightGrams: 2999 }, atAge(336, { birthWeightGrams: 3000 })],
	[
		'birth weight back at 14 days',
		'as-planned',
		{ weightGrams: 3000 },
		atAge(336, { birthWeightGrams: 3000 })
	],
	['yellow before 14 days', 'as-planned', { yellowArea: 'face' }, atAge(335.99)],
	['yellow at 14 days, feeding not known', 'call-back', { yellowArea: 'face' }, atAge(336)],
	['yellow at 14 days, formula', 'call-back', { yellowArea: 'face' }, atAge(336, { feeding: 'formula' })],
	['yellow before 14 days, mixed', 'as-planned', { yellowArea: 'face' }, atAge(335.99, { feeding: 'mixed' })],
	['yellow at 14 days, mixed', 'call-back', { yellowArea: 'face' }, atAge(336, { feeding: 'mixed' })],
	[
		'yellow before 21 days, breast',
		'as-planned',
		{ yellowArea: 'face' },
		atAge(503.99, { feeding: 'breast' })
	],
	['yellow at 21 days, breast', 'call-back', { yellowArea: 'face' }, atAge(504, { feeding: 'breast' })],
	['not yellow at 30 days', 'as-planned', {}, onDay(30)]
];

describe('the limits of the check-in', () => {
	it.each(LIMITS)('%s: %s', (_name, result, changes, context) => {
		expect(triage(changes, context)).toBe(result);
	});

	// HSE Ireland, FACTS 6.1; day 5 prints no number of stools, day 4's is kept.
	it.each([
		[1, 1, 1],
		[2, 2, 2],
		[3, 3, 3],
		[4, 4, 3],
		[5, 5, 3],
		[6, 6, 3],
		[42, 6, 3]
	])('day %i asks for at least %i wet and %i dirty diapers', (day, wet, dirty) => {
		expect(expectedDiapers(day)).toEqual({ wet, dirty });
		for (const context of [atAge((day - 1) * 24), atAge(day * 24 - 0.01)]) {
			expect(triage({ wetIn24Hours: wet, dirtyIn24Hours: dirty }, context)).toBe('as-planned');
			expect(triage({ wetIn24Hours: wet - 1 }, context)).toBe('call-back');
			expect(triage({ dirtyIn24Hours: dirty - 1 }, context)).toBe('call-back');
		}
	});

	it('asks for day 1 before the first day, never for nothing', () => {
		expect(expectedDiapers(0)).toEqual({ wet: 1, dirty: 1 });
	});
});

describe('a reason', () => {
	it('says the answer that asked, what it asks for, in words and with a source', () => {
		for (const [result, changes] of CASES) {
			const { reasons } = triageCheckIn({ ...WELL, ...changes }, onDay(4));
			if (result === 'as-planned') expect(reasons).toEqual([]);
			else expect(reasons[0]).toMatchObject({ result });
			for (const { field, text, source } of reasons) {
				expect(Object.keys(changes)).toContain(field);
				expect(text.length).toBeGreaterThan(10);
				expect(source.length).toBeGreaterThan(5);
			}
		}
	});
});
