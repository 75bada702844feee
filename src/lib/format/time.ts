import { DateTime } from 'luxon';

export { fromFieldValues, toFieldValues, type FieldInstant } from '../domain/local-time';

/** How times are written: `staff` uses the 24-hour clock, `family` the clock the family's language uses. */
export type Audience = 'staff' | 'family';

export interface TimeStyle {
	/** IANA name, for instance `America/Chicago`. */
	readonly timeZone: string;
	/** BCP 47; English when absent. */
	readonly locale?: string;
	readonly audience?: Audience;
}

function local(at: Date, style: TimeStyle): DateTime {
	return DateTime.fromJSDate(at, { zone: style.timeZone }).setLocale(style.locale ?? 'en');
}

/** "14:20" for staff, "2:20 PM" (or as the language has it) for a family. */
export function formatTime(at: Date, style: TimeStyle): string {
	const time = local(at, style);
	return style.audience === 'family' ? time.toLocaleString(DateTime.TIME_SIMPLE) : time.toFormat('HH:mm');
}

/** "Tue 3 Mar" for staff, "Tuesday, March 3, 2026" for a family. */
export function formatDay(at: Date, style: TimeStyle): string {
	const time = local(at, style);
	return style.audience === 'family' ? time.toLocaleString(DateTime.DATE_HUGE) : time.toFormat('ccc d LLL');
}

/** "Tue 3 Mar 14:20" for staff, "Tuesday, March 3, 2026, 2:20 PM" for a family. */
export function formatDayTime(at: Date, style: TimeStyle): string {
	const joint = style.audience === 'family' ? ', ' : ' ';
	return `${formatDay(at, style)}${joint}${formatTime(at, style)}`;
}

/** "Tue 3 Mar 08:00 to 20:00", the day only once when both ends share it. */
export function formatSpan(from: Date, until: Date, style: TimeStyle): string {
	const sameDay = local(from, style).hasSame(local(until, style), 'day');
	const end = sameDay ? formatTime(until, style) : formatDayTime(until, style);
	return `${formatDayTime(from, style)} to ${end}`;
}

/** A calendar date without a time, given as `2026-03-03`: "3 Mar 2026". */
export function formatCalendarDate(on: string, locale = 'en'): string {
	const date = DateTime.fromISO(on, { zone: 'utc', locale });
	return date.isValid ? date.toFormat('d LLL yyyy') : on;
}

/** Short name of the zone at that instant, for beside a time field: "CST", "GMT+1". */
export function formatZone(timeZone: string, at: Date, locale = 'en-US'): string {
	return DateTime.fromJSDate(at, { zone: timeZone }).setLocale(locale).offsetNameShort ?? timeZone;
}
