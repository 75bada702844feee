import { describe, expect, it } from 'vitest';
import {
	STANDARDS,
	assess,
	assessAtAnyAge,
	prolongedJaundiceChecks,
	type AssessmentInput,
	type StandardId
} from '../../src/lib/domain/guideline/index';
import { EARLIEST_CHECK_MS } from '../../src/lib/domain/guideline/liver';
import { at, BORN_AT, codes, newborn, value } from './newborn';

const DAY = 24;

function judged(changes: Partial<AssessmentInput>) {
	const result = assessAtAnyAge(newborn(changes));
	if (!result.ok) throw new Error(JSON.stringify(result.error));
	return result.value;
}

const refusals = (changes: Partial<AssessmentInput>): string[] => {
	const result = assessAtAnyAge(newborn(changes));
	return result.ok ? [] : result.error.map(({ code }) => code);
};

describe('a record that goes on past the published hours', () => {
	it('is assessed as ever while all values lie within them', () => {
		const input = newborn({ bilirubin: [value(48, 13)] });
		expect(assessAtAnyAge(input)).toEqual(assess(input));
	});

	// AAP 2022 prints lines to 336 hours; NICE CG98 covers newborns under 28 days.
	it.each<[StandardId, number, 'mg/dL' | 'umol/L', number]>([
		['aap-2022', 336, 'mg/dL', 9],
		['nice-cg98', 28 * DAY, 'umol/L', 150]
	])(
		'leaves %s from hour %i on to judgement, and the trace ends with it',
		(standard, lastHour, unit, total) => {
			const bilirubin = [value(48, total, 'serum', unit), value(lastHour + 1, total, 'serum', unit)];
			const result = judged({ standard, bilirubin, now: at(lastHour + 2) });
			expect(result).toMatchObject({
				disposition: 'judgement',
				window: null,
				difference: null,
				thresholds: null
			});
			expect(result.measurements).toHaveLength(1);
			expect(codes(result)).toContain('past-the-lines');
			expect(codes(result)).not.toContain('past-the-lines-high');
			expect(codes(result)).not.toContain('extra-look-in-48-hours');
			expect(result.trace.at(-1)).toMatchObject({ rule: 'past-the-lines', output: 'judgement, no window' });
			expect(result.trace.filter(({ rule }) => rule.startsWith('figure-7'))).toEqual([]);
		}
	);

	it('calls for a clinician at once when the value would reach the last published line', () => {
		// 40 weeks, no risk factor: 21.8 mg/dL at hour 336.
		expect(codes(judged({ bilirubin: [value(340, 21.7)] }))).not.toContain('past-the-lines-high');
		expect(codes(judged({ bilirubin: [value(340, 21.8)] }))).toContain('past-the-lines-high');
	});

	it.each([
		[3, 'raised', ['direct-raised']],
		[5, 'raised', ['direct-raised', 'direct-over-half']],
		[0.2, 'normal', []]
	] as const)('asks the liver question of a direct part of %f at day 15: %s', (direct, status, wanted) => {
		const bilirubin = [{ ...value(15 * DAY, 9), direct }];
		const result = judged({ bilirubin, now: at(15 * DAY + 1) });
		expect(result.directFraction.status).toBe(status);
		expect(result.trace.some(({ output }) => output.startsWith(`liver question: ${status}`))).toBe(true);
		expect(codes(result).filter((code) => code.startsWith('direct-'))).toEqual(wanted);
		expect(codes(result)).not.toContain('prolonged-due');
	});

	it.each<[string, Partial<AssessmentInput>]>([
		['total-implausible', { bilirubin: [value(340, -5)] }],
		['total-implausible', { bilirubin: [value(340, 900)] }],
		['instant-unreadable', { bilirubin: [{ ...value(340, 9), at: new Date(NaN) }] }],
		['measurement-in-the-future', { bilirubin: [value(340, 9)], now: at(339) }],
		['direct-above-total', { bilirubin: [{ ...value(340, 5), direct: 9 }] }],
		['two-values-at-one-instant', { bilirubin: [value(340, 5), value(340, 6)] }],
		['mixed-units', { bilirubin: [value(48, 9), value(340, 90, 'serum', 'umol/L')] }]
	])('still refuses %s', (code, changes) => {
		expect(refusals(changes)).toContain(code);
	});
});

it('no standard asks for prolonged jaundice before the age from which the liver question is looked up', () => {
	for (const { id: standard } of STANDARDS) {
		for (const feeding of ['breast', 'formula', 'mixed'] as const) {
			for (const weeks of [23, 36, 37, 40]) {
				const asked = { standard, feeding, gestationalAge: { weeks, days: 0 }, bornAt: BORN_AT };
				for (const { ageDays } of prolongedJaundiceChecks(asked))
					expect(ageDays * 24 * 3_600_000).toBeGreaterThanOrEqual(EARLIEST_CHECK_MS);
			}
		}
	}
});

describe('the question of prolonged jaundice without an instant of asking', () => {
	const statusAt = (hours: number, changes: Partial<AssessmentInput>, total = 150) => {
		const unit = changes.standard === 'nice-cg98' ? 'umol/L' : 'mg/dL';
		return judged({ bilirubin: [value(hours, unit === 'mg/dL' ? 9 : total, 'serum', unit)], ...changes })
			.directFraction.status;
	};

	// AAP: formula-fed at 2 weeks, breastfed at 3, mixed as formula, the earlier date. NICE: 14 days, 21 before 37 weeks.
	it.each<[string, Partial<AssessmentInput>, number]>([
		['formula', { feeding: 'formula' }, 14],
		['mixed', { feeding: 'mixed' }, 14],
		['breast', { feeding: 'breast' }, 21],
		['NICE at 37 weeks', { standard: 'nice-cg98', gestationalAge: { weeks: 37, days: 0 } }, 14],
		['NICE at 36 weeks', { standard: 'nice-cg98', gestationalAge: { weeks: 36, days: 6 } }, 21]
	])('is asked as of the latest value: %s', (_name, changes, days) => {
		expect(statusAt(days * DAY - 0.1, changes)).toBe('not-due');
		expect(statusAt(days * DAY, changes)).toBe('due');
		expect(statusAt((days + 7) * DAY - 0.1, changes)).toBe('due');
		expect(statusAt((days + 7) * DAY, changes)).toBe('overdue');
	});
});
