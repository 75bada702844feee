import { DateTime } from 'luxon';

/** Local hours and days on which families get nothing that can wait; equal ends mean that no hour is quiet. */
export interface QuietHours {
	readonly timeZone: string;
	/** Local `HH:MM`. */
	readonly quietFrom: string;
	readonly quietUntil: string;
	/** ISO weekdays, 1 Monday to 7 Sunday; a full week counts as none, or nothing could ever be sent. */
	readonly quietDays: readonly number[];
}

/** A message moved to before the quiet hours keeps this distance, so that a busy worker does not run into them. */
const MARGIN_MINUTES = 30;

function minuteOfDay(time: string): number {
	const [hours = 0, minutes = 0] = time.split(':').map(Number);
	return hours * 60 + minutes;
}

const localAt = (at: Date, quiet: QuietHours): DateTime => DateTime.fromJSDate(at, { zone: quiet.timeZone });

const atTime = (day: DateTime, time: string): DateTime =>
	day.set({
		hour: Math.floor(minuteOfDay(time) / 60),
		minute: minuteOfDay(time) % 60,
		second: 0,
		millisecond: 0
	});

const isQuietDay = (local: DateTime, quiet: QuietHours): boolean =>
	new Set(quiet.quietDays).size < 7 && quiet.quietDays.includes(local.weekday);

function isQuietTime(local: DateTime, quiet: QuietHours): boolean {
	const minute = local.hour * 60 + local.minute;
	const from = minuteOfDay(quiet.quietFrom);
	const until = minuteOfDay(quiet.quietUntil);
	if (from === until) return false;
	return from < until ? minute >= from && minute < until : minute >= from || minute < until;
}

/** True where the clinic's clock stands in quiet hours or on a quiet day. */
export function isQuiet(at: Date, quiet: QuietHours): boolean {
	const local = localAt(at, quiet);
	return isQuietDay(local, quiet) || isQuietTime(local, quiet);
}

/**
 * The first instant from `at` on that is not quiet: `at` itself, or the end of the quiet hours.
 * Example: quiet 21:00 to 08:00, asked for 22:15 on Tuesday, gives 08:00 on Wednesday.
 */
export function nextAllowed(at: Date, quiet: QuietHours): Date {
	let local = localAt(at, quiet);
	for (let step = 0; step < 16; step++) {
		if (isQuietDay(local, quiet)) local = local.plus({ days: 1 }).startOf('day');
		else if (isQuietTime(local, quiet)) {
			const sameDay = atTime(local, quiet.quietUntil);
			local = sameDay > local ? sameDay : atTime(local.plus({ days: 1 }), quiet.quietUntil);
		} else break;
	}
	return local.toJSDate();
}

/**
 * `at` itself when it is not quiet, or else the last instant before it that is not, with half an hour to spare.
 * Example: quiet on Sundays and 21:00 to 08:00, asked for 10:00 on Sunday, gives 20:30 on Saturday.
 */
export function lastAllowedBefore(at: Date, quiet: QuietHours): Date {
	let local = localAt(at, quiet);
	for (let step = 0; step < 16; step++) {
		if (!isQuietDay(local, quiet) && !isQuietTime(local, quiet)) break;
		local = beforeQuiet(local, quiet);
	}
	return local.toJSDate();
}

function beforeQuiet(local: DateTime, quiet: QuietHours): DateTime {
	if (isQuietDay(local, quiet)) return local.startOf('day').minus({ minutes: MARGIN_MINUTES });
	const sameDay = atTime(local, quiet.quietFrom);
	const began = sameDay <= local ? sameDay : atTime(local.minus({ days: 1 }), quiet.quietFrom);
	return began.minus({ minutes: MARGIN_MINUTES });
}

/** Priorities up to this one are urgent, or answer what the family did a moment ago: quiet hours do not hold them. */
const EXEMPT_UP_TO = 1;

export const isExemptFromQuiet = (priority: number): boolean => priority <= EXEMPT_UP_TO;
