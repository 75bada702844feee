import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import {
	assess,
	thresholdsAt,
	type Assessment,
	type AssessmentInput,
	type TraceStep
} from '../../src/lib/domain/guideline/index';
import { newborns } from './arbitraries';
import { BORN_AT } from './newborn';

/** A patient limit: a busy machine must not fail a property. */
vi.setConfig({ testTimeout: 120_000 });
const RUNS = Number(process.env['PROPERTY_RUNS'] ?? 300);

const hoursOf = (instant: Date): number => (instant.getTime() - BORN_AT.getTime()) / 3_600_000;
/** Cut, never rounded up, to hundredths of an hour. */
const cut = (hours: number): number => Math.floor(hours * 100 + 1e-9) / 100;

function assessed(input: AssessmentInput): Assessment {
	const result = assess(input);
	if (!result.ok) throw new Error(JSON.stringify(result.error));
	return result.value;
}

function every(check: (input: AssessmentInput, result: Assessment) => void): void {
	fc.assert(
		fc.property(newborns({ dischargedBefore: true }), (input) => check(input, assessed(input))),
		{ numRuns: RUNS }
	);
}

const steps = (result: Assessment, rule: string): readonly TraceStep[] =>
	result.trace.filter((step) => step.rule === rule);

/** What the last step must state, written here a second time. */
function stated({ disposition, window }: Assessment): string {
	if (window === null) return `${disposition}, no window`;
	return `${disposition}, ${window.test} from ${window.from.toISOString()} until ${window.until.toISOString()}`;
}

/** When the last course ended, where none is running. */
function stoppedAt({ phototherapy }: AssessmentInput): Date | undefined {
	const ends = phototherapy.map(({ to }) => to?.getTime() ?? Infinity);
	const last = Math.max(...ends);
	return Number.isFinite(last) ? new Date(last) : undefined;
}

describe('the last step of the trace', () => {
	it('states the disposition, the window and the test of the result', () => {
		every((_input, result) => {
			expect(result.trace.at(-1)?.output).toBe(stated(result));
		});
	});

	it('carries the difference, the unit and the instants the result comes from', () => {
		every((input, result) => {
			const deciding = result.decidingIndex === null ? undefined : input.bilirubin[result.decidingIndex];
			const stopped = stoppedAt(input);
			expect(result.trace.at(-1)?.inputs).toEqual({
				...(deciding
					? {
							difference: result.difference,
							unit: result.thresholds?.unit,
							measuredAt: deciding.at.toISOString()
						}
					: {}),
				dischargeAt: input.dischargeAt.toISOString(),
				ageAtDischargeHours: cut(hoursOf(input.dischargeAt)),
				...(stopped ? { phototherapyStoppedAt: stopped.toISOString() } : {})
			});
		});
	});
});

describe('every other step of the trace', () => {
	it('says a rule and where it stands', () => {
		every((_input, { trace }) => {
			for (const step of trace) {
				expect(step.says.length).toBeGreaterThan(10);
				expect(step.source.length).toBeGreaterThan(3);
			}
		});
	});

	it('states the lines and the difference of each value at its own age, as the result does', () => {
		every((input, result) => {
			const found = steps(result, 'thresholds');
			expect(found).toHaveLength(input.bilirubin.length);
			for (const { measurement, thresholds, difference, ageHours } of result.measurements) {
				const { at, method, total, unit } = measurement;
				const lines = thresholdsAt(input, hoursOf(at));
				expect(lines.ok && lines.value).toEqual(thresholds);
				const escalation = thresholds.escalation === undefined ? '' : `, escalation ${thresholds.escalation}`;
				const step = found.find(
					({ inputs }) => inputs['at'] === at.toISOString() && inputs['method'] === method
				);
				expect(step?.output).toBe(
					`phototherapy ${thresholds.phototherapy}${escalation}, exchange ${thresholds.exchange} ${thresholds.unit}; difference ${difference}`
				);
				expect(step?.inputs).toMatchObject({ total, unit, ageHours });
				expect(ageHours).toBe(cut(hoursOf(at)));
			}
		});
	});

	it('names the value that decides, with the difference, lines and age of the result', () => {
		every((_input, result) => {
			const { decidingIndex, difference, thresholds, ageHours } = result;
			const found = steps(result, 'deciding-value');
			if (decidingIndex === null) expect(found).toEqual([]);
			else {
				expect(found.map(({ output }) => output)).toEqual([
					`bilirubin[${decidingIndex}] decides: difference ${difference} ${thresholds?.unit}`
				]);
				expect(result.measurements[decidingIndex]).toMatchObject({ difference, thresholds, ageHours });
			}
		});
	});

	it('states each rate with its limit, and whether it passes it, as the result does', () => {
		every((input, result) => {
			const found = [
				...steps(result, 'rate'),
				...steps(result, 'rate.first-24-hours'),
				...steps(result, 'rate.later')
			];
			expect(found).toHaveLength(result.rates.length);
			for (const rate of result.rates) {
				const step = found.find(
					({ inputs }) =>
						inputs['from'] === `bilirubin[${rate.fromIndex}]` && inputs['to'] === `bilirubin[${rate.toIndex}]`
				);
				expect(step?.inputs['limitPerHour']).toBe(rate.limitPerHour);
				expect(step?.output).toContain(`${rate.perHour} ${rate.unit} an hour`);
				expect(step?.output.includes('within the limit')).toBe(!rate.exceedsLimit);
				expect(step?.output.includes('reaches or passes')).toBe(rate.exceedsLimit);
				const crossing = rate.projectedCrossingAt?.toISOString();
				expect(step?.output.includes('projection only')).toBe(crossing !== undefined);
				if (crossing) expect(step?.output).toContain(crossing);
				const methods = [rate.fromIndex, rate.toIndex].map((i) => input.bilirubin[i]?.method);
				expect(step?.output.includes('two methods')).toBe(methods[0] !== methods[1]);
			}
		});
	});

	it('says why a value is not trusted, for each of them and for no other', () => {
		every((_input, result) => {
			const reasons = result.measurements.filter(({ trusted }) => !trusted).map((one) => one.whyNotTrusted);
			const said = result.trace.filter(({ output }) => output === 'this value does not decide');
			expect(said.map(({ says }) => says).sort()).toEqual([...reasons].sort());
		});
	});

	it('states the liver question as the result does', () => {
		every((_input, { trace, directFraction }) => {
			const said = trace.filter(({ output }) => output.startsWith('liver question'));
			expect(said.map(({ output }) => output)).toEqual([
				`liver question: ${directFraction.status}, asked at ${directFraction.dueAt?.toISOString()}`
			]);
		});
	});
});
