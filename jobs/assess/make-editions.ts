/**
 * Makes the compact tables the engine loads from the CSV files beside them.
 * Run `npx tsx jobs/assess/make-editions.ts` after a CSV changed; a test compares every cell with the CSV.
 */
import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const FOLDER = join(dirname(fileURLToPath(import.meta.url)), '../../src/lib/domain/guideline/editions');

function rowsOf(csv: string): string[][] {
	return csv
		.trim()
		.split('\n')
		.slice(1)
		.map((line) => line.split(','));
}

const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');

/** First value in tenths of mg/dL, then one digit an hour: by how many tenths the line rises. */
export function encodeHourly(tenths: readonly number[]): string {
	let text = `${tenths[0] ?? ''}:`;
	for (let i = 1; i < tenths.length; i++) {
		const step = (tenths[i] ?? NaN) - (tenths[i - 1] ?? NaN);
		if (!(step >= 0 && step <= 9)) throw new Error(`step ${step} at position ${i} does not fit one digit`);
		text += step;
	}
	return text;
}

export function aapTable(csv: string): string {
	const curves = new Map<string, number[]>();
	for (const [table, risk, weeks, hour, value] of rowsOf(csv)) {
		const name = `${table} ${risk} ${weeks}`;
		const curve = curves.get(name) ?? [];
		if (Number(hour) !== curve.length + 1) throw new Error(`${name}: hour ${hour} out of order`);
		curve.push(Math.round(Number(value) * 10));
		curves.set(name, curve);
	}
	const lines = [...curves].map(([name, tenths]) => `\t\t'${name}': '${encodeHourly(tenths)}'`);
	return file('aap-2022', 'AAP_2022_TABLE', [
		`\tsha256: '${sha256(csv)}'`,
		'\tfirstHour: 1',
		'\tlastHour: 336',
		`\tcurves: {\n${lines.join(',\n')}\n\t}`
	]);
}

export function niceTable(csv: string): string {
	const curves = new Map<string, string[]>();
	for (const [table, weeks, hour, value] of rowsOf(csv)) {
		const name = `${table} ${weeks}`;
		curves.set(name, [...(curves.get(name) ?? []), `${hour}:${value}`]);
	}
	const lines = [...curves].map(([name, points]) => `\t\t'${name}': '${points.join(' ')}'`);
	return file('nice-cg98', 'NICE_CG98_TABLE', [
		`\tsha256: '${sha256(csv)}'`,
		`\tcurves: {\n${lines.join(',\n')}\n\t}`
	]);
}

function file(name: string, constant: string, fields: readonly string[]): string {
	return `// Made from ${name}.csv by jobs/assess/make-editions.ts. Do not edit by hand.\nexport const ${constant} = {\n${fields.join(',\n')}\n} as const;\n`;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	for (const [name, make] of [
		['aap-2022', aapTable],
		['nice-cg98', niceTable]
	] as const) {
		const csv = readFileSync(join(FOLDER, `${name}.csv`), 'utf8');
		writeFileSync(join(FOLDER, `${name}-table.ts`), make(csv));
	}
}
