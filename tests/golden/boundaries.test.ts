import { describe, expect, it, vi } from 'vitest';
import { assess, thresholdCurve, type AssessmentInput } from '../../src/lib/domain/guideline/index';
import { assessed, at, codes, newborn, refusedFor, value, windowHours } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

/** Line for 40 weeks without risk at 48 hours: 17.0 mg/dL, exchange 24.0 (public checklist of the AAP tables). */
const follow = (difference: number, changes: Partial<AssessmentInput> = {}) =>
	assessed({ bilirubin: [value(48, Math.round((17 - difference) * 10) / 10)], ...changes });

describe('AAP 2022 figure 7, each limit of the difference from both sides', () => {
	it.each([
		[0, 'phototherapy', null],
		[0.1, 'follow-up', [52, 72, 'serum']],
		[1.9, 'follow-up', [52, 72, 'serum']],
		[2.0, 'follow-up', [52, 72, 'serum-or-transcutaneous']],
		[3.4, 'follow-up', [52, 72, 'serum-or-transcutaneous']],
		[3.5, 'follow-up', [72, 96, 'serum-or-transcutaneous']],
		[5.4, 'follow-up', [72, 96, 'serum-or-transcutaneous']],
		[5.5, 'follow-up', [48, 96, 'judgement']],
		[6.9, 'follow-up', [48, 96, 'judgement']],
		[7.0, 'follow-up', [48, 120, 'judgement']]
	])('difference %f is %s', (difference, disposition, window) => {
		const result = follow(difference);
		expect(result.difference).toBe(difference);
		expect(result.disposition).toBe(disposition);
		expect(windowHours(result)).toEqual(window);
	});

	it.each([
		[71.99, 'follow-up'],
		[72, 'judgement'],
		[72.01, 'judgement']
	])('discharge at %f hours with a difference of 5.5 or 7.0 is %s', (hours, disposition) => {
		expect(follow(5.5, { dischargeAt: at(hours) }).disposition).toBe(disposition);
		expect(follow(7.0, { dischargeAt: at(hours) }).disposition).toBe(disposition);
		expect(follow(5.4, { dischargeAt: at(hours) }).disposition).toBe('follow-up');
	});

	it('delays discharge below 24 hours of age, and not from 24 hours on', () => {
		// Line for 40 weeks: 13.1 mg/dL at hour 23, 13.3 at hour 24.
		const before = assessed({ bilirubin: [value(23.99, 13.0)] });
		expect(before.thresholds?.phototherapy).toBe(13.1);
		expect(before.disposition).toBe('delay-discharge');
		expect(windowHours(before)?.[1]).toBeCloseTo(31.99, 9);
		const from = assessed({ bilirubin: [value(24, 13.2)] });
		expect(from.disposition).toBe('follow-up');
		expect(windowHours(from)).toEqual([28, 48, 'serum']);
		expect(codes(from)).toContain('options-near-line');
		expect(codes(before)).not.toContain('options-near-line');
	});

	it('rounds a difference to 0.1 before it picks the band, a half towards the line', () => {
		expect(assessed({ bilirubin: [value(48, 13.54)] }).difference).toBe(3.5);
		expect(assessed({ bilirubin: [value(48, 13.55)] }).difference).toBe(3.4);
		expect(assessed({ bilirubin: [value(48, 16.95)] }).disposition).toBe('phototherapy');
		expect(assessed({ bilirubin: [value(48, 16.94)] }).disposition).toBe('follow-up');
	});
});

describe('AAP 2022 treatment lines, equal counts as reached', () => {
	it.each([
		[16.9, 'follow-up'],
		[17.0, 'phototherapy'],
		[21.9, 'phototherapy'],
		[22.0, 'escalate'],
		[23.9, 'escalate'],
		[24.0, 'exchange']
	])('%f mg/dL at 48 hours and 40 weeks is %s', (total, disposition) => {
		expect(assessed({ bilirubin: [value(48, total)] }).disposition).toBe(disposition);
	});

	it('takes a value in µmol/L, converted', () => {
		expect(assessed({ bilirubin: [value(48, 291, 'serum', 'umol/L')] }).disposition).toBe('phototherapy');
		expect(assessed({ bilirubin: [value(48, 289, 'serum', 'umol/L')] }).difference).toBe(0.1);
	});
});

