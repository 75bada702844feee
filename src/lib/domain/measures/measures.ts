import type { Outcome } from '../followup/states';
import type { VisitState } from '../followup/visit';

/** What the measures need to know of one follow-up. Instants are absolute. */
export interface MeasuredFollowUp {
	readonly id: string;
	readonly handedOverAt: Date;
	readonly outcome: Outcome | null;
	readonly round: number;
	/** End of the window in force; of the first round where `round` is 1. */
	readonly windowUntilAt: Date | null;
	/** In order of their start. */
	readonly visits: readonly MeasuredVisit[];
	/** Tries that reached the family. */
	readonly reachedAt: readonly Date[];
	/** Line minus value (standard's unit) of the first value taken at the first visit; null where none was taken. */
	readonly firstVisitDifference: number | null;
}

export interface MeasuredVisit {
	readonly round: number;
	readonly startsAt: Date;
	readonly state: VisitState;
	readonly isOutsideWindow: boolean;
	readonly isConfirmed: boolean;
	readonly arrivedAt: Date | null;
}

export interface Share {
	readonly count: number;
	readonly of: number;
}

export interface Measures {
	/** Follow-ups handed over in the period, entered twice left out. */
	readonly handedOver: number;
	readonly seenInsideWindow: Share;
	/** Not yet decided: not seen, and the window is still open. */
	readonly windowStillOpen: number;
	readonly confirmed: Share;
	readonly missed: Share;
	readonly reachedAfterMissed: Share;
	/** Hours from discharge to the first visit that was kept, in order. */
	readonly hoursToFirstVisit: readonly number[];
	readonly atOrOverLine: Share;
}

const HOUR = 3_600_000;
/** A visit that was moved or cancelled did not fall due. */
const FELL_DUE: readonly VisitState[] = ['booked', 'confirmed', 'arrived', 'missed'];

const firstKept = ({ visits }: MeasuredFollowUp): MeasuredVisit | undefined =>
	visits.find(({ state }) => state === 'arrived');

/** Seen in time: the first visit kept was one of the first round that had been booked inside its window. */
function isSeenInside(one: MeasuredFollowUp): boolean {
	const visit = firstKept(one);
	return visit !== undefined && visit.round === 1 && !visit.isOutsideWindow;
}

/** The first window still runs and nobody was seen: neither in time nor late yet. */
function isStillOpen(one: MeasuredFollowUp, now: Date): boolean {
	return (
		firstKept(one) === undefined &&
		one.outcome === null &&
		one.windowUntilAt !== null &&
		one.windowUntilAt > now
	);
}

function missedVisits(
	followUps: readonly MeasuredFollowUp[],
	now: Date
): Pick<Measures, 'confirmed' | 'missed' | 'reachedAfterMissed'> {
	let due = 0;
	let confirmed = 0;
	let missed = 0;
	let reached = 0;
	for (const { visits, reachedAt } of followUps) {
		for (const visit of visits) {
			if (!FELL_DUE.includes(visit.state) || visit.startsAt > now) continue;
			due++;
			if (visit.isConfirmed) confirmed++;
			if (visit.state !== 'missed') continue;
			missed++;
			const isReached = reachedAt.some((at) => at > visit.startsAt);
			const cameLater = visits.some(({ arrivedAt }) => arrivedAt !== null && arrivedAt > visit.startsAt);
			if (isReached || cameLater) reached++;
		}
	}
	return {
		confirmed: { count: confirmed, of: due },
		missed: { count: missed, of: due },
		reachedAfterMissed: { count: reached, of: missed }
	};
}

/**
 * The measures of a set of follow-ups handed over in one period (definitions: common practice, no source; no published
 * benchmark for follow-up inside the window was found). Example: ten handed over, one entered twice, two whose window
 * is still open, six seen inside: 6 of 7.
 */
export function measure(all: readonly MeasuredFollowUp[], now: Date): Measures {
	const followUps = all.filter(({ outcome }) => outcome !== 'entered-twice');
	const decided = followUps.filter((one) => !isStillOpen(one, now));
	const withValue = followUps.filter(({ firstVisitDifference }) => firstVisitDifference !== null);
	const hours = followUps.flatMap((one) => {
		const arrivedAt = firstKept(one)?.arrivedAt;
		return arrivedAt ? [(arrivedAt.getTime() - one.handedOverAt.getTime()) / HOUR] : [];
	});
	return {
		handedOver: followUps.length,
		seenInsideWindow: { count: decided.filter(isSeenInside).length, of: decided.length },
		windowStillOpen: followUps.length - decided.length,
		...missedVisits(followUps, now),
		hoursToFirstVisit: hours.filter((one) => one >= 0).sort((a, b) => a - b),
		atOrOverLine: {
			count: withValue.filter(({ firstVisitDifference }) => (firstVisitDifference ?? 1) <= 0).length,
			of: withValue.length
		}
	};
}

/** The middle value of a sorted list; null for an empty one. */
export function medianOf(sorted: readonly number[]): number | null {
	const middle = Math.floor(sorted.length / 2);
	const upper = sorted[middle];
	if (upper === undefined) return null;
	const lower = sorted[middle - 1];
	return sorted.length % 2 === 1 || lower === undefined ? upper : (lower + upper) / 2;
}

/** Percent, rounded; null of nothing. */
export const percentOf = ({ count, of }: Share): number | null =>
	of === 0 ? null : Math.round((count / of) * 100);

export interface Bar {
	readonly label: string;
	readonly count: number;
}

/** How many fall into each day after discharge; the last bar takes what is later. */
export function barsByDay(hours: readonly number[], lastDay = 6): Bar[] {
	return Array.from({ length: lastDay + 1 }, (_unused, day) => {
		const isLast = day === lastDay;
		const count = hours.filter((one) => one >= day * 24 && (isLast || one < (day + 1) * 24)).length;
		return { label: isLast ? `day ${day + 1} or later` : `day ${day + 1}`, count };
	});
}
