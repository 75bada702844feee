import type { Readable } from 'node:stream';
import { parse } from 'csv-parse';
import { headerProblem, recordReader } from './csv-columns';
import { UnreadableInput } from './unreadable-input';

export interface Row {
	/** The line the row ends on, counted from 1. */
	readonly lineNumber: number;
	/** A record to be checked. */
	readonly raw: unknown;
	/** Why the row is no record at all; null for most. */
	readonly problem: string | null;
}

const ROWS_IN_A_BATCH = 512;

/** The rows of a CSV file in batches; throws `UnreadableInput` on a broken file. */
export async function* rowBatches(bytes: Readable): AsyncGenerator<Row[]> {
	const parser = bytes.pipe(parse({ bom: true, relax_column_count: true }));
	bytes.once('error', (cause) => parser.destroy(cause));
	const reader = new RowReader();
	let batch: Row[] = [];
	try {
		for await (const cells of parser) {
			const row = reader.read(cells);
			if (row) batch.push(row);
			if (batch.length < ROWS_IN_A_BATCH) continue;
			yield batch;
			batch = [];
		}
	} catch (cause) {
		if (batch.length > 0) yield batch;
		throw cause instanceof UnreadableInput
			? cause
			: new UnreadableInput(cause instanceof Error ? cause.message : String(cause));
	}
	if (batch.length > 0) yield batch;
}

/** Counts lines itself: asking the library where each row stands costs a tenth of the whole run. */
class RowReader {
	private lineNumber = 0;
	private width = 0;
	private recordOf: ((cells: readonly string[]) => unknown) | undefined;

	/** Null for the header and for an empty line. */
	read(cells: readonly string[]): Row | null {
		this.lineNumber += 1 + breaksIn(cells);
		if (cells.length === 1 && cells[0]?.trim() === '') return null;
		if (this.recordOf) {
			const { lineNumber, width } = this;
			if (cells.length === width) return { lineNumber, raw: this.recordOf(cells), problem: null };
			return { lineNumber, raw: null, problem: `The row has ${cells.length} cells, the header ${width}.` };
		}
		const names = cells.map((name) => name.trim());
		const problem = headerProblem(names);
		if (problem !== null) throw new UnreadableInput(problem);
		this.width = names.length;
		this.recordOf = recordReader(names);
		return null;
	}
}

function breaksIn(cells: readonly string[]): number {
	let breaks = 0;
	for (const cell of cells) if (cell.includes('\n')) breaks += cell.split('\n').length - 1;
	return breaks;
}