describe('AAP 2022 transcutaneous values', () => {
	it.each([
		[13.9, 'follow-up'],
		[14.0, 'confirm-serum'],
		[23.0, 'confirm-serum']
	])('%f mg/dL against 17.0 is %s', (total, disposition) => {
		expect(assessed({ bilirubin: [value(48, total, 'transcutaneous')] }).disposition).toBe(disposition);
	});

	it('confirms from 15 mg/dL on however far the line', () => {
		// Line for 40 weeks at 100 hours: 21.8.
		const found = (total: number) =>
			assessed({ bilirubin: [value(100, total, 'transcutaneous')] }).disposition;
		expect(found(14.9)).not.toBe('confirm-serum');
		expect(found(15.0)).toBe('confirm-serum');
	});

	it('does not decide under phototherapy or within 24 hours after it', () => {
		const phototherapy = [{ from: at(30), to: at(50), setting: 'birth-stay' }] as const;
		const trusted = (hours: number) =>
			assessed({ phototherapy, bilirubin: [value(29, 14), value(hours, 6, 'transcutaneous')] })
				.measurements[1]?.trusted;
		expect(trusted(29.5)).toBe(true);
		expect(trusted(30)).toBe(false);
		expect(trusted(49.9)).toBe(false);
		expect(trusted(73.9)).toBe(false);
		expect(trusted(74)).toBe(true);
	});

	it('does not undo a serum value over the line', () => {
		const result = assessed({ bilirubin: [value(48, 17.5), value(50, 8, 'transcutaneous')] });
		expect(result.disposition).toBe('phototherapy');
		expect(result.decidingIndex).toBe(0);
		expect(codes(result)).toContain('untrusted-value');
	});

	it('asks for serum when an untrusted later value stands near the line', () => {
		const phototherapy = [{ from: at(30), to: at(50), setting: 'birth-stay' }] as const;
		const last = (total: number) =>
			assessed({ phototherapy, bilirubin: [value(49, 8), value(60, total, 'transcutaneous')] }).disposition;
		expect(last(16.5)).toBe('confirm-serum');
		expect(last(8)).toBe('follow-up');
	});
});

describe('a skin value that asked for serum', () => {
	it.each([
		['aap-2022', value(48, 16, 'transcutaneous'), value(52, 10, 'transcutaneous'), value(50, 15)],
		[
			'nice-cg98',
			value(96, 260, 'transcutaneous', 'umol/L'),
			value(100, 200, 'transcutaneous', 'umol/L'),
			value(98, 240, 'serum', 'umol/L')
		]
	] as const)('is not answered by a later skin value (%s)', (standard, asking, later, serum) => {
		const alone = assessed({ standard, bilirubin: [asking, later] });
		expect(alone.disposition).toBe('confirm-serum');
		expect(alone.trace.at(-1)?.rule).toBe('confirm.unanswered');
		expect(assessed({ standard, bilirubin: [asking, serum, later] }).disposition).not.toBe('confirm-serum');
	});
});

describe('which value decides', () => {
	it('is the latest, in whatever order they are given', () => {
		const result = assessed({ bilirubin: [value(48, 9), value(40, 10, 'transcutaneous'), value(30, 8)] });
		expect(result.decidingIndex).toBe(0);
		expect(
			result.trace.some(({ rule, confidence }) => rule === 'deciding-value' && confidence === 'our reading')
		).toBe(true);
	});

	it('asks to measure first where there is none', () => {
		const result = assessed({});
		expect(result.disposition).toBe('measure-first');
		expect([result.ageHours, result.thresholds, result.difference, result.window]).toEqual([
			null,
			null,
			null,
			null
		]);
	});
});

