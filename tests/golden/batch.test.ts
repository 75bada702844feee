import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { PassThrough, Readable } from 'node:stream';
import { text } from 'node:stream/consumers';
import { fileURLToPath } from 'node:url';
import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { assessLine, assessRaw } from '../../jobs/assess/assess-line';
import { CSV_COLUMNS } from '../../jobs/assess/csv-columns';
import { lineBatches, LONGEST_LINE_BYTES } from '../../jobs/assess/lines';
import { readRecord } from '../../jobs/assess/read-record';
import { runBatch } from '../../jobs/assess/run';
import { writeInstant } from '../../jobs/assess/write-instant';
import { invent, seeded } from '../../jobs/bench/births';
import {
	assessmentInputSchema,
	assessmentOutputSchema,
	refusedRecordSchema,
	toAssessmentInput
} from '../../src/lib/schemas/assessment';
import { assessBody } from '../../src/lib/schemas/assessment-request';
import { assessRecord } from '../../src/lib/schemas/assessment-record';
import { INSTANT, parseInstant } from '../../src/lib/schemas/instant';
import { PUBLISHED_SCHEMAS } from '../../src/lib/schemas/assessment-published';

vi.setConfig({ testTimeout: 120_000 });

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const OPTIONS = { withTrace: false, notAfter: new Date('2027-01-01T00:00:00Z') };
const births = (count: number, seed: number): Record<string, unknown>[] => {
	const random = seeded(seed);
	return Array.from({ length: count }, (_, i) => invent(random, i));
};

interface Ran {
	readonly code: number | null;
	readonly out: string;
	readonly err: string;
}

/** The command as it is run by hand, with no database, no build and no settings. */
async function run(args: readonly string[], input: string): Promise<Ran> {
	const child = spawn(process.execPath, ['--import', 'tsx', 'jobs/assess.ts', ...args], {
		cwd: ROOT,
		env: { PATH: process.env['PATH'] ?? '', TSX_TSCONFIG_PATH: 'jobs/tsconfig.json' }
	});
	child.stdin.end(input);
	const ended = new Promise<number | null>((done) => child.once('close', done));
	const [out, err] = await Promise.all([text(child.stdout), text(child.stderr)]);
	return { code: await ended, out, err };
}

describe('the fast reader and writer', () => {
	it('take every record the schema takes, to the same input', () => {
		for (const raw of births(2000, 11)) {
			const parsed = assessmentInputSchema.parse(raw);
			expect(readRecord(raw)).toEqual({ id: raw['id'], input: toAssessmentInput(parsed) });
		}
	});

	it('take nothing the schema refuses, however a record is spoiled', () => {
		const spoil = fc.constantFrom<unknown>(
			undefined,
			null,
			0,
			-1,
			'',
			'x',
			'38+7',
			[],
			{},
			['sepsis', 'x'],
			true,
			'2026-02-30T10:00:00Z',
			Infinity
		);
		const records = births(200, 12);
		const keys = [
			...CSV_COLUMNS,
			'extra',
			'bilirubin.0.at',
			'bilirubin.0.total',
			'bilirubin.0.direct',
			'bilirubin.0.unit',
			'bilirubin.0.method',
			'bilirubin.0.extra'
		];
		fc.assert(
			fc.property(fc.nat({ max: 199 }), fc.constantFrom(...keys), spoil, (i, key, bad) => {
				const raw = spoilt(structuredClone(records[i] ?? {}), key.split('.'), bad);
				const read = readRecord(raw);
				const parsed = assessmentInputSchema.safeParse(raw);
				expect(read !== null).toBe(parsed.success);
				if (read && parsed.success) expect(read.input).toEqual(toAssessmentInput(parsed.data));
			}),
			{ numRuns: 3000 }
		);
	});

	it('write letter for letter what the published form says', () => {
		for (const raw of births(2000, 13)) {
			expect(assessRaw(raw, OPTIONS).text).toBe(JSON.stringify(assessRecord(raw, OPTIONS)));
		}
		const [first] = births(1, 14);
		const traced = { ...OPTIONS, withTrace: true };
		expect(assessRaw(first, traced).text).toBe(JSON.stringify(assessRecord(first, traced)));
	});

	it('fit the published schema of results', () => {
		for (const raw of births(500, 15)) {
			const written: unknown = JSON.parse(assessRaw(raw, { ...OPTIONS, withTrace: true }).text);
			const fits =
				assessmentOutputSchema.safeParse(written).success || refusedRecordSchema.safeParse(written).success;
			expect(fits).toBe(true);
		}
	});
});

