import type { z } from 'zod';
import type { CheckOptions } from '../domain/guideline/check';
import { assess } from '../domain/guideline/index';
import type { Refusal } from '../domain/guideline/types';
import {
	assessmentInputSchema,
	toAssessmentInput,
	toAssessmentOutput,
	toRefusedRecord,
	type AssessmentOutput,
	type RefusedRecord
} from './assessment';

export interface RecordOptions extends CheckOptions {
	readonly withTrace: boolean;
}

/** Whether a result stands for a refused record. */
export function isRefused(result: AssessmentOutput | RefusedRecord): result is RefusedRecord {
	return 'error' in result;
}

/** One record of unknown shape to its result, or to the reasons why it was refused. */
export function assessRecord(raw: unknown, options: RecordOptions): AssessmentOutput | RefusedRecord {
	const parsed = assessmentInputSchema.safeParse(raw);
	if (!parsed.success) return toRefusedRecord(idOf(raw), parsed.error.issues.map(refusalOf));
	const result = assess(toAssessmentInput(parsed.data), options);
	return result.ok
		? toAssessmentOutput(parsed.data.id, result.value, options.withTrace)
		: toRefusedRecord(parsed.data.id, result.error);
}

/** A line of text to its result; a line that is no JSON is refused without an id. */
export function assessLine(line: string, options: RecordOptions): AssessmentOutput | RefusedRecord {
	let raw: unknown;
	try {
		raw = JSON.parse(line);
	} catch {
		return unreadableLine();
	}
	return assessRecord(raw, options);
}

/** The answer to a line that is no JSON. */
export function unreadableLine(): RefusedRecord {
	return toRefusedRecord(null, [
		{ code: 'unreadable', field: '', message: 'This line is not JSON. Write one object a line.' }
	]);
}

function idOf(raw: unknown): string | null {
	return typeof raw === 'object' && raw !== null && 'id' in raw && typeof raw.id === 'string' ? raw.id : null;
}

type Issue = z.core.$ZodIssue;

function refusalOf(issue: Issue): Refusal {
	const field = issue.path.reduce<string>(
		(text, key) =>
			typeof key === 'number' ? `${text}[${key}]` : text === '' ? String(key) : `${text}.${String(key)}`,
		''
	);
	return { code: 'unreadable', field, message: whatToDo(issue) };
}

const SHAPES: Readonly<Record<string, string>> = {
	string: 'text in quotes',
	number: 'a number, without quotes or unit',
	array: 'a list, [] when there is nothing in it',
	object: 'an object of the published form'
};

/** What to do instead; the schema's own sentences say it already. */
function whatToDo(issue: Issue): string {
	switch (issue.code) {
		case 'invalid_type': {
			const isMissing = issue.message.endsWith('received undefined');
			return `${isMissing ? 'This field is missing' : 'This cannot be read'}: give ${SHAPES[issue.expected] ?? issue.expected}.`;
		}
		case 'invalid_value':
			return `Choose one of: ${issue.values.map(String).join(', ')}.`;
		case 'unrecognized_keys':
			return `The published form has no ${issue.keys.join(', ')}: leave it out, or correct its name.`;
		case 'too_small':
			return 'Give at least one letter.';
		case 'too_big':
			return `Give at most ${String(issue.maximum)} letters.`;
		default:
			return issue.message;
	}
}
