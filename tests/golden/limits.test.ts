import { describe, expect, it, vi } from 'vitest';
import {
	PLAUSIBLE,
	albuminRatioLimit,
	albuminRatioReached,
	assess,
	phototherapyStopLevel,
	shownHours,
	type AssessmentInput
} from '../../src/lib/domain/guideline/index';
import { assessed, at, newborn, refusedFor, value, windowHours } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

const umol = (hours: number, total: number) => value(hours, total, 'serum', 'umol/L');
const course = (from: number, to: number, setting: 'birth-stay' | 'readmission' | 'home' = 'birth-stay') =>
	({ from: at(from), to: at(to), setting }) as const;

describe('NICE CG98, when to measure again below the line (FACTS 4)', () => {
	const within = (changes: Partial<AssessmentInput>) =>
		windowHours(assessed({ standard: 'nice-cg98', bilirubin: [umol(48, 220)], ...changes }));

	it.each<[string, number, Partial<AssessmentInput>]>([
		['formula, no risk', 24, {}],
		['mixed', 24, { feeding: 'mixed' }],
		['breast', 18, { feeding: 'breast' }],
		['a brother or sister treated', 18, { jaundiceRisks: ['sibling-or-parent-treated'] }],
		[
			'a risk that is not of that list',
			24,
			{ jaundiceRisks: ['scalp-hematoma-or-bruising', 'down-syndrome'] }
		],
		['a neurotoxicity risk, which moves nothing', 24, { neurotoxicityRisks: ['sepsis'] }]
	])('38 weeks, %s: within %i hours', (_name, hours, changes) => {
		const found = within({ gestationalAge: { weeks: 38, days: 0 }, ...changes });
		expect(found).toEqual([48, 48 + hours, 'serum-or-transcutaneous']);
	});

	it('before 38 weeks: within 18 hours however fed, our reading', () => {
		for (const feeding of ['formula', 'breast', 'mixed'] as const) {
			// 37 weeks at 48 hours: 40 + (270 - 40) * 48 / 72 = 193.3.
			const result = assessed({
				standard: 'nice-cg98',
				gestationalAge: { weeks: 37, days: 6 },
				feeding,
				bilirubin: [umol(48, 160)]
			});
			expect(result.thresholds?.phototherapy).toBe(193.3);
			expect(windowHours(result)).toEqual([48, 66, 'serum-or-transcutaneous']);
			expect(result.trace.at(-1)?.confidence).toBe('our reading');
		}
	});

	it.each([
		[50, 'follow-up'],
		[50.1, 'judgement']
	])('%f below the line is %s', (below, disposition) => {
		for (const weeks of [35, 40]) {
			const line = weeks === 40 ? 250 : 180;
			const result = assessed({
				standard: 'nice-cg98',
				gestationalAge: { weeks, days: 0 },
				bilirubin: [umol(48, line - below)]
			});
			expect(result.thresholds?.phototherapy).toBe(line);
			expect(result.disposition).toBe(disposition);
		}
	});

	it('asks for serum below 35 weeks and once treated', () => {
		const test = (changes: Partial<AssessmentInput>) =>
			assessed({ standard: 'nice-cg98', ...changes }).window?.test;
		// Lines at 48 hours: 34 weeks 173.3, 35 weeks 180.
		expect(test({ gestationalAge: { weeks: 34, days: 6 }, bilirubin: [umol(48, 160)] })).toBe('serum');
		expect(test({ gestationalAge: { weeks: 35, days: 0 }, bilirubin: [umol(48, 160)] })).toBe(
			'serum-or-transcutaneous'
		);
		expect(test({ phototherapy: [course(26, 30)], bilirubin: [umol(48, 220)] })).toBe('serum');
		expect(test({ bilirubin: [umol(48, 250)] })).toBe('serum');
	});

	it('repeats within 6 hours up to 24 hours of age, and later while jaundice began before them', () => {
		expect(within({ bilirubin: [umol(24, 160)] })).toEqual([24, 30, 'serum']);
		expect(within({ bilirubin: [umol(24.01, 160)] })?.[1]).toBeCloseTo(48.01, 9);
		expect(within({ jaundiceRisks: ['jaundice-in-first-24-hours'] })).toEqual([48, 54, 'serum']);
		const steady = { jaundiceRisks: ['jaundice-in-first-24-hours' as const] };
		expect(within({ ...steady, bilirubin: [umol(40, 220), umol(48, 220)] })?.[1]).toBe(72);
		expect(within({ ...steady, bilirubin: [umol(40, 219.9), umol(48, 220)] })?.[1]).toBe(54);
	});
});