/** Sets (or, with undefined, removes) a field by path. */
function spoilt(record: Record<string, unknown>, path: readonly string[], bad: unknown): unknown {
	const [head = '', ...rest] = path;
	if (rest.length > 0) {
		const [index = '', key = ''] = rest;
		const list = record[head];
		const item: unknown = Array.isArray(list) ? list[Number(index)] : undefined;
		if (typeof item === 'object' && item !== null) {
			if (bad === undefined) Reflect.deleteProperty(item, key);
			else Reflect.set(item, key, bad);
		}
		return record;
	}
	if (bad === undefined) Reflect.deleteProperty(record, head);
	else record[head] = bad;
	return record;
}

describe('instants', () => {
	it.each([
		['2026-03-01T08:30:00+01:00', '2026-03-01T07:30:00.000Z'],
		['2026-03-01T08:30Z', '2026-03-01T08:30:00.000Z'],
		['2024-02-29T23:59:59.5-05:00', '2024-03-01T04:59:59.500Z']
	])('reads %s', (written, instant) => {
		expect(new Date(parseInstant(written)).toISOString()).toBe(instant);
	});

	it.each([
		'2026-03-01T08:30:00',
		'2026-03-01',
		'2026-02-29T08:30:00Z',
		'2026-04-31T08:30:00Z',
		'2026-03-01T24:00:00Z',
		'2026-03-01 08:30:00Z',
		'2026-13-01T08:30:00Z'
	])('refuses %s', (written) => {
		expect(parseInstant(written)).toBeNaN();
	});
});

describe('the usual form of an instant, read and written by hand', () => {
	const offset = fc
		.tuple(fc.constantFrom('+', '-'), fc.nat({ max: 14 }), fc.nat({ max: 59 }))
		.map(
			([sign, hours, minutes]) =>
				`${sign}${String(hours).padStart(2, '0')}:${String(minutes).padStart(2, '0')}`
		);
	const anyDate = fc.date({ min: new Date('0001-01-01'), max: new Date('9999-12-31'), noInvalidDate: true });

	it('is the instant that Date.parse reads', () => {
		fc.assert(
			fc.property(anyDate, offset, (date, zone) => {
				const written = `${date.toISOString().slice(0, 19)}${zone}`;
				expect(parseInstant(written)).toBe(Date.parse(written));
			}),
			{ numRuns: 5000 }
		);
	});

	it('has the days of the calendar and no others', () => {
		for (let year = 1896; year <= 2104; year++) {
			for (let month = 1; month <= 12; month++) {
				for (let day = 1; day <= 31; day++) {
					const date = [year, month, day].map((part) => String(part).padStart(2, '0')).join('-');
					const exists = new Date(Date.UTC(year, month - 1, day)).getUTCDate() === day;
					const read = parseInstant(`${date}T12:00:00+00:00`);
					if (exists) expect(read).toBe(Date.parse(`${date}T12:00:00Z`));
					else expect(read).toBeNaN();
				}
			}
		}
	});

	it('takes just what the pattern takes, however one letter is changed', () => {
		fc.assert(
			fc.property(
				anyDate,
				offset,
				fc.nat({ max: 24 }),
				fc.constantFrom(...'0123456789-+:TZ. x'),
				(date, zone, at, letter) => {
					const written = `${date.toISOString().slice(0, 19)}${zone}`;
					const changed = written.slice(0, at) + letter + written.slice(at + 1);
					if (!INSTANT.test(changed)) expect(parseInstant(changed)).toBeNaN();
					else if (Number(changed.slice(8, 10)) <= 28)
						expect(parseInstant(changed)).toBe(Date.parse(changed));
				}
			),
			{ numRuns: 5000 }
		);
	});

	it('is written as toISOString writes it', () => {
		fc.assert(
			fc.property(anyDate, (date) => {
				expect(writeInstant(date.getTime())).toBe(date.toISOString());
			}),
			{ numRuns: 5000 }
		);
	});
});

