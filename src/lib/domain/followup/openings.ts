import { DateTime } from 'luxon';
import type { Opening } from './places';

/** True where two openings would offer the same place twice: same day and kind of visit, times that overlap. */
export const overlaps = (a: Opening, b: Opening): boolean =>
	a.weekday === b.weekday && a.visitKind === b.visitKind && a.from < b.until && b.from < a.until;

/** True where a visit that starts then lies in the opening, read on the clinic's own clock. */
export function isInOpening(opening: Opening, startsAt: Date, timeZone: string): boolean {
	const local = DateTime.fromJSDate(startsAt, { zone: timeZone });
	const time = local.toFormat('HH:mm');
	return local.weekday === opening.weekday && opening.from <= time && time < opening.until;
}

/** First and last instant of a local calendar day. */
export function dayBounds(on: string, timeZone: string): { readonly from: Date; readonly until: Date } {
	const day = DateTime.fromISO(on, { zone: timeZone });
	return { from: day.startOf('day').toJSDate(), until: day.endOf('day').toJSDate() };
}
