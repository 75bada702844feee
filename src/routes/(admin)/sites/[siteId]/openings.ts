import type { VisitKind } from '$lib/domain/followup/visit';
import { minutesOf } from '$lib/schemas/sites';

export const WEEKDAYS = [
	'Monday',
	'Tuesday',
	'Wednesday',
	'Thursday',
	'Friday',
	'Saturday',
	'Sunday'
] as const;

/** The name of an ISO weekday. */
export const weekdayName = (weekday: number): string => WEEKDAYS[weekday - 1] ?? '';

export const VISIT_WORDS: Readonly<Record<VisitKind, string>> = {
	check: 'Check',
	'blood-draw': 'Blood draw',
	'feeding-help': 'Feeding help'
};

export interface ShownOpening {
	readonly id: string;
	readonly weekday: number;
	readonly from: string;
	readonly until: string;
	readonly visitKind: VisitKind;
	readonly placeMinutes: number;
	readonly placesAtOnce: number;
	readonly standing: number;
}

/** How many newborns an opening has room for. */
export const placesIn = ({ from, until, placeMinutes, placesAtOnce }: ShownOpening): number =>
	Math.floor((minutesOf(until) - minutesOf(from)) / placeMinutes) * placesAtOnce;

export interface Block extends ShownOpening {
	/** Per cent of the picture's height. */
	readonly top: number;
	readonly height: number;
	/** Per cent of the day's width: openings of different kinds may overlap in time. */
	readonly left: number;
	readonly width: number;
}

export interface WeekLayout {
	/** Full hours at the left edge with their place from the top in per cent. */
	readonly hours: readonly { readonly label: string; readonly top: number }[];
	readonly days: readonly { readonly name: string; readonly blocks: readonly Block[] }[];
}

/** Lays a week of openings out; openings that overlap stand side by side. */
export function layOutWeek(openings: readonly ShownOpening[]): WeekLayout {
	const first = Math.floor(Math.min(8 * 60, ...openings.map(({ from }) => minutesOf(from))) / 60);
	const last = Math.ceil(Math.max(18 * 60, ...openings.map(({ until }) => minutesOf(until))) / 60);
	const span = (last - first) * 60;
	const percent = (minutes: number): number => (minutes / span) * 100;
	const days = WEEKDAYS.map((name, i) => {
		const ofDay = openings.filter(({ weekday }) => weekday === i + 1);
		const blocks = ofDay.map((opening): Block => {
			const beside = ofDay.filter((other) => other.from < opening.until && opening.from < other.until);
			return {
				...opening,
				top: percent(minutesOf(opening.from) - first * 60),
				height: percent(minutesOf(opening.until) - minutesOf(opening.from)),
				left: (beside.indexOf(opening) / beside.length) * 100,
				width: 100 / beside.length
			};
		});
		return { name, blocks };
	});
	const hours = Array.from({ length: last - first + 1 }, (_, i) => ({
		label: `${String(first + i).padStart(2, '0')}:00`,
		top: percent(i * 60)
	}));
	return { hours, days };
}
