import { Readable } from 'node:stream';
import { parse } from 'csv-parse';
import { headerProblem, recordOfRow } from './csv-columns';

/** A file that cannot be read at all, as opposed to a record that is refused. */
export class UnreadableInput extends Error {}

export interface Row {
	readonly lineNumber: number;
	readonly raw: unknown;
}

const ROWS_IN_A_BATCH = 512;

/** The rows of a CSV file with the line each ends on, in batches; throws `UnreadableInput` on a broken file. */
export async function* rowBatches(bytes: Readable): AsyncGenerator<Row[]> {
	const parser = bytes.pipe(
		parse({
			bom: true,
			info: true,
			skip_empty_lines: true,
			columns: (header: string[]) => {
				const names = header.map((name) => name.trim());
				const problem = headerProblem(names);
				if (problem !== null) throw new UnreadableInput(problem);
				return names;
			}
		})
	);
	bytes.once('error', (cause) => parser.destroy(cause));
	let batch: Row[] = [];
	try {
		for await (const { record, info } of parser) {
			batch.push({ lineNumber: info.lines, raw: recordOfRow(record) });
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