describe('after phototherapy, transcutaneous values wait 24 hours (AAP 2022, FACTS 2.6)', () => {
	const phototherapy = [course(50, 60, 'readmission')];

	it('trusts one from 24 hours on, after the last of two courses', () => {
		const trusted = (hours: number, courses: AssessmentInput['phototherapy']) =>
			assessed({ phototherapy: courses, bilirubin: [value(hours, 6, 'transcutaneous')] }).measurements[0]
				?.trusted;
		const two = [course(50, 60, 'readmission'), course(90, 100, 'home')];
		expect(trusted(83.99, phototherapy)).toBe(false);
		expect(trusted(84, phototherapy)).toBe(true);
		expect(trusted(84, two)).toBe(true);
		expect(trusted(90, two)).toBe(false);
		expect(trusted(123.99, two)).toBe(false);
		expect(trusted(124, two)).toBe(true);
	});

	it('asks for serum in a window that opens sooner', () => {
		// 84 hours and 40 weeks: line 21.0; 2.5 below asks in 4 to 24 hours.
		const test = (hours: number) => {
			const { thresholds } = assessed({ phototherapy, bilirubin: [value(hours, 5)] });
			const total = Math.round(((thresholds?.phototherapy ?? NaN) - 2.5) * 10) / 10;
			const result = assessed({ phototherapy, bilirubin: [value(hours, total)] });
			return [windowHours(result)?.[0], windowHours(result)?.[2]];
		};
		expect(test(79.5)).toEqual([83.5, 'serum']);
		expect(test(80)).toEqual([84, 'serum-or-transcutaneous']);
	});
});

describe('the bilirubin to albumin ratio (FACTS 2.5)', () => {
	it.each([
		[35, false, 7.2],
		[35, true, 6.8],
		[37, false, 7.2],
		[37, true, 6.8],
		[38, false, 8],
		[38, true, 7.2],
		[42, false, 8],
		[42, true, 7.2]
	])('at %i weeks, at risk %s, is %f', (weeks, atRisk, limit) => {
		expect(albuminRatioLimit(weeks, atRisk)).toBe(limit);
		expect(albuminRatioReached({ total: limit * 2.5, albumin: 2.5, weeks, atRisk })).toBe(true);
		expect(albuminRatioReached({ total: limit * 2.5 - 0.1, albumin: 2.5, weeks, atRisk })).toBe(false);
	});
});

describe('the level at which phototherapy may stop (FACTS 2.5, 4)', () => {
	const level = (changes: Partial<Parameters<typeof phototherapyStopLevel>[0]>) =>
		phototherapyStopLevel({
			standard: 'aap-2022',
			weeks: 40,
			neurotoxicityRisks: [],
			bornAt: at(0),
			startedAt: at(48),
			at: at(90),
			...changes
		});

	it('is 2 mg/dL under the line at the start by AAP 2022, 50 µmol/L under the line now by NICE CG98', () => {
		expect(level({})).toEqual({ value: 15, unit: 'mg/dL' });
		expect(level({ at: at(200) })).toEqual({ value: 15, unit: 'mg/dL' });
		expect(level({ weeks: 38, neurotoxicityRisks: ['sepsis'] })).toEqual({ value: 12, unit: 'mg/dL' });
		expect(level({ standard: 'nice-cg98', at: at(48) })).toEqual({ value: 200, unit: 'umol/L' });
		expect(level({ standard: 'nice-cg98', at: at(72), startedAt: at(10) })).toEqual({
			value: 250,
			unit: 'umol/L'
		});
	});

	it('is not known outside what is printed', () => {
		expect(level({ weeks: 34 })).toBeNull();
		expect(level({ startedAt: at(0.99) })).toBeNull();
		expect(level({ startedAt: at(336.01) })).toBeNull();
		expect(level({ standard: 'nice-cg98', weeks: 22 })).toBeNull();
		expect(level({ standard: 'nice-cg98', at: at(-0.01) })).toBeNull();
		expect(level({ standard: 'nice-cg98', at: at(672.01) })).toBeNull();
	});
});

