import type { Readable, Writable } from 'node:stream';
import type { RecordOptions } from '../../src/lib/schemas/assessment-record';
import { assessLine, assessRaw, unreadable, type LineResult } from './assess-line';
import { lineBatches } from './lines';
import type { Progress } from './progress';
import { rowBatches } from './rows';
import { Sink } from './sink';

export interface Batch {
	readonly input: Readable;
	readonly format: 'json' | 'csv';
	readonly output: Writable;
	readonly errors: Writable;
	readonly progress: Progress;
	readonly options: RecordOptions;
}

export interface Counts {
	readonly records: number;
	readonly refused: number;
}

/** Assesses every record in order; memory stays flat whatever the length of the input. */
export async function runBatch(batch: Batch): Promise<Counts> {
	const work = new Work(batch);
	if (batch.format === 'csv') await runRows(batch, work);
	else await runLines(batch, work);
	await work.settle();
	return { records: work.records, refused: work.refused };
}

async function runLines({ input, options, progress }: Batch, work: Work): Promise<void> {
	let lineNumber = 0;
	for await (const { lines, bytes } of lineBatches(input)) {
		const before = work.records;
		for (const line of lines) {
			lineNumber++;
			if (line.trim() !== '') work.add(lineNumber, assessLine(line, options));
		}
		progress.advance(bytes, work.records - before);
		await work.settle();
	}
}

async function runRows({ input, options, progress }: Batch, work: Work): Promise<void> {
	let read = 0;
	input.on('data', (chunk: Buffer) => {
		read += chunk.length;
	});
	let shown = 0;
	for await (const rows of rowBatches(input)) {
		for (const { lineNumber, raw, problem } of rows)
			work.add(lineNumber, problem === null ? assessRaw(raw, options) : unreadable(problem));
		progress.advance(read - shown, rows.length);
		shown = read;
		await work.settle();
	}
}

class Work {
	records = 0;
	refused = 0;
	private readonly results: Sink;
	private readonly reasons: Sink;

	constructor({ output, errors, progress }: Batch) {
		this.results = new Sink(output);
		this.reasons = new Sink(errors, progress.makeRoom);
	}

	add(lineNumber: number, { text, refused }: LineResult): void {
		this.records++;
		this.results.line(text);
		if (!refused) return;
		this.refused++;
		const { others = [], ...first } = refused.error;
		const reasons = [first, ...others].map(({ field, message }) =>
			field === '' ? message : `${field}: ${message}`
		);
		this.reasons.line(`line ${lineNumber}, ${refused.id ?? 'no id'}: ${reasons.join(' ')}`);
	}

	async settle(): Promise<void> {
		await this.results.settle();
		await this.reasons.settle();
	}
}
