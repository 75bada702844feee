import { DateTime } from 'luxon';

/** Values of a date input and a time input in a zone: `{ date: '2026-03-03', time: '14:20' }`. */
export function toFieldValues(at: Date, timeZone: string): { date: string; time: string } {
	const time = DateTime.fromJSDate(at, { zone: timeZone });
	return { date: time.toFormat('yyyy-MM-dd'), time: time.toFormat('HH:mm') };
}

export type FieldInstant =
	| { readonly ok: true; readonly at: Date; readonly ambiguous: boolean }
	| { readonly ok: false; readonly reason: 'malformed' | 'does-not-exist' };

/**
 * The instant that a date field and a time field name in a zone.
 * A local time that the change to summer time leaves out does not exist; one that comes twice in autumn is read
 * as the earlier of the two and marked ambiguous.
 */
export function fromFieldValues(date: string, time: string, timeZone: string): FieldInstant {
	const read = DateTime.fromISO(`${date}T${time}`, { zone: timeZone });
	if (!/^\d{4}-\d{2}-\d{2}$/.test(date) || !/^\d{2}:\d{2}$/.test(time) || !read.isValid) {
		return { ok: false, reason: 'malformed' };
	}
	if (read.toFormat("yyyy-MM-dd'T'HH:mm") !== `${date}T${time}`)
		return { ok: false, reason: 'does-not-exist' };
	const both = read.getPossibleOffsets();
	const earliest = both.reduce((a, b) => (b.toMillis() < a.toMillis() ? b : a), read);
	return { ok: true, at: earliest.toJSDate(), ambiguous: both.length > 1 };
}

/** True when both instants fall on one calendar day of the zone. */
export function isSameDay(a: Date, b: Date, timeZone: string): boolean {
	return toFieldValues(a, timeZone).date === toFieldValues(b, timeZone).date;
}
