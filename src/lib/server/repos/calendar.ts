import { and, eq, gte, lt, lte } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { followUps, visits } from '../db/schema/follow-up';
import { newborns } from '../db/schema/newborn';
import { closedDays } from '../db/schema/organisation';

export interface Stretch {
	readonly clinicId: string;
	readonly from: Date;
	/** Exclusive. */
	readonly until: Date;
}

/** The places taken at a clinic in a stretch of time, with who took them; in no order. */
export function listTakenPlaces(db: Reader, { clinicId, from, until }: Stretch) {
	return db
		.select({
			visitId: visits.id,
			followUpId: visits.followUpId,
			startsAt: visits.startsAt,
			endsAt: visits.endsAt,
			kind: visits.kind,
			placeNumber: visits.placeNumber,
			state: visits.state,
			isOutsideWindow: visits.isOutsideWindow,
			familyName: newborns.familyName,
			givenName: newborns.givenName
		})
		.from(visits)
		.innerJoin(followUps, eq(followUps.id, visits.followUpId))
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(
			and(
				eq(visits.clinicId, clinicId),
				eq(visits.holdsPlace, true),
				gte(visits.startsAt, from),
				lt(visits.startsAt, until)
			)
		);
}

export type TakenPlaceRow = Awaited<ReturnType<typeof listTakenPlaces>>[number];

/** Closed days of a clinic between two local dates, both included. */
export function listClosedBetween(
	db: Reader,
	asked: { readonly clinicId: string; readonly from: string; readonly until: string }
) {
	return db
		.select({ on: closedDays.closedOn, reason: closedDays.reason })
		.from(closedDays)
		.where(
			and(
				eq(closedDays.siteId, asked.clinicId),
				gte(closedDays.closedOn, asked.from),
				lte(closedDays.closedOn, asked.until)
			)
		);
}
