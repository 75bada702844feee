import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	assess,
	assessAtAnyAge,
	thresholdsAt,
	type AssessmentInput,
	type BilirubinUnit,
	type StandardId
} from '../../src/lib/domain/guideline/index';
import { dueMs, newborns, standardIds } from './arbitraries';

/** A patient limit: a busy machine must not fail a property. */
vi.setConfig({ testTimeout: 120_000 });
const RUNS = Number(process.env['PROPERTY_RUNS'] ?? 500);

const weeks = (standard: StandardId) => fc.integer({ min: standard === 'aap-2022' ? 35 : 23, max: 44 });
const lookups = standardIds.chain((standard) =>
	fc.record({
		standard: fc.constant(standard),
		weeks: weeks(standard),
		hours: fc.integer({ min: 60, max: 336 * 60 }).map((minutes) => minutes / 60)
	})
);

function linesOf(standard: StandardId, wanted: number, hours: number, atRisk = false) {
	const found = thresholdsAt(
		{ standard, gestationalAge: { weeks: wanted, days: 0 }, neurotoxicityRisks: atRisk ? ['sepsis'] : [] },
		hours
	);
	if (!found.ok) throw new Error(JSON.stringify(found.error));
	return found.value;
}

describe('lines', () => {
	it('are never lowered by a higher gestational age', () => {
		fc.assert(
			fc.property(lookups, fc.boolean(), ({ standard, weeks: lower, hours }, atRisk) => {
				const a = linesOf(standard, lower, hours, atRisk);
				const b = linesOf(standard, Math.min(lower + 1, 44), hours, atRisk);
				expect(b.phototherapy).toBeGreaterThanOrEqual(a.phototherapy);
				expect(b.exchange).toBeGreaterThanOrEqual(a.exchange);
			}),
			{ numRuns: RUNS }
		);
	});

	it('are never raised by a risk factor', () => {
		fc.assert(
			fc.property(lookups, ({ standard, weeks: wanted, hours }) => {
				const without = linesOf(standard, wanted, hours);
				const with_ = linesOf(standard, wanted, hours, true);
				expect(with_.phototherapy).toBeLessThanOrEqual(without.phototherapy);
				expect(with_.exchange).toBeLessThanOrEqual(without.exchange);
			}),
			{ numRuns: RUNS }
		);
	});

	it('stand in order: phototherapy, escalation, exchange', () => {
		fc.assert(
			fc.property(lookups, fc.boolean(), ({ standard, weeks: wanted, hours }, atRisk) => {
				const { phototherapy, escalation, exchange } = linesOf(standard, wanted, hours, atRisk);
				expect(phototherapy).toBeLessThan(escalation ?? exchange);
				if (escalation !== undefined) expect(escalation).toBeLessThan(exchange);
			}),
			{ numRuns: RUNS }
		);
	});

	it('meet only at birth at 38 weeks by NICE, where both are printed as 100', () => {
		expect(linesOf('nice-cg98', 38, 0)).toEqual({ phototherapy: 100, exchange: 100, unit: 'umol/L' });
	});
});

/** The same newborn with one value raised by so many steps of its unit. */
function raisedAt(input: AssessmentInput, index: number, steps: number): AssessmentInput {
	const by = (unit: BilirubinUnit): number => (unit === 'mg/dL' ? steps / 10 : steps);
	return {
		...input,
		bilirubin: input.bilirubin.map((one, i) =>
			i === index ? { ...one, total: Math.round((one.total + by(one.unit)) * 10) / 10 } : one
		)
	};
}

/** The same newborn with the deciding value raised. */
function raised(input: AssessmentInput, steps: number): AssessmentInput | null {
	const before = assess(input);
	if (!before.ok || before.value.decidingIndex === null) return null;
	return raisedAt(input, before.value.decidingIndex, steps);
}

function isNeverLaterForAHigherValue(dischargedBefore: boolean): void {
	fc.assert(
		fc.property(newborns({ dischargedBefore }), fc.integer({ min: 1, max: 80 }), (input, steps) => {
			const higher = raised(input, steps);
			if (higher) expect(dueMs(higher)).toBeLessThanOrEqual(dueMs(input));
		}),
		{ numRuns: RUNS }
	);
}

function isNeverLaterForAnAddedRisk(dischargedBefore: boolean): void {
	fc.assert(
		fc.property(newborns({ dischargedBefore }), fc.constantFrom(...NEUROTOXICITY_RISKS), (input, risk) => {
			const more = { ...input, neurotoxicityRisks: [...new Set([...input.neurotoxicityRisks, risk])] };
			expect(dueMs(more)).toBeLessThanOrEqual(dueMs(input));
		}),
		{ numRuns: RUNS }
	);
}

/**
 * Under and after treatment a rise counts, and raising its first value makes it smaller; so does a line that is steeper
 * for a younger newborn.
 */
const untreated = newborns({ standard: 'aap-2022' }).map((input) => ({ ...input, phototherapy: [] }));

