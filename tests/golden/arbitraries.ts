import * as fc from 'fast-check';
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	STANDARDS,
	assess,
	convert,
	thresholdsAt,
	type AssessmentInput,
	type BilirubinUnit,
	type Disposition,
	type Measurement,
	type PhototherapyCourse,
	type StandardId
} from '../../src/lib/domain/guideline/index';
import { at, BORN_AT } from './newborn';

export const standardIds = fc.constantFrom<StandardId>(...STANDARDS.map(({ id }) => id));
const minutes = (from: number, until: number): fc.Arbitrary<number> =>
	fc.integer({ min: from * 60, max: until * 60 }).map((one) => one / 60);

/** Two thirds of the ages lie in the first three days or within two hours of one at which a rule turns. */
const ages = fc.oneof(
	minutes(2, 330),
	minutes(2, 80),
	fc.tuple(fc.constantFrom(12, 24, 24, 72), minutes(-2, 2)).map(([limit, aside]) => limit + aside)
);

/** Over the phototherapy line in mg/dL, in tenths: mostly in the bands below it, else up to and past exchange. */
const overLine = fc.oneof(
	{ weight: 5, arbitrary: fc.integer({ min: -80, max: 5 }) },
	{ weight: 1, arbitrary: fc.integer({ min: 0, max: 120 }) }
);

interface Sketch {
	readonly age: number;
	readonly overLine: number;
	readonly method: Measurement['method'];
	readonly directShare: number | null;
}

const sketch: fc.Arbitrary<Sketch> = fc.record({
	age: ages,
	overLine,
	method: fc.constantFrom<Measurement['method']>('serum', 'serum', 'transcutaneous'),
	directShare: fc.option(
		fc.integer({ min: 0, max: 100 }).map((percent) => percent / 100),
		{ freq: 2 }
	)
});

const sketches: fc.Arbitrary<readonly Sketch[]> = fc.oneof(
	{ weight: 1, arbitrary: fc.constant([]) },
	{ weight: 8, arbitrary: fc.tuple(sketch) },
	{ weight: 7, arbitrary: fc.array(sketch, { minLength: 2, maxLength: 4 }) }
);

type Lined = Pick<
	AssessmentInput,
	'standard' | 'gestationalAge' | 'neurotoxicityRisks' | 'albuminGramsPerDecilitre'
>;

/** As a laboratory reports it: tenths of mg/dL or whole µmol/L, and above 0. */
const reported = (value: number, unit: BilirubinUnit): number =>
	unit === 'mg/dL' ? Math.max(Math.round(value * 10), 1) / 10 : Math.max(Math.round(value), 1);

function measured(
	{ age, overLine: over, method, directShare }: Sketch,
	known: Lined,
	unit: BilirubinUnit
): Measurement {
	const lines = thresholdsAt(known, age);
	if (!lines.ok) throw new Error(JSON.stringify(lines.error));
	const line = convert({ value: lines.value.phototherapy, unit: lines.value.unit }, unit).value;
	const total = reported(line + convert({ value: over / 10, unit: 'mg/dL' }, unit).value, unit);
	const direct = directShare === null ? null : Math.min(reported(total * directShare, unit), total);
	return { at: at(age), method, total, unit, ...(direct === null ? {} : { direct }) };
}

const settings = fc.constantFrom<PhototherapyCourse['setting']>('birth-stay', 'readmission', 'home');
const course = fc.record({ after: minutes(2, 90), hours: minutes(4, 50), setting: settings });

/** None, one or two courses of every setting, one after the other; the last may be running. */
const courses: fc.Arbitrary<PhototherapyCourse[]> = fc
	.tuple(
		fc.oneof(
			{ weight: 3, arbitrary: fc.constant([]) },
			{ weight: 2, arbitrary: fc.array(course, { minLength: 1, maxLength: 2 }) }
		),
		fc.integer({ min: 0, max: 3 })
	)
	.map(([given, quarter]) => {
		let hour = 0;
		return given.map(({ after, hours, setting }, i) => {
			const from = at(hour + after);
			hour += after + hours;
			return i === given.length - 1 && quarter === 0 ? { from, setting } : { from, to: at(hour), setting };
		});
	});

/** Hours from the last value to discharge: before it, at it, after it. */
const toDischarge = fc.oneof(minutes(-100, 0), fc.constant(0), minutes(0, 60));

/** Any newborn a standard covers; discharge is at the last value or later unless asked otherwise. */
export function newborns(
	wanted: { standard?: StandardId; dischargedBefore?: boolean } = {}
): fc.Arbitrary<AssessmentInput> {
	const standards = wanted.standard ? fc.constant(wanted.standard) : standardIds;
	return standards.chain((standard) =>
		fc
			.record({
				known: fc.record({
					standard: fc.constant(standard),
					gestationalAge: fc.record({
						weeks: fc.integer({ min: standard === 'aap-2022' ? 35 : 23, max: 42 }),
						days: fc.integer({ min: 0, max: 6 })
					}),
					neurotoxicityRisks: fc.oneof(fc.constant([]), fc.subarray([...NEUROTOXICITY_RISKS])),
					albuminGramsPerDecilitre: fc.option(
						fc.integer({ min: 15, max: 45 }).map((tenths) => tenths / 10),
						{ freq: 2, nil: undefined }
					)
				}),
				jaundiceRisks: fc.oneof(fc.constant([]), fc.subarray([...JAUNDICE_RISKS])),
				feeding: fc.constantFrom<AssessmentInput['feeding']>('breast', 'formula', 'mixed'),
				unit: fc.constantFrom<BilirubinUnit>('mg/dL', 'umol/L'),
				sketches,
				toDischarge,
				phototherapy: courses
			})
			.map(({ known, sketches: drawn, unit, toDischarge: hours, ...rest }): AssessmentInput => {
				const last = Math.max(0, ...drawn.map(({ age }) => age));
				const aside = wanted.dischargedBefore ? hours : Math.abs(hours);
				return {
					...known,
					...rest,
					bornAt: BORN_AT,
					bilirubin: drawn.map((one) => measured(one, known, unit)),
					dischargeAt: at(Math.max(drawn.length > 0 ? last + aside : 40 + hours / 4, 1))
				};
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
