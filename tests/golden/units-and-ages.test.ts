import { UcumLhcUtils } from '@lhncbc/ucum-lhc';
import * as fc from 'fast-check';
import { DateTime } from 'luxon';
import { describe, expect, it, vi } from 'vitest';
import {
	ageHours,
	assess,
	convert,
	formatBilirubin,
	formatGestationalAge,
	parseGestationalAge,
	type BilirubinUnit
} from '../../src/lib/domain/guideline/index';
import { parseInstant } from '../../src/lib/schemas/instant';
import { newborn } from './newborn';

vi.setConfig({ testTimeout: 60_000 });

/** Bilirubin C33H36N4O6, PubChem CID 5280352: 584.7 g/mol. */
const GRAMS_PER_MOLE = 584.66;
const UCUM: Readonly<Record<BilirubinUnit, string>> = { 'mg/dL': 'mg/dL', 'umol/L': 'umol/L' };

function byUcum(value: number, from: BilirubinUnit, to: BilirubinUnit): number {
	const found = UcumLhcUtils.getInstance().convertUnitTo(UCUM[from], value, UCUM[to], {
		molecularWeight: GRAMS_PER_MOLE
	});
	if (found.status !== 'succeeded' || found.toVal === null) throw new Error(String(found.msg));
	return found.toVal;
}

describe('units', () => {
	it('agree with UCUM and bilirubin’s molar mass to within 0.05 %, the rounding of 17.1', () => {
		for (let tenths = 1; tenths <= 400; tenths++) {
			const milligrams = tenths / 10;
			const micromoles = convert({ value: milligrams, unit: 'mg/dL' }, 'umol/L').value;
			expect(Math.abs(micromoles / byUcum(milligrams, 'mg/dL', 'umol/L') - 1)).toBeLessThan(0.0005);
			const back = convert({ value: micromoles, unit: 'umol/L' }, 'mg/dL').value;
			expect(back).toBeCloseTo(milligrams, 9);
			expect(Math.abs(back / byUcum(micromoles, 'umol/L', 'mg/dL') - 1)).toBeLessThan(0.0005);
		}
	});

	it('never change a value that is already in the unit', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 0.1, max: 60, noNaN: true }),
				fc.constantFrom<BilirubinUnit>('mg/dL', 'umol/L'),
				(value, unit) => {
					expect(convert({ value, unit }, unit)).toEqual({ value, unit });
				}
			)
		);
	});

	it('are shown with one decimal in mg/dL and whole in µmol/L', () => {
		expect(formatBilirubin({ value: 12.34, unit: 'mg/dL' })).toBe('12.3 mg/dL');
		expect(formatBilirubin({ value: 1234.4, unit: 'umol/L' })).toBe('1234 µmol/L');
		expect(formatBilirubin({ value: 12.3, unit: 'mg/dL' }, 'es')).toBe('12,3 mg/dL');
	});
});

const ZONES = [
	'America/New_York',
	'Europe/London',
	'Europe/Berlin',
	'Australia/Lord_Howe',
	'Asia/Kolkata',
	'America/Sao_Paulo',
	'America/St_Johns',
	'UTC'
];

/** Every instant of three years at which the clocks of a zone change. */
const CHANGES: readonly { readonly zone: string; readonly ms: number }[] = ZONES.flatMap((zone) => {
	const hours = Array.from({ length: 3 * 366 * 24 }, (_, i) => Date.UTC(2024, 0, 1) + i * 3_600_000);
	const offset = (ms: number): number => DateTime.fromMillis(ms, { zone }).offset;
	return hours.filter((ms) => offset(ms) !== offset(ms - 3_600_000)).map((ms) => ({ zone, ms }));
});

/** An instant as a clock on the wall and its offset say it, with seconds or without. */
interface Wall {
	readonly zone: string;
	readonly ms: number;
	readonly hasSeconds: boolean;
}