describe('an age that is shown', () => {
	it.each([
		[24 * 3_600_000 - 1, 23.99],
		[24 * 3_600_000, 24],
		[72 * 3_600_000 - 1, 71.99],
		[35_999, 0],
		[36_000, 0.01],
		[1.999 * 3_600_000, 1.99]
	])('%i ms is cut to %f hours', (ms, hours) => {
		expect(shownHours(ms)).toBe(hours);
	});

	it('is cut in the result and in its trace, so that it never stands past a limit the age has not reached', () => {
		const result = assessed({ dischargeAt: at(71.9999), bilirubin: [value(23.9999, 8)] });
		expect(result.ageHours).toBe(23.99);
		expect(result.measurements[0]?.ageHours).toBe(23.99);
		expect(result.trace.at(-1)?.inputs['ageAtDischargeHours']).toBe(71.99);
	});
});

describe('what else must not pass silently', () => {
	it.each<[string, Partial<AssessmentInput>]>([
		['phototherapy-in-the-future', { now: at(29.99), phototherapy: [{ from: at(30), setting: 'home' }] }],
		['phototherapy-in-the-future', { now: at(39.99), phototherapy: [course(30, 40)] }],
		['too-many-measurements', { bilirubin: Array.from({ length: 101 }, (_, i) => value(30 + i, 5)) }],
		['total-implausible', { bilirubin: [value(30, 60.1)] }],
		['albumin-implausible', { albuminGramsPerDecilitre: 0.49 }],
		['albumin-implausible', { albuminGramsPerDecilitre: 7.01 }],
		['albumin-implausible', { albuminGramsPerDecilitre: NaN }],
		[
			'birth-implausible',
			{ bornAt: new Date('1999-12-31T23:59:59Z'), dischargeAt: new Date('2000-01-02T00:00:00Z') }
		],
		['discharge-implausible', { dischargeAt: at(365 * 24 + 0.01) }],
		['instant-unreadable', { dischargeAt: new Date(NaN) }],
		['instant-unreadable', { bilirubin: [{ ...value(30, 5), at: new Date(NaN) }] }],
		['instant-unreadable', { phototherapy: [{ from: new Date(NaN), setting: 'home' }] }],
		['gestational-age-unreadable', { gestationalAge: { weeks: 38.5, days: 0 } }],
		['direct-implausible', { bilirubin: [{ ...value(30, 5), direct: NaN }] }],
		['phototherapy-overlaps', { phototherapy: [course(30, 40), course(39.99, 50)] }]
	])('refuses %s', (code, changes) => {
		expect(refusedFor(changes)).toEqual([code]);
	});

	it.each<[string, Partial<AssessmentInput>]>([
		['phototherapy that begins now', { now: at(30), phototherapy: [{ from: at(30), setting: 'home' }] }],
		['phototherapy that ends now', { now: at(40), phototherapy: [course(30, 40)] }],
		[
			`${PLAUSIBLE.measurements} values`,
			{ bilirubin: Array.from({ length: PLAUSIBLE.measurements }, (_, i) => value(30 + i, 5)) }
		],
		['60 mg/dL', { bilirubin: [value(30, 60)] }],
		['albumin 0.5', { albuminGramsPerDecilitre: 0.5 }],
		['albumin 7', { albuminGramsPerDecilitre: 7 }],
		['discharge after a year', { dischargeAt: at(365 * 24) }],
		['44 weeks', { gestationalAge: { weeks: 44, days: 6 } }],
		['a value measured now', { now: at(30), bilirubin: [value(30, 5)] }],
		['direct 0', { bilirubin: [{ ...value(30, 5), direct: 0 }] }]
	])('takes %s', (_name, changes) => {
		expect(assess(newborn(changes)).ok).toBe(true);
	});

	it('looks at the future by the instant asked with, before the one in the input', () => {
		const input = newborn({ now: at(20), bilirubin: [value(30, 5)] });
		expect(assess(input).ok).toBe(false);
		expect(assess(input, { notAfter: at(30) }).ok).toBe(true);
		expect(assess({ ...input, now: at(40) }, { notAfter: at(29.99) }).ok).toBe(false);
	});
});