describe('lines of a stream', () => {
	it('are the same wherever the pieces are cut, also inside a letter', async () => {
		const whole = '\ufeffä\u{1F476}1\r\n\nβ2\nlast';
		const bytes = Buffer.from(whole);
		for (let cut = 1; cut < bytes.length; cut++) {
			const lines: string[] = [];
			for await (const batch of lineBatches(Readable.from([bytes.subarray(0, cut), bytes.subarray(cut)])))
				lines.push(...batch.lines);
			expect(lines).toEqual(['ä\u{1F476}1', '', 'β2', 'last']);
		}
	});

	it('wait for a slow reader of the results', async () => {
		const lines = births(3000, 16).map((one) => `${JSON.stringify(one)}\n`);
		const output = new PassThrough({ highWaterMark: 1024 });
		let most = 0;
		const silent = {
			advance: () => (most = Math.max(most, output.writableLength)),
			makeRoom: () => {},
			stop: () => {}
		};
		const done = runBatch({
			input: Readable.from(lines.map((line) => Buffer.from(line))),
			format: 'json',
			output,
			errors: new PassThrough(),
			progress: silent,
			options: OPTIONS
		});
		const collected = text(output);
		await done;
		output.end();
		expect((await collected).trim().split('\n')).toHaveLength(3000);
		expect(most).toBeLessThan(1 << 18);
	});
});

