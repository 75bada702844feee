import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it, vi } from 'vitest';
import { aapTable, niceTable } from '../../jobs/assess/make-editions';
import { AAP_2022_TABLE } from '../../src/lib/domain/guideline/editions/aap-2022-table';
import { NICE_CG98_TABLE } from '../../src/lib/domain/guideline/editions/nice-cg98-table';
import { thresholdCurve, thresholdsAt, type StandardId } from '../../src/lib/domain/guideline/index';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

const csvOf = (name: string): string =>
	readFileSync(
		fileURLToPath(new URL(`../../src/lib/domain/guideline/editions/${name}.csv`, import.meta.url)),
		'utf8'
	);
const rowsOf = (csv: string): string[][] =>
	csv
		.trim()
		.split('\n')
		.slice(1)
		.map((line) => line.split(','));
const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');
const withoutSpace = (text: string): string => text.replaceAll(/\s/g, '');
const sourceOf = (name: string): string =>
	readFileSync(
		fileURLToPath(new URL(`../../src/lib/domain/guideline/editions/${name}-table.ts`, import.meta.url)),
		'utf8'
	);

interface Cell {
	readonly standard: StandardId;
	readonly table: string;
	readonly weeks: number;
	readonly atRisk: boolean;
	readonly hour: number;
	readonly value: number;
}

function differing(cells: readonly Cell[]): string[] {
	const wrong: string[] = [];
	for (const { standard, table, weeks, atRisk, hour, value } of cells) {
		const found = thresholdsAt(
			{ standard, gestationalAge: { weeks, days: 6 }, neurotoxicityRisks: atRisk ? ['sepsis'] : [] },
			hour
		);
		const read = found.ok ? (table === 'photo' ? found.value.phototherapy : found.value.exchange) : NaN;
		if (read !== value)
			wrong.push(`${standard} ${table} ${weeks} ${atRisk} hour ${hour}: ${read}, not ${value}`);
	}
	return wrong;
}

describe('AAP 2022 tables (Pediatrics 2022;150(3):e2022058859, public copies)', () => {
	const csv = csvOf('aap-2022');
	const rows = rowsOf(csv);

	it('has the 6,048 cells of 18 curves, all returned as they stand', () => {
		expect(rows).toHaveLength(6048);
		const cells = rows.map(([table = '', risk, weeks, hour, value]): Cell => ({
			standard: 'aap-2022',
			table,
			weeks: Number(weeks),
			atRisk: risk === 'present',
			hour: Number(hour),
			value: Number(value)
		}));
		expect(differing(cells)).toEqual([]);
	});

	it('was not edited without making the table again', () => {
		expect(sha256(csv)).toBe(AAP_2022_TABLE.sha256);
		expect(withoutSpace(aapTable(csv))).toBe(withoutSpace(sourceOf('aap-2022')));
	});

	it.each([
		[39, true, 38],
		[40, true, 38],
		[42, true, 38],
		[42, false, 40]
	])('%i weeks with a risk factor (%s) stands on the row of %i weeks', (weeks, atRisk, row) => {
		const curve = (wanted: number) =>
			thresholdCurve({
				standard: 'aap-2022',
				gestationalAge: { weeks: wanted, days: 0 },
				neurotoxicityRisks: atRisk ? ['sepsis'] : [],
				fromHour: 1,
				untilHour: 336,
				stepHours: 1
			});
		expect(curve(weeks)).toEqual(curve(row));
	});
});

describe('NICE CG98 tables (nice.org.uk/guidance/cg98, threshold table and graphs)', () => {
	const csv = csvOf('nice-cg98');
	const rows = rowsOf(csv);

	it('returns every printed point as it stands', () => {
		expect(rows).toHaveLength(94);
		const cells = rows.map(([table = '', weeks, hour, value]): Cell => ({
			standard: 'nice-cg98',
			table,
			weeks: Number(weeks),
			atRisk: false,
			hour: Number(hour),
			value: Number(value)
		}));
		expect(differing(cells)).toEqual([]);
	});

	it('was not edited without making the table again', () => {
		expect(sha256(csv)).toBe(NICE_CG98_TABLE.sha256);
		expect(withoutSpace(niceTable(csv))).toBe(withoutSpace(sourceOf('nice-cg98')));
	});

	it('draws straight lines below 38 weeks: weeks x 10 - 100 and weeks x 10 at 72 hours, flat after', () => {
		const cells: Cell[] = [];
		for (let weeks = 23; weeks < 38; weeks++) {
			for (const hour of [72, 100, 400, 672]) {
				cells.push({
					standard: 'nice-cg98',
					table: 'photo',
					weeks,
					atRisk: false,
					hour,
					value: weeks * 10 - 100
				});
				cells.push({
					standard: 'nice-cg98',
					table: 'exchange',
					weeks,
					atRisk: false,
					hour,
					value: weeks * 10
				});
			}
			const middle = Math.round(((40 + weeks * 10 - 100) / 2) * 10) / 10;
			cells.push({ standard: 'nice-cg98', table: 'photo', weeks, atRisk: false, hour: 36, value: middle });
		}
		expect(differing(cells)).toEqual([]);
	});
});
