import type { CalendarTime } from '../../../schemas/desk-calendar';

/** A line of a day: one time, or a run of times in which nobody is booked yet. */
export type CalendarLine =
	| { readonly kind: 'time'; readonly time: CalendarTime }
	| { readonly kind: 'run'; readonly from: Date; readonly until: Date; readonly free: number };

const isQuiet = (time: CalendarTime): boolean => time.taken.length === 0 && !time.isPast && time.free > 0;

/**
 * The lines of an opening. Past times with nobody in them are left out. Neighbouring times without a visit become one
 * line, since 12 free half hours are one fact and not 12; those that can be chosen stay apart.
 */
export function calendarLines(
	times: readonly CalendarTime[],
	mayChoose: (time: CalendarTime) => boolean
): CalendarLine[] {
	const lines: CalendarLine[] = [];
	for (const time of times) {
		if (time.isPast && time.taken.length === 0) continue;
		const last = lines.at(-1);
		if (mayChoose(time) || !isQuiet(time)) {
			lines.push({ kind: 'time', time });
		} else if (last?.kind === 'run' && last.until.getTime() === time.startsAt.getTime()) {
			lines[lines.length - 1] = { ...last, until: time.endsAt, free: last.free + time.free };
		} else {
			lines.push({ kind: 'run', from: time.startsAt, until: time.endsAt, free: time.free });
		}
	}
	return lines;
}