describe('from when a window counts', () => {
	it('counts a visit from discharge where that ends it earlier, and says that it is our reading', () => {
		const after = assessed({ dischargeAt: at(40), bilirubin: [value(48, 11)] });
		expect(windowHours(after)).toEqual([40, 88, 'judgement']);
		expect(
			after.trace.some(
				({ rule, confidence }) => rule === 'window.visit-anchor' && confidence === 'our reading'
			)
		).toBe(true);
		expect(windowHours(assessed({ dischargeAt: at(60), bilirubin: [value(48, 11)] }))).toEqual([
			48,
			96,
			'judgement'
		]);
	});

	it('counts a test from the measurement, whenever discharge was', () => {
		expect(windowHours(assessed({ dischargeAt: at(40), bilirubin: [value(48, 13)] }))).toEqual([
			72,
			96,
			'serum-or-transcutaneous'
		]);
	});

	it('counts anew where counting from discharge would leave the visit less than 4 hours', () => {
		const visit = (hours: number, total: number) => {
			const result = assessed({ dischargeAt: at(40), bilirubin: [value(hours, total)] });
			return [windowHours(result), result.trace.some(({ rule }) => rule === 'window.new-count')];
		};
		// Differences 6.1 and 6.2 (2 days); 11.3 and 11.4 (3 days).
		expect(visit(84, 14.7)).toEqual([[40, 88, 'judgement'], false]);
		expect(visit(84.1, 14.7)).toEqual([[84.1, 112, 'judgement'], true]);
		expect(visit(108, 10)).toEqual([[40, 112, 'judgement'], false]);
		expect(visit(108.1, 10)).toEqual([[108.1, 180.1, 'judgement'], true]);
	});

	it('measures at 24 to 48 hours of age after a value before 12 hours', () => {
		const found = (hours: number) => windowHours(assessed({ bilirubin: [value(hours, 2)] }));
		expect(found(11.9)).toEqual([24, 48, 'serum-or-transcutaneous']);
		expect(found(12)).toEqual([12, 84, 'judgement']);
	});
});

