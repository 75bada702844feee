import { MOST_RECORDS, type AssessmentOutput, type RefusedRecord } from './assessment';
import { assessLine, assessRecord, type RecordOptions } from './assessment-record';

export interface BodyOptions extends RecordOptions {
	/** Newline-delimited JSON instead of one JSON value. */
	readonly isLines: boolean;
}

type OneResult = AssessmentOutput | RefusedRecord;

/** What a request asked for, assessed; refused records stand in the place of their results. */
export type BodyAnswer =
	| { readonly kind: 'one'; readonly result: OneResult }
	| { readonly kind: 'list'; readonly results: readonly OneResult[] }
	| { readonly kind: 'lines'; readonly text: string }
	| { readonly kind: 'unreadable' }
	| { readonly kind: 'too-many' };

/** Assesses the body of a request: one object, an array, or a line each. */
export function assessBody(body: string, options: BodyOptions): BodyAnswer {
	if (options.isLines) return assessLines(body, options);
	let raw: unknown;
	try {
		raw = JSON.parse(body);
	} catch {
		return { kind: 'unreadable' };
	}
	if (!Array.isArray(raw)) return { kind: 'one', result: assessRecord(raw, options) };
	if (raw.length > MOST_RECORDS) return { kind: 'too-many' };
	return { kind: 'list', results: raw.map((one) => assessRecord(one, options)) };
}

function assessLines(body: string, options: BodyOptions): BodyAnswer {
	const lines = body.split(/\r?\n/).filter((line) => line.trim() !== '');
	if (lines.length > MOST_RECORDS) return { kind: 'too-many' };
	return {
		kind: 'lines',
		text: lines.map((line) => `${JSON.stringify(assessLine(line, options))}\n`).join('')
	};
}
