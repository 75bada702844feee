import { DateTime } from 'luxon';
import { isInOpening } from '../../domain/followup/openings';
import { isInsideWindow, placesBetween, type Opening, type PlaceTime } from '../../domain/followup/places';
import type { FollowUpWindow } from '../../domain/guideline/types';
import type { CalendarDay, CalendarOpening, CalendarTime, TakenView } from '../../schemas/desk-calendar';
import type { TakenPlaceRow } from '../repos/calendar';

export interface WeekFacts {
	readonly timeZone: string;
	/** Local dates in order. */
	readonly days: readonly string[];
	readonly openings: readonly Opening[];
	readonly closed: readonly { readonly on: string; readonly reason: string }[];
	readonly taken: readonly TakenPlaceRow[];
	readonly now: Date;
	/** Of the newborn that a place is chosen for; undefined when none is. */
	readonly window: FollowUpWindow | null | undefined;
}

const takenView = ({
	startsAt: _s,
	endsAt: _e,
	kind: _k,
	placeNumber: _p,
	...view
}: TakenPlaceRow): TakenView => view;

function timeOf(place: PlaceTime, facts: WeekFacts): CalendarTime {
	const { startsAt, endsAt, kind, freeNumbers } = place;
	const taken = facts.taken
		.filter((row) => row.kind === kind && row.startsAt.getTime() === startsAt.getTime())
		.sort((a, b) => a.placeNumber - b.placeNumber);
	return {
		startsAt,
		endsAt,
		kind,
		free: freeNumbers.length,
		taken: taken.map(takenView),
		isPast: startsAt <= facts.now,
		isInsideWindow: facts.window === undefined ? null : isInsideWindow(startsAt, facts.window)
	};
}

/** A visit whose opening was taken out of use, or on a day closed later: it still stands and must be seen. */
function strayTimes(stray: readonly TakenPlaceRow[], facts: WeekFacts): CalendarTime[] {
	return stray.map((row) => ({
		startsAt: row.startsAt,
		endsAt: row.endsAt,
		kind: row.kind,
		free: 0,
		taken: [takenView(row)],
		isPast: row.startsAt <= facts.now,
		isInsideWindow: facts.window === undefined ? null : isInsideWindow(row.startsAt, facts.window)
	}));
}

const countFree = (times: readonly CalendarTime[]): number =>
	times.reduce((sum, time) => sum + (time.isPast ? 0 : time.free), 0);

function openingsOf(places: readonly PlaceTime[], day: DateTime, facts: WeekFacts): CalendarOpening[] {
	const open = facts.openings
		.filter(({ weekday }) => weekday === day.weekday)
		.sort((a, b) => (a.from < b.from ? -1 : a.from > b.from ? 1 : a.visitKind < b.visitKind ? -1 : 1));
	return open.flatMap((opening) => {
		const own = places.filter(
			(place) => place.kind === opening.visitKind && isInOpening(opening, place.startsAt, facts.timeZone)
		);
		if (own.length === 0) return [];
		const times = own.map((place) => timeOf(place, facts));
		return [
			{
				kind: opening.visitKind,
				hours: { from: opening.from, until: opening.until },
				free: countFree(times),
				places: own.reduce((sum, place) => sum + place.placesAtOnce, 0),
				times
			}
		];
	});
}

function dayOf(on: string, places: readonly PlaceTime[], facts: WeekFacts): CalendarDay {
	const day = DateTime.fromISO(on, { zone: facts.timeZone });
	const isOn = ({ startsAt }: { readonly startsAt: Date }) =>
		DateTime.fromJSDate(startsAt, { zone: facts.timeZone }).toISODate() === on;
	const openings = openingsOf(places.filter(isOn), day, facts);
	const shown = new Set(openings.flatMap(({ times }) => times.flatMap((t) => t.taken.map((v) => v.visitId))));
	const taken = facts.taken.filter(isOn).sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
	const stray = taken.filter(({ visitId }) => !shown.has(visitId));
	const [first] = stray;
	const outside: CalendarOpening[] = first
		? [{ kind: first.kind, hours: null, free: 0, places: stray.length, times: strayTimes(stray, facts) }]
		: [];
	const today = DateTime.fromJSDate(facts.now, { zone: facts.timeZone }).toISODate() ?? '';
	return {
		on,
		startsAt: day.startOf('day').toJSDate(),
		isToday: on === today,
		isPast: on < today,
		closedBecause: facts.closed.find((closed) => closed.on === on)?.reason ?? null,
		openings: [...openings, ...outside],
		free: openings.reduce((sum, opening) => sum + opening.free, 0),
		taken: taken.length
	};
}

/**
 * The days of a clinic's calendar: every opening with its times, the free places and who took the others.
 * A visit that no opening holds any more is shown apart, never lost.
 */
export function calendarDays(facts: WeekFacts): CalendarDay[] {
	const [first] = facts.days;
	const last = facts.days.at(-1);
	if (!first || !last) return [];
	const places = placesBetween({
		openings: facts.openings,
		closedDays: facts.closed.map(({ on }) => on),
		timeZone: facts.timeZone,
		taken: facts.taken,
		from: DateTime.fromISO(first, { zone: facts.timeZone }).startOf('day').toJSDate(),
		until: DateTime.fromISO(last, { zone: facts.timeZone }).endOf('day').toJSDate()
	});
	return facts.days.map((on) => dayOf(on, places, facts));
}
