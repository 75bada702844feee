import { and, eq } from 'drizzle-orm';
import type { Tx } from '../db/client';
import { visits } from '../db/schema/follow-up';
import type { VisitRow } from './follow-ups';

/** Takes an open visit off the calendar; its place is free again. A visit that already ended is left as it is. */
export async function releaseVisit(
	tx: Tx,
	visit: VisitRow,
	{ state, at }: { readonly state: 'cancelled' | 'moved'; readonly at: Date }
): Promise<void> {
	const calendarSequence = state === 'cancelled' ? visit.calendarSequence + 1 : visit.calendarSequence;
	await tx
		.update(visits)
		.set({ state, holdsPlace: null, isOpen: null, endedAt: at, calendarSequence })
		.where(and(eq(visits.id, visit.id), eq(visits.isOpen, true)));
}
