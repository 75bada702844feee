import { describe, expect, it, vi } from 'vitest';
import {
	assess,
	directFraction,
	nextProlongedJaundiceCheckAt,
	prolongedJaundiceChecks,
	type AssessmentInput,
	type DirectFractionFinding,
	type Feeding
} from '../../src/lib/domain/guideline/index';
import { at, newborn, value } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

const DAY = 24;

describe('the ages at which lasting jaundice is asked about', () => {
	// FACTS 2.7: formula 2 weeks, breast 3 to 4 weeks (looked at at 2); mixed as the earlier, and again as breast.
	it.each<[Feeding, number[]]>([
		['formula', [14]],
		['mixed', [14, 21]],
		['breast', [14, 21]]
	])('by AAP 2022, %s-fed: %j days', (feeding, days) => {
		for (const weeks of [35, 36, 37, 41]) {
			const checks = prolongedJaundiceChecks(newborn({ feeding, gestationalAge: { weeks, days: 6 } }));
			expect(checks.map(({ ageDays }) => ageDays)).toEqual(days);
			expect(checks.map((one) => one.at)).toEqual(days.map((day) => at(day * DAY)));
			for (const { says, source } of checks) {
				expect(says.length).toBeGreaterThan(20);
				expect(source.length).toBeGreaterThan(5);
			}
		}
	});

	it('says what is asked: a look at 2 weeks of the breastfed, a measurement of every other', () => {
		const says = (feeding: Feeding) => prolongedJaundiceChecks(newborn({ feeding })).map((one) => one.says);
		expect(says('breast')[0]).toContain('may wait to 3 weeks');
		expect(says('breast')[1]).toContain('3 to 4 weeks: measure total and direct');
		expect(says('mixed')[0]).toContain('2 weeks: measure total and direct');
		expect(says('formula')[0]).toContain('2 weeks: measure total and direct');
	});

	// FACTS 4: over 14 days at 37 weeks or more, over 21 days under 37.
	it.each([
		[36, 6, 21],
		[37, 0, 14],
		[40, 0, 14],
		[23, 0, 21]
	])('by NICE CG98 at %i+%i: %i days, however fed', (weeks, days, ageDays) => {
		for (const feeding of ['breast', 'formula', 'mixed'] as const) {
			const asked = newborn({ standard: 'nice-cg98', feeding, gestationalAge: { weeks, days } });
			expect(prolongedJaundiceChecks(asked).map((one) => one.ageDays)).toEqual([ageDays]);
		}
	});

	it('names the next one strictly after an instant, and none after the last', () => {
		const breast = newborn({ feeding: 'breast' });
		expect(nextProlongedJaundiceCheckAt(breast, at(0))).toEqual(at(14 * DAY));
		expect(nextProlongedJaundiceCheckAt(breast, at(14 * DAY - 0.01))).toEqual(at(14 * DAY));
		expect(nextProlongedJaundiceCheckAt(breast, at(14 * DAY))).toEqual(at(21 * DAY));
		expect(nextProlongedJaundiceCheckAt(breast, at(21 * DAY))).toBeNull();
	});
});

type Status = DirectFractionFinding['status'];
const withDirect = (hours: number, direct: number, total = 8) => ({ ...value(hours, total), direct });