describe('after phototherapy (AAP 2022)', () => {
	const treated = (from: number, to: number, setting: 'birth-stay' | 'readmission' | 'home') =>
		({ from: at(from), to: at(to), setting }) as const;

	it.each([
		['begun before 48 hours', { phototherapy: [treated(47, 60, 'birth-stay')] }, [66, 72, 'serum']],
		['begun at 48 hours', { phototherapy: [treated(48, 60, 'birth-stay')] }, [72, 84, 'serum']],
		[
			'begun late with hemolysis suspected',
			{ phototherapy: [treated(50, 60, 'birth-stay')], jaundiceRisks: ['hemolysis-suspected' as const] },
			[66, 72, 'serum']
		],
		[
			'at readmission alone',
			{ phototherapy: [treated(80, 100, 'readmission')] },
			[124, 148, 'serum-or-transcutaneous']
		],
		['at home', { phototherapy: [treated(80, 100, 'home')] }, [124, 148, 'serum-or-transcutaneous']],
		[
			'at readmission after the birth stay',
			{ phototherapy: [treated(40, 50, 'birth-stay'), treated(80, 100, 'readmission')] },
			[112, 124, 'serum']
		]
	])('%s', (_name, changes, window) => {
		const result = assessed({ dischargeAt: at(65), bilirubin: [value(46, 18)], ...changes });
		expect(result.disposition).toBe('follow-up');
		expect(windowHours(result)).toEqual(window);
	});

	it('owes the next day after the early test, and figure 7 after that', () => {
		const phototherapy = [treated(40, 60, 'birth-stay')];
		const first = assessed({ phototherapy, dischargeAt: at(70), bilirubin: [value(59, 9), value(67, 9)] });
		expect(windowHours(first)).toEqual([72, 84, 'serum']);
		const second = assessed({ phototherapy, dischargeAt: at(70), bilirubin: [value(67, 9), value(80, 10)] });
		expect(windowHours(second)?.[2]).toBe('judgement');
	});

	it('asks for a test of its own for each that is owed', () => {
		const phototherapy = [treated(40, 60, 'birth-stay')];
		const owed = (...hours: number[]) => {
			const bilirubin = [value(59, 9), ...hours.map((one) => value(one, 9))];
			const result = assessed({ phototherapy, dischargeAt: at(75), bilirubin });
			return [result.trace.at(-1)?.rule, windowHours(result)];
		};
		expect(owed(65.9)).toEqual(['after.soon', [66, 72, 'serum']]);
		expect(owed(72)).toEqual(['after.next-day', [72, 84, 'serum']]);
		expect(owed(73)).toEqual(['after.next-day', [73, 84, 'serum']]);
		// Taken late: 6 hours apart at least.
		expect(owed(80)).toEqual(['after.next-day', [80, 86, 'serum']]);
		expect(owed(67, 72)[0]).toBe('figure-7.judgement');
		// When the next day is over too, one value has shown what both would have shown.
		expect(owed(84)[0]).toBe('figure-7.judgement');
	});

	it('takes a rapid rise for suspected hemolysis', () => {
		const phototherapy = [treated(50, 60, 'birth-stay')];
		const from = (first: number) =>
			windowHours(
				assessed({ phototherapy, dischargeAt: at(65), bilirubin: [value(40, first), value(50, 18)] })
			);
		// 0.2 mg/dL an hour suggests hemolysis (key action statements), 0.19 does not.
		expect(from(16)).toEqual([66, 72, 'serum']);
		expect(from(16.1)).toEqual([72, 84, 'serum']);
	});

	it('says that a course is missing where only its risk factor is listed', () => {
		const jaundiceRisks = ['phototherapy-before-discharge' as const];
		expect(codes(assessed({ jaundiceRisks, bilirubin: [value(48, 9)] }))).toContain(
			'phototherapy-course-missing'
		);
		const phototherapy = [treated(20, 30, 'birth-stay')];
		expect(codes(assessed({ jaundiceRisks, phototherapy, bilirubin: [value(48, 9)] }))).not.toContain(
			'phototherapy-course-missing'
		);
	});

	it('stays in treatment while it runs, and admits the option to stop 2 mg/dL below the starting line', () => {
		const phototherapy = [{ from: at(48), setting: 'birth-stay' }] as const;
		const found = (total: number) =>
			assessed({ phototherapy, dischargeAt: at(90), bilirubin: [value(60, total)] });
		expect(found(15).disposition).toBe('phototherapy');
		expect(codes(found(15.0))).toContain('may-stop-phototherapy');
		expect(codes(found(15.1))).not.toContain('may-stop-phototherapy');
	});

	it('asks for serum every day at home', () => {
		const phototherapy = [{ from: at(70), setting: 'home' }] as const;
		const result = assessed({ phototherapy, bilirubin: [value(80, 17)] });
		expect(result.disposition).toBe('phototherapy');
		expect(windowHours(result)).toEqual([80, 104, 'serum']);
	});

	// Facts 2.5, one public copy: admit from 1 mg/dL over the line, or when serum rises and the gap narrows.
	it.each([
		['0.9 over the line (21.4), stays', [value(90, 22.3)], false],
		['1.0 over the line, is admitted', [value(90, 22.4)], true],
		['rising while the gap narrows, is admitted', [value(80, 17), value(90, 18.5)], true],
		['rising while the gap widens, stays', [value(72, 17), value(90, 17.5)], false],
		['falling, stays', [value(80, 18), value(90, 17.9)], false],
		['over before it began, stays', [value(68, 20.6), value(90, 17)], false]
	])('at home, %s', (_name, bilirubin, isAdmitted) => {
		const phototherapy = [{ from: at(70), setting: 'home' }] as const;
		const result = assessed({ phototherapy, bilirubin });
		expect(result.disposition).toBe('phototherapy');
		expect(codes(result).includes('admit-from-home')).toBe(isAdmitted);
		expect(result.window === null).toBe(isAdmitted);
	});

	it('asks for serum now when the day at home is over and only skin values came', () => {
		const phototherapy = [{ from: at(70), setting: 'home' }] as const;
		const found = (hours: number) =>
			assessed({ phototherapy, bilirubin: [value(80, 17), value(hours, 15, 'transcutaneous')] });
		expect(windowHours(found(104))).toEqual([80, 104, 'serum']);
		expect(found(104.1)).toMatchObject({ disposition: 'confirm-serum', window: null });
	});

	it('offers no stop against a skin value at a line of emergency, and asks for serum', () => {
		const phototherapy = [{ from: at(70), setting: 'birth-stay' }] as const;
		const found = (skin: number) =>
			assessed({
				phototherapy,
				dischargeAt: at(120),
				bilirubin: [value(80, 17), value(95, skin, 'transcutaneous')]
			});
		expect(codes(found(8))).toContain('may-stop-phototherapy');
		expect(codes(found(8))).not.toContain('transcutaneous-very-high');
		expect(codes(found(27))).toContain('transcutaneous-very-high');
		expect(codes(found(27))).not.toContain('may-stop-phototherapy');
		expect(found(27).trace.some(({ rule }) => rule === 'confirm.not-trusted')).toBe(true);
	});

	it('treats again when the line is reached after the end, or was still reached at the end', () => {
		const phototherapy = [treated(48, 60, 'birth-stay')];
		expect(assessed({ phototherapy, bilirubin: [value(66, 19.2)] }).disposition).toBe('phototherapy');
		expect(assessed({ phototherapy, bilirubin: [value(59, 18.5)] }).disposition).toBe('phototherapy');
		expect(assessed({ phototherapy, bilirubin: [value(48, 18.5)] }).disposition).toBe('follow-up');
	});
});

