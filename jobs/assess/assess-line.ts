import { check } from '../../src/lib/domain/guideline/check';
import { decide } from '../../src/lib/domain/guideline/decide';
import { explain } from '../../src/lib/domain/guideline/explain';
import { standardOf } from '../../src/lib/domain/guideline/registry';
import { toAssessmentOutput, toRefusedRecord, type RefusedRecord } from '../../src/lib/schemas/assessment';
import {
	assessRecord,
	isRefused,
	unreadableLine,
	type RecordOptions
} from '../../src/lib/schemas/assessment-record';
import { readRecord } from './read-record';
import { writeResult } from './write-result';

/** The line for a record, and the refusal when it was refused. */
export interface LineResult {
	readonly text: string;
	readonly refused: RefusedRecord | null;
}

/** A record of unknown shape to the line of its result. */
export function assessRaw(raw: unknown, options: RecordOptions): LineResult {
	const record = readRecord(raw);
	if (!record) {
		const result = assessRecord(raw, options);
		return { text: JSON.stringify(result), refused: isRefused(result) ? result : null };
	}
	const standard = standardOf(record.input.standard);
	const refusals = check(record.input, standard, options);
	if (refusals.length > 0) return refusedLine(toRefusedRecord(record.id, refusals));
	const decision = decide(record.input, standard);
	const text = options.withTrace
		? JSON.stringify(toAssessmentOutput(record.id, explain(decision, standard), true))
		: writeResult(record.id, decision, standard);
	return { text, refused: null };
}

/** A line of newline-delimited JSON to the line of its result. */
export function assessLine(line: string, options: RecordOptions): LineResult {
	let raw: unknown;
	try {
		raw = JSON.parse(line);
	} catch {
		return refusedLine(unreadableLine());
	}
	return assessRaw(raw, options);
}

/** The line in place of what is no record at all. */
export function unreadable(message: string): LineResult {
	return refusedLine(toRefusedRecord(null, [{ code: 'unreadable', field: '', message }]));
}

function refusedLine(refused: RefusedRecord): LineResult {
	return { text: JSON.stringify(refused), refused };
}