describe('the liver question', () => {
	it.each<[string, Status, Partial<AssessmentInput>]>([
		['nothing known, no instant of asking', 'not-due', {}],
		['before 14 days', 'not-due', { now: at(14 * DAY - 0.01) }],
		['at 14 days', 'due', { now: at(14 * DAY) }],
		['before a week late', 'due', { now: at(21 * DAY - 0.01) }],
		['a week late', 'overdue', { now: at(21 * DAY) }],
		['breastfed before 21 days', 'not-due', { feeding: 'breast', now: at(21 * DAY - 0.01) }],
		['breastfed at 21 days', 'due', { feeding: 'breast', now: at(21 * DAY) }],
		['breastfed before 28 days', 'due', { feeding: 'breast', now: at(28 * DAY - 0.01) }],
		['breastfed at 28 days', 'overdue', { feeding: 'breast', now: at(28 * DAY) }],
		['mixed before 14 days', 'not-due', { feeding: 'mixed', now: at(14 * DAY - 0.01) }],
		['mixed at 14 days', 'due', { feeding: 'mixed', now: at(14 * DAY) }],
		['mixed at 21 days', 'overdue', { feeding: 'mixed', now: at(21 * DAY) }],
		['direct 0.9 mg/dL', 'not-due', { bilirubin: [withDirect(48, 0.9)] }],
		['direct 1.0 mg/dL', 'raised', { bilirubin: [withDirect(48, 1)] }],
		['raised at any age', 'raised', { now: at(2 * DAY), bilirubin: [withDirect(48, 1)] }],
		['raised once, however later', 'raised', { bilirubin: [withDirect(48, 1.2), withDirect(60, 0.3)] }],
		[
			'measured before the age for it',
			'due',
			{ now: at(15 * DAY), bilirubin: [withDirect(14 * DAY - 0.01, 0.4)] }
		],
		['measured at the age for it', 'normal', { now: at(15 * DAY), bilirubin: [withDirect(14 * DAY, 0.4)] }],
		['measured without a direct part', 'due', { now: at(15 * DAY), bilirubin: [value(14 * DAY, 8)] }],
		['measured in time, no instant of asking', 'normal', { bilirubin: [withDirect(14 * DAY, 0.4)] }],
		['measured at 14 days and raised', 'raised', { now: at(15 * DAY), bilirubin: [withDirect(14 * DAY, 1)] }],
		[
			'a later one without a direct part does not undo it',
			'normal',
			{ now: at(30 * DAY), bilirubin: [withDirect(14 * DAY, 0.4), value(15 * DAY, 7)] }
		]
	])('AAP 2022, %s: %s', (_name, status, changes) => {
		expect(directFraction(newborn(changes)).status).toBe(status);
	});

	it.each<[string, Status, Partial<AssessmentInput>]>([
		[
			'conjugated 25 µmol/L',
			'not-due',
			{ bilirubin: [{ ...value(48, 120, 'serum', 'umol/L'), direct: 25 }] }
		],
		[
			'conjugated 25.1 µmol/L',
			'raised',
			{ bilirubin: [{ ...value(48, 120, 'serum', 'umol/L'), direct: 25.1 }] }
		],
		['37 weeks at 14 days', 'due', { gestationalAge: { weeks: 37, days: 0 }, now: at(14 * DAY) }],
		[
			'36 weeks before 21 days',
			'not-due',
			{ gestationalAge: { weeks: 36, days: 6 }, now: at(21 * DAY - 0.01) }
		],
		['36 weeks at 21 days', 'due', { gestationalAge: { weeks: 36, days: 6 }, now: at(21 * DAY) }],
		['breastfed at 14 days', 'due', { feeding: 'breast', now: at(14 * DAY) }]
	])('NICE CG98, %s: %s', (_name, status, changes) => {
		expect(directFraction(newborn({ standard: 'nice-cg98', ...changes })).status).toBe(status);
	});

	it('takes a direct part in the other unit: 17.1 µmol/L is 1.0 mg/dL', () => {
		const found = (direct: number): Status =>
			directFraction(newborn({ bilirubin: [{ ...value(48, 120, 'serum', 'umol/L'), direct }] })).status;
		expect(found(17.1)).toBe('raised');
		expect(found(17)).toBe('not-due');
	});

	it('does not touch what the total asks for', () => {
		const of = (bilirubin: AssessmentInput['bilirubin']) => {
			const result = assess(newborn({ bilirubin }));
			return result.ok ? [result.value.disposition, result.value.window, result.value.difference] : null;
		};
		expect(of([withDirect(48, 6, 12)])).toEqual(of([value(48, 12)]));
	});
});