function wallClock({ zone, ms, hasSeconds }: Wall): string {
	const format = hasSeconds ? "yyyy-MM-dd'T'HH:mm:ssZZ" : "yyyy-MM-dd'T'HH:mmZZ";
	return DateTime.fromMillis(ms, { zone }).toFormat(format);
}

describe('age in hours', () => {
	it('is that of the instants, however a wall clock wrote them down, across every clock change', () => {
		expect(new Set(CHANGES.map(({ zone }) => zone)).size).toBe(5);
		const minutes = (from: number, until: number) =>
			fc.integer({ min: from, max: until }).map((one) => one * 60_000);
		const births = fc.record({
			change: fc.constantFrom(...CHANGES),
			before: minutes(0, 300),
			age: fc.oneof(minutes(0, 600), minutes(0, 336 * 60)),
			hasSeconds: fc.boolean()
		});
		let across = 0;
		fc.assert(
			fc.property(births, ({ change: { zone, ms }, before, age, hasSeconds }) => {
				const born = wallClock({ zone, ms: ms - before, hasSeconds });
				const later = wallClock({ zone, ms: ms - before + age, hasSeconds });
				const found = ageHours(new Date(parseInstant(born)), new Date(parseInstant(later)));
				expect(found).toBeCloseTo(age / 3_600_000, 9);
				const byLibrary = DateTime.fromISO(later, { setZone: true }).diff(
					DateTime.fromISO(born, { setZone: true })
				);
				expect(found).toBeCloseTo(byLibrary.as('hours'), 9);
				if (born.slice(-6) === later.slice(-6)) return;
				across++;
				// The clocks on the wall differ from the age by the hour, or half hour, that they were moved.
				const onTheWall =
					(Date.parse(`${later.slice(0, 16)}Z`) - Date.parse(`${born.slice(0, 16)}Z`)) / 3_600_000;
				expect(Math.abs(onTheWall - found)).toBeGreaterThan(0.4);
			}),
			{ numRuns: 2000 }
		);
		expect(across).toBeGreaterThan(400);
	});

	it.each([
		['spring, an hour is lost', '2026-03-08T00:30', '2026-03-09T00:30', 23],
		['autumn, an hour is lived twice', '2026-11-01T00:30', '2026-11-02T00:30', 25],
		['no change', '2026-06-01T00:30', '2026-06-02T00:30', 24]
	])('across %s', (_name, born, later, hours) => {
		const instant = (text: string): Date => DateTime.fromISO(text, { zone: 'America/New_York' }).toJSDate();
		expect(ageHours(instant(born), instant(later))).toBe(hours);
		const result = assess(
			newborn({
				bornAt: instant(born),
				dischargeAt: instant(later),
				bilirubin: [{ at: instant(later), method: 'serum', total: 5, unit: 'mg/dL' }]
			})
		);
		expect(result.ok && result.value.ageHours).toBe(hours);
	});
});

describe('gestational age', () => {
	it('round-trips for every week and day', () => {
		for (let weeks = 22; weeks <= 44; weeks++) {
			for (let days = 0; days <= 6; days++) {
				const read = parseGestationalAge(`${weeks}+${days}`);
				expect(read).toEqual({ ok: true, value: { weeks, days } });
				expect(formatGestationalAge({ weeks, days })).toBe(`${weeks}+${days}`);
			}
		}
	});

	it.each(['38', '38+7', '38.4', '8+1', '138+1', ' 38+1', '38+1 ', ''])('refuses %j', (text) => {
		expect(parseGestationalAge(text).ok).toBe(false);
	});

	it('counts completed weeks: 38+6 stands on the lines of 38', () => {
		const lines = (days: number) => {
			const result = assess(
				newborn({
					gestationalAge: { weeks: 38, days },
					bilirubin: [{ at: new Date('2026-03-03T00:00:00Z'), method: 'serum', total: 5, unit: 'mg/dL' }]
				})
			);
			return result.ok ? result.value.thresholds : null;
		};
		expect(lines(6)).toEqual(lines(0));
	});
});
