import * as fc from 'fast-check';
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	STANDARDS,
	assess,
	type AssessmentInput,
	type Disposition,
	type Measurement,
	type StandardId
} from '../../src/lib/domain/guideline/index';
import { at, BORN_AT } from './newborn';

export const standardIds = fc.constantFrom<StandardId>(...STANDARDS.map(({ id }) => id));
const minutes = (from: number, until: number): fc.Arbitrary<number> =>
	fc.integer({ min: from * 60, max: until * 60 }).map((one) => one / 60);

function measurements(standard: StandardId): fc.Arbitrary<Measurement[]> {
	const one = fc.record({
		at: minutes(2, 330).map(at),
		method: fc.constantFrom('serum', 'transcutaneous'),
		total:
			standard === 'aap-2022'
				? fc.integer({ min: 5, max: 320 }).map((n) => n / 10)
				: fc.integer({ min: 10, max: 550 }),
		unit: fc.constant(standard === 'aap-2022' ? ('mg/dL' as const) : ('umol/L' as const))
	});
	return fc.uniqueArray(one, { maxLength: 4, selector: (m) => `${m.method} ${m.at.getTime()}` });
}

const courses: fc.Arbitrary<AssessmentInput['phototherapy']> = fc.oneof(
	{ weight: 3, arbitrary: fc.constant([]) },
	{
		weight: 1,
		arbitrary: fc
			.record({
				from: minutes(5, 150),
				hours: minutes(4, 60),
				setting: fc.constantFrom('home', 'readmission'),
				isRunning: fc.boolean()
			})
			.map(({ from, hours, setting, isRunning }) => [
				isRunning ? { from: at(from), setting } : { from: at(from), to: at(from + hours), setting }
			])
	},
	{
		weight: 1,
		arbitrary: fc
			.record({ from: minutes(2, 40), hours: minutes(4, 30) })
			.map(({ from, hours }) => [{ from: at(from), to: at(from + hours), setting: 'birth-stay' as const }])
	}
);

/** Any newborn a standard covers; discharge is at the last value or later unless asked otherwise. */
export function newborns(
	wanted: { standard?: StandardId; dischargedBefore?: boolean } = {}
): fc.Arbitrary<AssessmentInput> {
	const standards = wanted.standard ? fc.constant(wanted.standard) : standardIds;
	return standards.chain((standard) =>
		fc
			.record({
				standard: fc.constant(standard),
				gestationalAge: fc.record({
					weeks: fc.integer({ min: standard === 'aap-2022' ? 35 : 23, max: 42 }),
					days: fc.integer({ min: 0, max: 6 })
				}),
				bornAt: fc.constant(BORN_AT),
				dischargeAt: minutes(40, 120).map(at),
				neurotoxicityRisks: fc.subarray([...NEUROTOXICITY_RISKS]),
				jaundiceRisks: fc.subarray([...JAUNDICE_RISKS]),
				feeding: fc.constantFrom('breast', 'formula', 'mixed'),
				bilirubin: measurements(standard),
				phototherapy: courses
			})
			.map((input) => {
				if (wanted.dischargedBefore) return input;
				const last = Math.max(input.dischargeAt.getTime(), ...input.bilirubin.map((one) => one.at.getTime()));
				return { ...input, dischargeAt: new Date(last) };
			})
			.filter((input) => assess(input).ok)
	);
}

/** How soon a result wants something, in milliseconds since 1970: the more urgent, the smaller. */
const NOW: readonly Disposition[] = [
	'exchange',
	'escalate',
	'phototherapy',
	'confirm-serum',
	'measure-first'
];

export function dueMs(input: AssessmentInput): number {
	const result = assess(input);
	if (!result.ok) throw new Error(JSON.stringify(result.error));
	const { disposition, window } = result.value;
	if (NOW.includes(disposition)) return NOW.indexOf(disposition) - NOW.length;
	return window ? window.until.getTime() : Infinity;
}
