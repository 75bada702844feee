import { DateTime } from 'luxon';
import type { FollowUpWindow } from '../guideline/types';
import type { VisitKind } from './visit';

/** A weekly stretch of a clinic's time in its own local time. */
export interface Opening {
	/** ISO weekday, 1 Monday to 7 Sunday. */
	readonly weekday: number;
	/** Local `HH:MM`. */
	readonly from: string;
	readonly until: string;
	readonly visitKind: VisitKind;
	readonly placeMinutes: number;
	readonly placesAtOnce: number;
}

/** One bookable time with the numbers of its places that are free. */
export interface PlaceTime {
	readonly startsAt: Date;
	readonly endsAt: Date;
	readonly kind: VisitKind;
	readonly freeNumbers: readonly number[];
	readonly placesAtOnce: number;
}

export interface TakenPlace {
	readonly startsAt: Date;
	readonly kind: VisitKind;
	readonly placeNumber: number;
}

function timesOfDay(day: DateTime, opening: Opening): { startsAt: Date; endsAt: Date }[] {
	const at = (clock: string) => {
		const [hour, minute] = clock.split(':').map(Number);
		return day.set({ hour, minute, second: 0, millisecond: 0 });
	};
	const end = at(opening.until);
	const times: { startsAt: Date; endsAt: Date }[] = [];
	for (let start = at(opening.from); ; start = start.plus({ minutes: opening.placeMinutes })) {
		const until = start.plus({ minutes: opening.placeMinutes });
		if (until > end) return times;
		times.push({ startsAt: start.toJSDate(), endsAt: until.toJSDate() });
	}
}

/**
 * Every place that the openings give between two instants, with what is still free, in order of time.
 * Local times are the clinic's own, so a place keeps its wall-clock time across a change of daylight saving.
 * @param closedDays local dates, `YYYY-MM-DD`, on which nothing is bookable
 */
export function placesBetween(asked: {
	readonly openings: readonly Opening[];
	readonly closedDays: readonly string[];
	readonly timeZone: string;
	readonly taken: readonly TakenPlace[];
	readonly from: Date;
	readonly until: Date;
}): PlaceTime[] {
	const { openings, closedDays, timeZone, taken, from, until } = asked;
	const keyOf = (startsAt: Date, kind: VisitKind) => `${startsAt.getTime()} ${kind}`;
	const takenAt = new Map<string, Set<number>>();
	for (const { startsAt, kind, placeNumber } of taken) {
		const numbers = takenAt.get(keyOf(startsAt, kind)) ?? new Set<number>();
		takenAt.set(keyOf(startsAt, kind), numbers.add(placeNumber));
	}
	const places: PlaceTime[] = [];
	const last = DateTime.fromJSDate(until, { zone: timeZone });
	for (
		let day = DateTime.fromJSDate(from, { zone: timeZone }).startOf('day');
		day <= last;
		day = day.plus({ days: 1 })
	) {
		if (closedDays.includes(day.toISODate() ?? '')) continue;
		for (const opening of openings.filter((o) => o.weekday === day.weekday)) {
			for (const time of timesOfDay(day, opening)) {
				if (time.startsAt < from || time.startsAt > until) continue;
				const used = takenAt.get(keyOf(time.startsAt, opening.visitKind));
				const numbers = Array.from({ length: opening.placesAtOnce }, (_, i) => i + 1);
				const freeNumbers = numbers.filter((n) => !used?.has(n));
				places.push({ ...time, kind: opening.visitKind, freeNumbers, placesAtOnce: opening.placesAtOnce });
			}
		}
	}
	return places.sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
}

/** True where the instant satisfies the window; without a window clinical judgement decides, and any time may serve. */
export const isInsideWindow = (instant: Date, window: FollowUpWindow | null): boolean =>
	window === null || (instant >= window.from && instant <= window.until);
