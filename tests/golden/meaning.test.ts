import { describe, expect, it } from 'vitest';
import {
	assessAtAnyAge,
	neurotoxicityRisksSay,
	placeOf,
	placeOfDeciding,
	resultSays,
	type AssessmentInput,
	type PhototherapyCourse
} from '../../src/lib/domain/guideline/index';
import { dispositionLabel } from '../../src/lib/format/values';
import { assessed, at, newborn, value } from './newborn';

const course = (from: number, to?: number): PhototherapyCourse => ({
	from: at(from),
	...(to === undefined ? {} : { to: at(to) }),
	setting: 'birth-stay'
});

/** NICE CG98, 38 weeks or more, printed row of 96 hours: phototherapy over 350, exchange over 450 µmol/L. */
const nice = (total: number, changes: Partial<AssessmentInput> = {}): Partial<AssessmentInput> => ({
	standard: 'nice-cg98',
	dischargeAt: at(100),
	bilirubin: [value(96, total, 'serum', 'umol/L')],
	...changes
});
/** AAP 2022, 40 weeks without risk at 48 hours: 17.0, escalation 22.0, exchange 24.0 mg/dL. */
const aap = (total: number, changes: Partial<AssessmentInput> = {}): Partial<AssessmentInput> => ({
	bilirubin: [value(48, total)],
	...changes
});

type Row = [string, Partial<AssessmentInput>, string, RegExp, string | null, string | null];

const CASES: Row[] = [
	[
		'AAP, below the line',
		aap(13.4),
		'follow-up',
		/^Difference 3\.5 to 5\.4/,
		null,
		'3.6 mg/dL below the phototherapy line'
	],
	[
		'AAP, equal to the line',
		aap(17),
		'phototherapy',
		/at or over the phototherapy line: phototherapy\. A value equal to the line counts/,
		'phototherapy',
		'equal to the phototherapy line, which AAP 2022 counts as reached'
	],
	[
		'AAP, over the line',
		aap(17.6),
		'phototherapy',
		/^Serum bilirubin at or over the phototherapy line/,
		'phototherapy',
		'0.6 mg/dL over the phototherapy line'
	],
	[
		'AAP, equal to the escalation line',
		aap(22),
		'escalate',
		/escalation of care, an emergency/,
		'escalation',
		'equal to the escalation line, which AAP 2022 counts as reached'
	],
	[
		'AAP, over the exchange line',
		aap(24.3),
		'exchange',
		/^Serum bilirubin at or over the exchange line: an emergency/,
		'exchange',
		'0.3 mg/dL over the exchange line'
	],
	[
		'AAP, under running phototherapy and below the line',
		aap(13.4, { phototherapy: [course(40)] }),
		'phototherapy',
		/^Phototherapy is running/,
		null,
		'3.6 mg/dL below the phototherapy line'
	],
	[
		'AAP, under running phototherapy and over the line',
		aap(17.6, { phototherapy: [course(40)] }),
		'phototherapy',
		/^Phototherapy is running/,
		'phototherapy',
		'0.6 mg/dL over the phototherapy line'
	],
	[
		'AAP, after treatment, the last value over the line and from before it',
		aap(17.6, { phototherapy: [course(49, 58)] }),
		'follow-up',
		/^Treated in the birth stay/,
		'phototherapy',
		'0.6 mg/dL over the phototherapy line'
	],
	[
		'AAP, transcutaneous and near the line',
		{ bilirubin: [value(48, 15, 'transcutaneous')] },
		'confirm-serum',
		/is to be confirmed by serum now/,
		null,
		'2.0 mg/dL below the phototherapy line'
	],
	[
		'AAP, 0.1 to 1.9 below before 24 hours',
		{ bilirubin: [value(20, 11.2)], dischargeAt: at(30) },
		'delay-discharge',
		/before 24 hours of age: delay discharge/,
		null,
		'1.4 mg/dL below the phototherapy line'
	],
	[
		'AAP, left to judgement',
		aap(9, { dischargeAt: at(80) }),
		'judgement',
		/^Difference 5\.5 or more, discharge at 72 hours of age or later: follow-up by clinical judgement/,
		null,
		'8.0 mg/dL below the phototherapy line'
	],
	['AAP, nothing measured', {}, 'measure-first', /^No bilirubin was measured/, null, null],
	[
		'NICE, equal to the line',
		nice(350),
		'follow-up',
		/^At 38 weeks or more, over 24 hours old and well, within 50/,
		null,
		'equal to the phototherapy line; NICE CG98 treats a value over it'
	],
	[
		'NICE, a little over the line',
		nice(350.4),
		'phototherapy',
		/^Serum bilirubin over the phototherapy line: phototherapy/,
		'phototherapy',
		'0.4 µmol/L over the phototherapy line'
	],
	[
		'NICE, equal to the exchange line',
		nice(450),
		'phototherapy',
		/^Serum bilirubin over the phototherapy line/,
		'phototherapy',
		'100 µmol/L over the phototherapy line'
	],
	[
		'NICE, over the exchange line',
		nice(451),
		'exchange',
		/^Serum bilirubin over the exchange line/,
		'exchange',
		'1 µmol/L over the exchange line'
	],
	[
		'NICE, under running phototherapy and below the line',
		nice(320, { phototherapy: [course(80)] }),
		'phototherapy',
		/^Phototherapy is running/,
		null,
		'30 µmol/L below the phototherapy line'
	],
	[
		'NICE, well below the line',
		nice(250),
		'judgement',
		/^More than 50 µmol\/L below the phototherapy line: no routine repeat/,
		null,
		'100 µmol/L below the phototherapy line'
	]
];

describe('what a result means is said by the rule that decided and by the value itself', () => {
	it.each(CASES)('%s', (_, changes, disposition, says, reached, placed) => {
		const result = assessed(changes);
		expect(result.disposition).toBe(disposition);
		expect(resultSays(result)).toMatch(says);
		expect(resultSays(result)).toBe(result.trace.at(-1)?.says);
		const place = placeOfDeciding(result);
		expect(place?.says ?? null).toBe(placed);
		expect(place?.reached ?? null).toBe(reached);
	});

	it('a value past the lines is left to judgement and stands at no line', () => {
		const known = assessAtAnyAge(newborn({ bilirubin: [value(48, 12), value(15 * 24, 9)] }));
		if (!known.ok) throw new Error('refused');
		expect(resultSays(known.value)).toBe(
			'The latest value lies past the last published hour and is held against no line: clinical judgement.'
		);
		expect(placeOfDeciding(known.value)).toBeNull();
	});

	it('places each value by its own age, in the unit of the standard', () => {
		const result = assessed({
			bilirubin: [value(48, 222.3, 'serum', 'umol/L'), value(60, 330, 'serum', 'umol/L')]
		});
		expect(result.measurements.map((held) => placeOf(held, result.standard).says)).toEqual([
			'4.0 mg/dL below the phototherapy line',
			'0.8 mg/dL over the phototherapy line'
		]);
	});

	it('says of neurotoxicity risks what the standard makes of them', () => {
		expect(neurotoxicityRisksSay('aap-2022')).toMatch(/^A neurotoxicity risk factor chooses the lower lines/);
		expect(neurotoxicityRisksSay('nice-cg98')).toMatch(/no lower lines/);
	});

	it('the short labels claim nothing of the value', () => {
		for (const [, changes] of CASES) {
			expect(dispositionLabel(assessed(changes).disposition)).not.toMatch(/threshold|line|over|below|met/i);
		}
	});
});
