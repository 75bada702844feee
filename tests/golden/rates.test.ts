import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	rateOfRise,
	thresholdsAt,
	type AssessmentInput,
	type RateOfRise,
	type StandardId
} from '../../src/lib/domain/guideline/index';
import { standardIds } from './arbitraries';
import { at, BORN_AT, newborn, value } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 120_000 });
/** Every run looks at every minute up to the end of the lines. */
const RUNS = Number(process.env['PROPERTY_RUNS'] ?? 100);

function rate(
	standard: StandardId,
	from: readonly [number, number],
	to: readonly [number, number]
): RateOfRise {
	const unit = standard === 'aap-2022' ? 'mg/dL' : 'umol/L';
	const found = rateOfRise(
		newborn({ standard, bilirubin: [value(...from, 'serum', unit), value(...to, 'serum', unit)] }),
		0,
		1
	);
	if (!found) throw new Error('no pair');
	return found;
}

describe('the rate of rise', () => {
	// FACTS 2.1: 0.3 mg/dL an hour or more in the first 24 hours, 0.2 or more after that.
	it.each([
		['in the first 24 hours', [10, 4], [20, 7], 0.3, 0.3, true],
		['in the first 24 hours, below', [10, 4], [20, 6.9], 0.29, 0.3, false],
		['up to 24 hours', [14, 4], [24, 6.9], 0.29, 0.3, false],
		['past 24 hours', [14.01, 4], [24.01, 6.9], 0.29, 0.2, true],
		['across 24 hours, at the limit', [20, 6], [30, 8], 0.2, 0.2, true],
		['after, below', [30, 8], [40, 9.9], 0.19, 0.2, false],
		['falling', [30, 8], [40, 6], -0.2, 0.2, false]
	] as const)('by AAP 2022 %s', (_name, from, to, perHour, limitPerHour, exceedsLimit) => {
		expect(rate('aap-2022', from, to)).toMatchObject({ perHour, limitPerHour, exceedsLimit, unit: 'mg/dL' });
	});

	// FACTS 4: over 8.5 µmol/L an hour at any age.
	it.each([
		['at the limit', [10, 40], [20, 125], 8.5, false],
		['over it', [10, 40], [20, 126], 8.6, true],
		['after 24 hours at the limit', [30, 40], [40, 125], 8.5, false],
		['after 24 hours over it', [30, 40], [40, 126], 8.6, true]
	] as const)('by NICE CG98 %s', (_name, from, to, perHour, exceedsLimit) => {
		expect(rate('nice-cg98', from, to)).toMatchObject({
			perHour,
			limitPerHour: 8.5,
			exceedsLimit,
			unit: 'umol/L'
		});
	});

	it('takes the earlier one first, whatever the order, and none from two values at one instant', () => {
		const input = newborn({ bilirubin: [value(40, 10), value(30, 8), value(40, 9, 'transcutaneous')] });
		expect(rateOfRise(input, 0, 1)).toMatchObject({ fromIndex: 1, toIndex: 0, perHour: 0.2 });
		expect(rateOfRise(input, 1, 0)).toEqual(rateOfRise(input, 0, 1));
		expect(rateOfRise(input, 0, 2)).toBeNull();
		expect(rateOfRise(input, 0, 0)).toBeNull();
		expect(rateOfRise(input, 0, 9)).toBeNull();
	});
});

interface Rising {
	readonly input: AssessmentInput;
	readonly ages: readonly [number, number];
	readonly totals: readonly [number, number];
	readonly lastAge: number;
}

/** Two values of one newborn, the later one below the line, mostly rising. */
const risings: fc.Arbitrary<Rising> = standardIds.chain((standard) =>
	fc
		.record({
			weeks: fc.integer({ min: standard === 'aap-2022' ? 35 : 23, max: 42 }),
			isAtRisk: fc.boolean(),
			age: fc.integer({ min: 2 * 60, max: 320 * 60 }).map((minutes) => minutes / 60),
			hours: fc.integer({ min: 30, max: 24 * 60 }).map((minutes) => minutes / 60),
			below: fc.integer({ min: -5, max: 80 }),
			perTenHours: fc.integer({ min: -5, max: 40 })
		})
		.map(({ weeks, isAtRisk, age, hours, below, perTenHours }) => {
			const scale = standard === 'aap-2022' ? 1 : 17;
			const unit = standard === 'aap-2022' ? 'mg/dL' : 'umol/L';
			const known = newborn({
				standard,
				gestationalAge: { weeks, days: 0 },
				neurotoxicityRisks: isAtRisk ? ['sepsis'] : []
			});
			const first = Math.max(age - hours, 1);
			const later = Math.max(Math.round((lineAt(known, age) - (below / 10) * scale) * 10) / 10, 2);
			const earlier = Math.max(later - (perTenHours / 100) * scale * (age - first), 0.5);
			return {
				input: {
					...known,
					bilirubin: [value(first, earlier, 'serum', unit), value(age, later, 'serum', unit)]
				},
				ages: [first, age],
				totals: [earlier, later],
				lastAge: standard === 'aap-2022' ? 336 : 672
			};
		})
);

function lineAt(known: AssessmentInput, hours: number): number {
	const lines = thresholdsAt(known, hours);
	if (!lines.ok) throw new Error(JSON.stringify(lines.error));
	return lines.value.phototherapy;
}

/** NICE lines are rounded to 0.1 at every age, the projection only at the ends of an hour. */
const slackOf = ({ input }: Rising): number => (input.standard === 'aap-2022' ? 1e-6 : 0.11);

describe('the projection of when the line would be met', () => {
	it('is the first minute at which a steady rise reaches it, found by looking at every minute', () => {
		const met = { crossing: 0, none: 0 };
		fc.assert(
			fc.property(risings, (rising) => {
				const { input, ages, totals, lastAge } = rising;
				const crossing = rateOfRise(input, 0, 1)?.projectedCrossingAt;
				const perHour =
					(totals[1] - totals[0]) / ((at(ages[1]).getTime() - at(ages[0]).getTime()) / 3_600_000);
				const gap = (age: number): number => lineAt(input, age) - (totals[1] + perHour * (age - ages[1]));
				const slack = slackOf(rising);
				if (!(perHour > 0) || gap(ages[1]) <= 0) {
					expect(crossing).toBeUndefined();
					return;
				}
				const untilAge = crossing ? (crossing.getTime() - BORN_AT.getTime()) / 3_600_000 : lastAge;
				for (let age = ages[1]; age < untilAge; age += 1 / 60) expect(gap(age) > -slack).toBe(true);
				met[crossing ? 'crossing' : 'none']++;
				if (!crossing) return;
				expect(untilAge).toBeLessThanOrEqual(lastAge);
				expect(gap(untilAge)).toBeLessThanOrEqual(slack);
			}),
			{ numRuns: RUNS }
		);
		expect(met.crossing).toBeGreaterThan(RUNS / 5);
		expect(met.none).toBeGreaterThan(RUNS / 50);
	});

	// Line of 40 weeks: 17.0 at hour 48, 17.2 at 49: 0.5 below, rising 0.1 an hour.
	it('is left out for a value that falls, stands still or has reached the line', () => {
		const crossing = (from: number, to: number) => rate('aap-2022', [40, from], [48, to]).projectedCrossingAt;
		expect(crossing(9, 8)).toBeUndefined();
		expect(crossing(9, 9)).toBeUndefined();
		expect(crossing(12, 17)).toBeUndefined();
		expect(crossing(12, 16.9)).toBeDefined();
	});
});