describe('NICE CG98', () => {
	const nice = (changes: Partial<AssessmentInput>) => assessed({ standard: 'nice-cg98', ...changes });
	const umol = (hours: number, total: number, method: 'serum' | 'transcutaneous' = 'serum') =>
		value(hours, total, method, 'umol/L');

	it.each([
		[250, 'follow-up'],
		[250.1, 'phototherapy'],
		[450, 'phototherapy'],
		[450.1, 'exchange']
	])(
		'compares by "over": %f µmol/L at 48 hours and 40 weeks (line 250, exchange 450) is %s',
		(total, disposition) => {
			expect(nice({ bilirubin: [umol(48, total)] }).disposition).toBe(disposition);
		}
	);

	it('repeats within 24 hours, 18 with a risk factor, and not beyond 50 below the line', () => {
		expect(windowHours(nice({ bilirubin: [umol(48, 200)] }))).toEqual([48, 72, 'serum-or-transcutaneous']);
		expect(windowHours(nice({ bilirubin: [umol(48, 200)], feeding: 'breast' }))).toEqual([
			48,
			66,
			'serum-or-transcutaneous'
		]);
		expect(nice({ bilirubin: [umol(48, 199.9)] }).disposition).toBe('judgement');
	});

	it('uses serum alone up to 24 hours, below 35 weeks, over 250, and from the line on', () => {
		const one = (hours: number, total: number, weeks = 40) =>
			nice({ gestationalAge: { weeks, days: 0 }, bilirubin: [umol(hours, total, 'transcutaneous')] });
		expect(one(24, 60).disposition).toBe('confirm-serum');
		expect(one(24.01, 60).measurements[0]?.trusted).toBe(true);
		expect(one(60, 60, 34).measurements[0]?.trusted).toBe(false);
		expect(one(60, 60, 35).measurements[0]?.trusted).toBe(true);
		expect(one(90, 250).disposition).not.toBe('confirm-serum');
		expect(one(90, 251).disposition).toBe('confirm-serum');
		expect(one(48, 250).disposition).toBe('confirm-serum');
		const later = nice({ bilirubin: [umol(48, 250), umol(60, 200, 'transcutaneous')] });
		expect(later.measurements[1]?.trusted).toBe(false);
	});

	it('repeats every 6 hours in the first 24 hours until below the line and steady or falling', () => {
		expect(windowHours(nice({ bilirubin: [umol(20, 100)] }))).toEqual([20, 26, 'serum']);
		expect(windowHours(nice({ bilirubin: [umol(14, 90), umol(20, 100)] }))).toEqual([20, 26, 'serum']);
		expect(nice({ bilirubin: [umol(14, 100), umol(20, 100)] }).disposition).toBe('judgement');
	});

	it('looks for rebound 12 to 18 hours after phototherapy', () => {
		const phototherapy = [{ from: at(40), to: at(60), setting: 'birth-stay' }] as const;
		expect(windowHours(nice({ phototherapy, bilirubin: [umol(59, 150)] }))).toEqual([72, 78, 'serum']);
		expect(windowHours(nice({ phototherapy, bilirubin: [umol(71.9, 150)] }))).toEqual([72, 78, 'serum']);
		expect(nice({ phototherapy, bilirubin: [umol(72, 150)] }).disposition).toBe('judgement');
	});
});

