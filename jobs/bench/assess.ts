import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { createReadStream, createWriteStream, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { text } from 'node:stream/consumers';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';
import { check } from '../../src/lib/domain/guideline/check';
import { decide } from '../../src/lib/domain/guideline/decide';
import { standardOf } from '../../src/lib/domain/guideline/registry';
import { lineBatches } from '../assess/lines';
import { startProgress } from '../assess/progress';
import { readRecord, type ReadRecord } from '../assess/read-record';
import { runBatch } from '../assess/run';
import { Sink } from '../assess/sink';
import { invent, seeded } from './births';

/**
 * How fast and in how much memory a year of births is assessed, as a ratio to merely parsing and re-serialising the
 * same lines. Each part runs in a process of its own, in turn, so that all meet the same machine.
 * `npm run bench:assess -- [--records 400000] [--rounds 3]`
 */

const PIECE_BYTES = 1 << 18;
const YEAR_OF_BIRTHS = 4_000_000;
const RULE_SECONDS = 3;
const TYPED_INPUTS = 2_000;
const ROLES = ['copy', 'assess', 'rule'] as const;
type Role = (typeof ROLES)[number];

/** The file descriptor by which a part reports to the one that started it; its standard output is thrown away. */
const REPORT_PIPE = 3;

const reportSchema = z.object({
	seconds: z.number(),
	cpuSeconds: z.number(),
	records: z.number(),
	peakMegabytes: z.number()
});
type Report = Readonly<z.infer<typeof reportSchema>>;

async function copy(file: string): Promise<number> {
	const sink = new Sink(process.stdout);
	let records = 0;
	for await (const { lines } of lineBatches(createReadStream(file, { highWaterMark: PIECE_BYTES }))) {
		for (const line of lines) {
			sink.line(JSON.stringify(JSON.parse(line)));
			records++;
		}
		await sink.settle();
	}
	await sink.settle();
	return records;
}

async function assessFile(file: string): Promise<number> {
	const input = createReadStream(file, { highWaterMark: PIECE_BYTES });
	const progress = startProgress(process.stderr, null);
	const options = { withTrace: false, notAfter: new Date() };
	const { records } = await runBatch({
		input,
		format: 'json',
		output: process.stdout,
		errors: createWriteStream('/dev/null'),
		progress,
		options
	});
	return records;
}

/** Typed inputs for the rule alone, made before the clock starts. */
function typedInputs(): ReadRecord['input'][] {
	const random = seeded(7);
	const inputs: ReadRecord['input'][] = [];
	for (let i = 0; i < TYPED_INPUTS; i++) {
		const record = readRecord(JSON.parse(JSON.stringify(invent(random, i))));
		if (record && check(record.input, standardOf(record.input.standard)).length === 0)
			inputs.push(record.input);
	}
	return inputs;
}

/** From typed input to decision, checks and cautions included, as often as fits a few seconds of processor time. */
function rule(inputs: readonly ReadRecord['input'][]): number {
	const before = process.cpuUsage();
	let done = 0;
	while (process.cpuUsage(before).user < RULE_SECONDS * 1e6) {
		for (const input of inputs) {
			const standard = standardOf(input.standard);
			if (check(input, standard).length === 0) decide(input, standard);
		}
		done += inputs.length;
	}
	return done;
}

async function play(role: Role, file: string): Promise<void> {
	const inputs = role === 'rule' ? typedInputs() : [];
	const startedMs = performance.now();
	const before = process.cpuUsage();
	const records =
		role === 'copy' ? await copy(file) : role === 'assess' ? await assessFile(file) : rule(inputs);
	const { user, system } = process.cpuUsage(before);
	const report: Report = {
		seconds: (performance.now() - startedMs) / 1000,
		cpuSeconds: (user + system) / 1e6,
		records,
		peakMegabytes: process.resourceUsage().maxRSS / 1024
	};
	writeFileSync(REPORT_PIPE, JSON.stringify(report));
}

async function runApart(role: Role, file: string): Promise<Report> {
	const child = spawn(
		process.execPath,
		[...process.execArgv, fileURLToPath(import.meta.url), '--role', role, file],
		{
			stdio: ['ignore', 'ignore', 'inherit', 'pipe']
		}
	);
	const pipe = child.stdio[REPORT_PIPE];
	if (!(pipe instanceof Readable)) throw new Error('no pipe for the report');
	return reportSchema.parse(JSON.parse(await text(pipe)));
}

async function writeBirths(file: string, count: number): Promise<void> {
	const random = seeded(1);
	const stream = createWriteStream(file);
	const sink = new Sink(stream);
	for (let i = 0; i < count; i++) {
		sink.line(JSON.stringify(invent(random, i)));
		if (i % 1000 === 0) await sink.settle();
	}
	await sink.settle();
	stream.end();
	await once(stream, 'finish');
}

/** Processor time, not the clock on the wall, so that a busy machine does not change the answer. */
const leanest = (reports: readonly Report[]): Report =>
	reports.reduce((best, one) => (one.cpuSeconds < best.cpuSeconds ? one : best));

/** Measures and prints one table. */
export async function benchAssess({ records = 400_000, rounds = 3 } = {}): Promise<void> {
	const folder = mkdtempSync(join(tmpdir(), 'births-'));
	const file = join(folder, 'births.ndjson');
	try {
		await writeBirths(file, records);
		const copies: Report[] = [];
		const assessed: Report[] = [];
		for (let round = 0; round < rounds; round++) {
			copies.push(await runApart('copy', file));
			assessed.push(await runApart('assess', file));
		}
		print({
			copy: leanest(copies),
			assess: leanest(assessed),
			rule: await runApart('rule', file),
			bytes: statSync(file).size
		});
	} finally {
		rmSync(folder, { recursive: true });
	}
}

function print({ copy: base, assess, rule: alone, bytes }: Record<Role, Report> & { bytes: number }): void {
	const perRecord = (report: Report): string => ((report.cpuSeconds / report.records) * 1e6).toFixed(2);
	const year = (seconds: number): string => ((seconds / assess.records) * YEAR_OF_BIRTHS).toFixed(0);
	const lines = [
		`${assess.records.toLocaleString('en')} births, ${Math.round(bytes / assess.records)} bytes a line; processor time of one process`,
		`parse and re-serialise   ${perRecord(base)} µs a record, peak ${base.peakMegabytes.toFixed(0)} MB`,
		`assess                   ${perRecord(assess)} µs a record, peak ${assess.peakMegabytes.toFixed(0)} MB (limit 200)`,
		`ratio                    ${(assess.cpuSeconds / base.cpuSeconds).toFixed(2)} (limit 3); by the clock on the wall ${(assess.seconds / base.seconds).toFixed(2)}`,
		`a year of births (4 M)   ${year(assess.cpuSeconds)} s (limit 60); by the clock on the wall ${year(assess.seconds)} s`,
		`the rule alone           ${(alone.records / alone.cpuSeconds / 1e6).toFixed(2)} million a second (limit 1), checks and cautions included`
	];
	process.stdout.write(`${lines.join('\n')}\n`);
}

function numberAfter(name: string, otherwise: number): number {
	const at = process.argv.indexOf(name);
	return at === -1 ? otherwise : Number(process.argv[at + 1]);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	const roleAt = process.argv.indexOf('--role');
	const role = ROLES.find((one) => one === process.argv[roleAt + 1]);
	if (roleAt !== -1 && role) await play(role, process.argv[roleAt + 2] ?? '');
	else await benchAssess({ records: numberAfter('--records', 400_000), rounds: numberAfter('--rounds', 3) });
}
