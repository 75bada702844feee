import { fromFieldValues } from '../domain/local-time';

/** A sentence about one field; rows add their number: `['measurementTotal', 1]`. */
export interface FormIssue {
	readonly path: readonly [string] | readonly [string, number];
	readonly message: string;
}

/** Collects what is wrong while a form is read, so that one pass reports everything. */
export class IssueList {
	readonly issues: FormIssue[] = [];

	add(field: string, message: string, row?: number): null {
		this.issues.push({ path: row === undefined ? [field] : [field, row], message });
		return null;
	}
}

/** A number as people type it: comma or point, spaces around; null when it is none. */
export function parseNumber(typed: string): number | null {
	const plain = typed.trim().replace(',', '.');
	return /^\d+(\.\d+)?$/.test(plain) ? Number(plain) : null;
}

/** A whole number of grams, with or without separators of thousands: "3240", "3,240", "3 240". */
export function parseGrams(typed: string): number | null {
	const plain = typed.trim().replace(/^(\d{1,2})[ ,.](\d{3})$/, '$1$2');
	return /^\d{3,5}$/.test(plain) ? Number(plain) : null;
}

interface InstantField {
	readonly onField: string;
	readonly timeField: string;
	readonly row?: number;
	/** How the sentence names it: "the birth", "this value". */
	readonly what: string;
}

/** The instant that a date box and a time box name in a zone; null with an issue when they do not. */
export function readInstant(
	typed: { readonly on: string; readonly time: string; readonly timeZone: string },
	field: InstantField,
	list: IssueList
): Date | null {
	const { on, time, timeZone } = typed;
	if (on === '') return list.add(field.onField, `Give the date of ${field.what}.`, field.row);
	if (time === '') return list.add(field.timeField, `Give the time of ${field.what}.`, field.row);
	const read = fromFieldValues(on, time, timeZone);
	if (read.ok) return read.at;
	const message =
		read.reason === 'does-not-exist'
			? 'The clocks go forward over this time: it does not exist on that day.'
			: `Write the date and time of ${field.what} as the boxes ask.`;
	return list.add(field.onField, message, field.row);
}

/** The member of a closed list that was typed, or null. */
export function oneOf<Value extends string>(allowed: readonly Value[], typed: string): Value | null {
	return allowed.find((value) => value === typed) ?? null;
}