describe('what must not pass silently', () => {
	it.each<[string, Partial<AssessmentInput>]>([
		['gestational-age-out-of-range', { gestationalAge: { weeks: 34, days: 6 } }],
		['gestational-age-out-of-range', { standard: 'nice-cg98', gestationalAge: { weeks: 22, days: 6 } }],
		['gestational-age-implausible', { gestationalAge: { weeks: 45, days: 0 } }],
		['gestational-age-unreadable', { gestationalAge: { weeks: 38, days: 7 } }],
		['age-out-of-range', { bilirubin: [value(0.99, 5)] }],
		['age-out-of-range', { bilirubin: [value(336.01, 5)] }],
		['age-out-of-range', { standard: 'nice-cg98', bilirubin: [value(672.1, 90, 'serum', 'umol/L')] }],
		['total-implausible', { bilirubin: [value(30, 0)] }],
		['total-implausible', { bilirubin: [value(30, -3)] }],
		['total-implausible', { bilirubin: [value(30, 205)] }],
		['total-implausible', { bilirubin: [value(30, NaN)] }],
		['birth-in-the-future', { now: at(-1) }],
		['measurement-in-the-future', { now: at(29), bilirubin: [value(30, 5)] }],
		['measurement-before-birth', { bilirubin: [value(-0.01, 5)] }],
		['mixed-units', { bilirubin: [value(30, 5), value(40, 120, 'serum', 'umol/L')] }],
		['direct-above-total', { bilirubin: [{ ...value(30, 5), direct: 5.1 }] }],
		['direct-implausible', { bilirubin: [{ ...value(30, 5), direct: -0.1 }] }],
		['two-values-at-one-instant', { bilirubin: [value(30, 5), value(30, 6)] }],
		['discharge-before-birth', { dischargeAt: at(-1) }],
		['instant-unreadable', { bornAt: new Date(NaN) }],
		['albumin-implausible', { albuminGramsPerDecilitre: 30 }],
		['phototherapy-ends-before-it-begins', { phototherapy: [{ from: at(30), to: at(30), setting: 'home' }] }],
		['phototherapy-before-birth', { phototherapy: [{ from: at(-1), to: at(30), setting: 'home' }] }],
		['phototherapy-setting', { phototherapy: [{ from: at(61), to: at(70), setting: 'birth-stay' }] }],
		[
			'phototherapy-overlaps',
			{
				phototherapy: [
					{ from: at(30), setting: 'birth-stay' },
					{ from: at(40), to: at(50), setting: 'birth-stay' }
				]
			}
		]
	])('refuses %s', (code, changes) => {
		expect(refusedFor(changes)).toContain(code);
		const result = assess(newborn(changes));
		if (!result.ok) for (const { message } of result.error) expect(message.length).toBeGreaterThan(20);
	});

	it.each<[string, Partial<AssessmentInput>]>([
		['35+0 weeks', { gestationalAge: { weeks: 35, days: 0 } }],
		['23+0 weeks by NICE', { standard: 'nice-cg98', gestationalAge: { weeks: 23, days: 0 } }],
		['1 hour', { bilirubin: [value(1, 5)] }],
		['336 hours', { bilirubin: [value(336, 5)] }],
		[
			'serum and transcutaneous a minute apart',
			{ bilirubin: [value(30, 5), value(30 + 1 / 60, 5, 'transcutaneous')] }
		],
		['the least total', { bilirubin: [value(30, 0.1)] }],
		['direct equal to total', { bilirubin: [{ ...value(30, 5), direct: 5 }] }],
		[
			'two courses that touch',
			{
				phototherapy: [
					{ from: at(20), to: at(30), setting: 'birth-stay' },
					{ from: at(30), setting: 'birth-stay' }
				]
			}
		]
	])('takes %s', (_name, changes) => {
		expect(assess(newborn(changes)).ok).toBe(true);
	});

	it('refuses a curve outside the printed hours instead of cutting it', () => {
		const curve = (fromHour: number, untilHour: number) =>
			thresholdCurve({
				standard: 'aap-2022',
				gestationalAge: { weeks: 38, days: 0 },
				neurotoxicityRisks: [],
				fromHour,
				untilHour,
				stepHours: 1
			});
		expect(curve(0, 48).ok).toBe(false);
		expect(curve(1, 337).ok).toBe(false);
		const whole = curve(1, 336);
		expect(whole.ok && whole.value).toHaveLength(336);
	});
});
