import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	triageCheckIn,
	type CheckInAnswers,
	type CheckInContext,
	type CheckInResult
} from '../../src/lib/domain/guideline/index';
import { WELL } from '../support/well-newborn';
import { atAge } from './answers';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

type Change = (answers: CheckInAnswers) => CheckInAnswers;

/** One answer's choices from calm to grave; choices in one step are equally calm. The first step is that of a well newborn. */
interface Scale {
	readonly name: string;
	readonly steps: readonly (readonly Change[])[];
}

function scale<K extends keyof CheckInAnswers>(
	field: K,
	steps: readonly (readonly CheckInAnswers[K][])[],
	name: string = field
): Scale {
	return {
		name,
		steps: steps.map((choices) => choices.map((choice) => (answers) => ({ ...answers, [field]: choice })))
	};
}

/** Every choice of every answer; a number is given on, just inside and far beyond each limit, and as no number at all. */
const SCALES: readonly Scale[] = [
	scale('yellowArea', [['none'], ['face'], ['chest'], ['belly'], ['arms-or-legs'], ['hands-or-feet']]),
	scale('yellowChange', [['less', 'same', 'not-sure'], ['more']]),
	scale('yellowDepth', [['none', 'pale', 'clear'], ['deep-or-orange']]),
	scale('eyesYellow', [['no'], ['yes'], ['yes-and-more']]),
	scale('feedsIn24Hours', [[9, 12], [8], [7], [3], [0], [NaN]]),
	scale('wetIn24Hours', [[6, 8], [5], [4], [3], [2], [1], [0], [NaN]]),
	scale('dirtyIn24Hours', [[3, 8], [2], [1], [0], [NaN]]),
	scale('hoursSinceWet', [[0, 2], [7, 7.9], [8], [20], [NaN]]),
	scale('stoolColour', [['yellow', 'brown'], ['black-or-green', 'none-yet'], ['pale-or-white']]),
	scale('urineColour', [['pale'], ['dark']]),
	scale('waking', [['wakes-for-feeds'], ['hard-to-wake'], ['cannot-be-woken']]),
	scale('suck', [['strong'], ['weak'], ['will-not-feed']]),
	scale('cry', [['normal'], ['high-pitched']]),
	scale('tone', [['normal'], ['limp', 'arching']]),
	scale('breathing', [['normal'], ['pauses']]),
	scale('seizure', [[false], [true]]),
	scale('temperatureCelsius', [[undefined, 37], [37.9], [38], [41], [NaN]], 'temperature, high'),
	scale('temperatureCelsius', [[undefined, 37], [36], [35.9], [31], [NaN]], 'temperature, low'),
	scale('weightGrams', [[undefined, 3300, 3000], [2999], [2700], [2699], [2000], [0], [NaN]]),
	scale('worried', [[false], [true]])
];

const RANK: readonly CheckInResult[] = ['as-planned', 'call-back', 'today', 'emergency'];
const RUNS_EACH = 600;
const started = new Map<CheckInResult, number>();

const pick = (choices: readonly Change[]): fc.Arbitrary<Change> => fc.constantFrom(...choices);

const calm: fc.Arbitrary<Change[]> = fc.tuple(...SCALES.map(({ steps }) => pick(steps[0] ?? [])));
const anyChoice: fc.Arbitrary<Change> = fc
	.constantFrom(...SCALES)
	.chain(({ steps }) => fc.constantFrom(...steps))
	.chain(pick);

/** The choices of a calm newborn, then up to three answers changed to anything. */
const answers: fc.Arbitrary<CheckInAnswers> = fc
	.tuple(calm, fc.array(anyChoice, { maxLength: 3 }))
	.map(([before, changes]) =>
		[...before, ...changes].reduce<CheckInAnswers>((all, change) => change(all), WELL)
	);

const context: fc.Arbitrary<CheckInContext> = fc
	.record({
		minutes: fc.oneof(fc.integer({ min: 0, max: 40 * 1440 }), fc.integer({ min: 0, max: 7 * 1440 })),
		birthWeightGrams: fc.constantFrom(undefined, 3000, 3000),
		feeding: fc.constantFrom(undefined, 'breast', 'formula', 'mixed')
	})
	.map(({ minutes, birthWeightGrams, feeding }) => atAge(minutes / 60, { birthWeightGrams, feeding }));

/** Two choices of one answer, the second the graver or as grave. */
function worsening({ steps }: Scale): fc.Arbitrary<readonly [Change, Change]> {
	return fc
		.tuple(fc.nat({ max: steps.length - 1 }), fc.nat({ max: steps.length - 1 }))
		.chain(([a, b]) => fc.tuple(pick(steps[Math.min(a, b)] ?? []), pick(steps[Math.max(a, b)] ?? [])));
}

describe('an answer made worse', () => {
	it.each(SCALES)('is never a calmer result: $name', (one) => {
		let moved = 0;
		fc.assert(
			fc.property(answers, worsening(one), context, (given, [before, after], asked) => {
				const from = triageCheckIn(before(given), asked).result;
				const to = triageCheckIn(after(given), asked).result;
				started.set(from, (started.get(from) ?? 0) + 1);
				if (from !== to) moved++;
				expect(RANK.indexOf(to)).toBeGreaterThanOrEqual(RANK.indexOf(from));
			}),
			{ numRuns: RUNS_EACH }
		);
		// An answer that never decides, or answers that drown it, would make this property say nothing.
		expect(moved).toBeGreaterThan(RUNS_EACH / 100);
	});

	it('was tried from every result, most often from a calm one', () => {
		const share = (result: CheckInResult): number => (started.get(result) ?? 0) / (SCALES.length * RUNS_EACH);
		expect(share('as-planned')).toBeGreaterThan(0.15);
		expect(share('call-back')).toBeGreaterThan(0.1);
		expect(share('today')).toBeGreaterThan(0.1);
		expect(share('emergency')).toBeGreaterThan(0.05);
		expect(share('emergency')).toBeLessThan(0.5);
	});
});