describe('npm run assess', () => {
	const good = {
		id: 'b-1',
		standard: 'aap-2022',
		gestationalAge: '40+0',
		bornAt: '2026-03-01T00:00:00Z',
		dischargeAt: '2026-03-03T02:00:00Z',
		neurotoxicityRisks: [],
		jaundiceRisks: [],
		feeding: 'breast',
		bilirubin: [{ at: '2026-03-03T00:00:00Z', method: 'serum', total: 13.5, unit: 'mg/dL' }],
		phototherapy: []
	};

	it('gives one result a line, in order, and exits 0', async () => {
		const { code, out, err } = await run(
			[],
			`${JSON.stringify(good)}\n${JSON.stringify({ ...good, id: 'b-2' })}`
		);
		const results = out
			.trim()
			.split('\n')
			.map((line): unknown => JSON.parse(line));
		expect(results).toMatchObject([
			{
				id: 'b-1',
				ageHours: 48,
				difference: 3.5,
				disposition: 'follow-up',
				window: {
					from: '2026-03-04T00:00:00.000Z',
					until: '2026-03-05T00:00:00.000Z',
					test: 'serum-or-transcutaneous'
				},
				thresholds: { phototherapy: 17, escalation: 22, exchange: 24, unit: 'mg/dL' }
			},
			{ id: 'b-2' }
		]);
		expect(err).toBe('');
		expect(code).toBe(0);
	});

	it('puts a refused record in its place, names line and reason, and exits 1', async () => {
		const early = { ...good, id: 'b-2', bilirubin: [{ ...good.bilirubin[0], at: '2026-02-28T00:00:00Z' }] };
		const { code, out, err } = await run(
			['--trace'],
			`${JSON.stringify(good)}\n${JSON.stringify(early)}\nnot json\n`
		);
		const [first, second, third] = out
			.trim()
			.split('\n')
			.map((line): unknown => JSON.parse(line));
		expect(first).toHaveProperty('trace');
		expect(second).toMatchObject({
			id: 'b-2',
			error: { code: 'measurement-before-birth', field: 'bilirubin[0].at' }
		});
		expect(third).toMatchObject({ id: null, error: { code: 'unreadable' } });
		expect(err).toMatch(/^line 2, b-2: bilirubin\[0\]\.at: /m);
		expect(err).toMatch(/^line 3, no id: /m);
		expect(code).toBe(1);
	});

	it('reads the same births from CSV', async () => {
		const header = CSV_COLUMNS.join(',');
		const row =
			'b-1,aap-2022,40+0,2026-03-01T00:00:00Z,2026-03-03T02:00:00Z,,,breast,,2026-03-03T00:00:00Z|serum|13.5||mg/dL,';
		const broken = 'b-2,aap-2022,40+0,2026-03-01T00:00:00Z,2026-03-03T02:00:00Z,,sneezing,breast,,,';
		const { code, out, err } = await run(['--format', 'csv'], `${header}\n${row}\n${broken}\n`);
		const [first] = out.split('\n');
		expect(first).toBe(assessLine(JSON.stringify(good), OPTIONS).text);
		expect(err).toMatch(/^line 3, b-2: jaundiceRisks\[0\]/m);
		expect(code).toBe(1);
	});

	it('refuses a row with too few cells in its place and counts lines inside quoted cells', async () => {
		const header = CSV_COLUMNS.join(',');
		const two = '"b\n1",aap-2022,40+0,2026-03-01T00:00:00Z,2026-03-03T02:00:00Z,,sneezing,breast,,,';
		const { code, out, err } = await run(['--format', 'csv'], `${header}\r\n\r\n${two}\r\nb-2,aap-2022\r\n`);
		expect(err).toMatch(/^line 4, b\n1: jaundiceRisks\[0\]/m);
		expect(err).toMatch(/^line 5, no id: The row has 2 cells, the header 11\.$/m);
		expect(out.trim().split('\n')).toHaveLength(2);
		expect(code).toBe(1);
	});

	it('answers each line as it comes, before the input ends', async () => {
		const input = new PassThrough();
		const output = new PassThrough();
		const silent = { advance: () => {}, makeRoom: () => {}, stop: () => {} };
		const errors = new PassThrough();
		const done = runBatch({ input, format: 'json', output, errors, progress: silent, options: OPTIONS });
		input.write(`${JSON.stringify(good)}\n`);
		const [first] = await once(output, 'data');
		expect(JSON.parse(String(first))).toMatchObject({ id: 'b-1' });
		input.end();
		await done;
	});

	it('says what is wrong with the command or the file, and exits 2', async () => {
		expect((await run(['--format', 'xml'], '')).code).toBe(2);
		const missing = await run(['no-such-file.ndjson'], '');
		expect(missing).toMatchObject({ code: 2, err: expect.stringMatching(/^The input cannot be read/) });
		expect((await run(['--format', 'csv'], 'id,standard\n1,aap-2022\n')).err).toMatch(/header lacks/);
		const endless = await run([], '['.padEnd(LONGEST_LINE_BYTES + 1, ' '));
		expect(endless).toMatchObject({ code: 2, out: '', err: expect.stringMatching(/line 1 is longer than/) });
	});
});

describe('the request of up to 1,000 records', () => {
	const [one = {}, two = {}] = births(2, 17);

	it('answers one with one, an array with an array, lines with lines', () => {
		const options = { ...OPTIONS, isLines: false };
		expect(assessBody(JSON.stringify(one), options)).toEqual({
			kind: 'one',
			result: assessRecord(one, OPTIONS)
		});
		expect(assessBody(JSON.stringify([one, {}]), options)).toMatchObject({
			kind: 'list',
			results: [assessRecord(one, OPTIONS), { id: null }]
		});
		const lines = assessBody(`${JSON.stringify(one)}\n${JSON.stringify(two)}\n`, {
			...options,
			isLines: true
		});
		expect(lines.kind === 'lines' && lines.text.trim().split('\n')).toHaveLength(2);
	});

	it('refuses more than 1,000 and what is no JSON', () => {
		const many = births(1001, 18);
		const options = { ...OPTIONS, isLines: false };
		expect(assessBody(JSON.stringify(many), options).kind).toBe('too-many');
		expect(assessBody(JSON.stringify(many.slice(1)), options).kind).toBe('list');
		expect(assessBody('{', options).kind).toBe('unreadable');
	});
});

describe('the published JSON Schemas', () => {
	it.each(Object.entries(PUBLISHED_SCHEMAS))('%s is the one made from the Zod types', (name, made) => {
		const published: unknown = JSON.parse(readFileSync(`${ROOT}/static/schemas/${name}`, 'utf8'));
		expect(published).toEqual(JSON.parse(made));
	});
});
