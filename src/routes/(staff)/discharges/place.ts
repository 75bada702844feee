import { VISIT_KINDS, type VisitKind } from '$lib/domain/followup/visit';

/** Chosen when the visit is left to the clinic's desk. */
export const LEFT_TO_DESK = 'desk';

/** A place as the form carries it: `2026-03-05T14:00:00.000Z check`. */
export const placeValue = (startsAt: Date, kind: VisitKind): string => `${startsAt.toISOString()} ${kind}`;

/** The place that a form carries; null for none, for the desk, and for anything else. */
export function readPlace(value: string): { startsAt: Date; kind: VisitKind } | null {
	const [iso, word] = value.split(' ');
	const kind = VISIT_KINDS.find((one) => one === word);
	const startsAt = new Date(iso ?? '');
	return kind && !Number.isNaN(startsAt.getTime()) ? { startsAt, kind } : null;
}