describe('what follows', () => {
	it('is never later for a higher value', () => isNeverLaterForAHigherValue(false));

	it('is never later for an added neurotoxicity risk', () => isNeverLaterForAnAddedRisk(false));

	// By NICE an earlier value that is raised may show that the next one falls.
	it('is never later for any value raised by AAP 2022, the deciding one or not', () => {
		fc.assert(
			fc.property(untreated, fc.nat({ max: 3 }), fc.integer({ min: 1, max: 80 }), (input, index, steps) => {
				expect(dueMs(raisedAt(input, index, steps))).toBeLessThanOrEqual(dueMs(input));
			}),
			{ numRuns: RUNS }
		);
	});

	it('is never later for a newborn one week younger in gestation by AAP 2022', () => {
		fc.assert(
			fc.property(untreated, (input) => {
				const { weeks: given, days } = input.gestationalAge;
				const younger = { ...input, gestationalAge: { weeks: Math.max(given - 1, 35), days } };
				expect(dueMs(younger)).toBeLessThanOrEqual(dueMs(input));
			}),
			{ numRuns: RUNS }
		);
	});

	it('is never later for an added jaundice risk, whenever discharge was', () => {
		fc.assert(
			fc.property(newborns({ dischargedBefore: true }), fc.constantFrom(...JAUNDICE_RISKS), (input, risk) => {
				const more = { ...input, jaundiceRisks: [...new Set([...input.jaundiceRisks, risk])] };
				expect(dueMs(more)).toBeLessThanOrEqual(dueMs(input));
			}),
			{ numRuns: RUNS }
		);
	});

	it('does not depend on the order in which values and courses are given', () => {
		const shuffled = newborns({ dischargedBefore: true }).chain((input) =>
			fc.tuple(
				fc.constant(input),
				fc.shuffledSubarray([...input.bilirubin], { minLength: input.bilirubin.length }),
				fc.shuffledSubarray([...input.phototherapy], { minLength: input.phototherapy.length })
			)
		);
		const said = (input: AssessmentInput) => {
			const result = assess(input);
			if (!result.ok) throw new Error(JSON.stringify(result.error));
			const { disposition, window, difference, thresholds, cautions, directFraction } = result.value;
			return { disposition, window, difference, thresholds, directFraction, cautions };
		};
		fc.assert(
			fc.property(shuffled, ([input, bilirubin, phototherapy]) => {
				expect(said({ ...input, bilirubin, phototherapy })).toEqual(said(input));
			}),
			{ numRuns: RUNS }
		);
	});

	it('is the same at any age as long as every value lies within the lines', () => {
		fc.assert(
			fc.property(newborns({ dischargedBefore: true }), (input) => {
				expect(assessAtAnyAge(input)).toEqual(assess(input));
			}),
			{ numRuns: RUNS / 5 }
		);
	});

	it('has a window that ends after it begins, and one only where something is to follow', () => {
		fc.assert(
			fc.property(newborns({ dischargedBefore: true }), (input) => {
				const result = assess(input);
				if (!result.ok) throw new Error('refused');
				const { window, disposition } = result.value;
				if (disposition === 'follow-up' || disposition === 'delay-discharge') expect(window).not.toBeNull();
				if (window) expect(window.until.getTime()).toBeGreaterThan(window.from.getTime());
			}),
			{ numRuns: RUNS }
		);
	});
});

// Skipped until a visit is counted so that it cannot end after a test owed for a higher value.
/**
 * The printed test counts from its value, a visit from an earlier discharge: where the visit would end before the test
 * of a closer value, the two readings cannot both hold, and the printed one is kept (see the engine's README).
 */
function isPrintedTest(closer: AssessmentInput, farther: AssessmentInput): boolean {
	const [test, visit] = [assess(closer), assess(farther)];
	if (!test.ok || !visit.ok) return false;
	const { decidingIndex, window, disposition } = test.value;
	const decidedAt = closer.bilirubin[decidingIndex ?? -1]?.at;
	return (
		disposition === 'follow-up' &&
		decidedAt !== undefined &&
		closer.dischargeAt < decidedAt &&
		window !== null &&
		window.test !== 'judgement' &&
		window.until.getTime() - decidedAt.getTime() <= 48 * 3_600_000 &&
		visit.value.trace.some(({ rule }) => rule === 'window.visit-anchor' || rule === 'window.new-count')
	);
}

describe('what follows, whenever discharge was', () => {
	const changed = newborns({ dischargedBefore: true }).chain((input) =>
		fc.oneof(
			fc.integer({ min: 1, max: 80 }).map((steps) => [input, raised(input, steps)] as const),
			fc.constantFrom(...NEUROTOXICITY_RISKS).map((risk) => {
				const neurotoxicityRisks = [...new Set([...input.neurotoxicityRisks, risk])];
				return [input, { ...input, neurotoxicityRisks }] as const;
			})
		)
	);

	it('is never later for a higher value or an added risk, but for a printed test after a visit', () => {
		fc.assert(
			fc.property(changed, ([input, worse]) => {
				if (worse === null || dueMs(worse) <= dueMs(input)) return;
				expect(input.standard).toBe('aap-2022');
				expect(isPrintedTest(worse, input)).toBe(true);
			}),
			{ numRuns: 4 * RUNS }
		);
	});
});
