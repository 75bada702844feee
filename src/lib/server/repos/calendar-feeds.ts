import { and, asc, desc, eq, gte, inArray, isNull, lt } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { followUps, visits } from '../db/schema/follow-up';
import { calendarFeeds } from '../db/schema/messaging';
import { newborns } from '../db/schema/newborn';
import { sites } from '../db/schema/organisation';

export async function insertFeed(tx: Tx, row: typeof calendarFeeds.$inferInsert): Promise<void> {
	await tx.insert(calendarFeeds).values(row);
}

/** A person's feeds that still work, oldest first. */
export async function listFeeds(db: Reader, staffId: string) {
	return db
		.select({
			id: calendarFeeds.id,
			siteId: calendarFeeds.siteId,
			siteName: sites.name,
			createdAt: calendarFeeds.createdAt
		})
		.from(calendarFeeds)
		.innerJoin(sites, eq(sites.id, calendarFeeds.siteId))
		.where(and(eq(calendarFeeds.staffId, staffId), isNull(calendarFeeds.revokedAt)))
		.orderBy(asc(calendarFeeds.createdAt), asc(calendarFeeds.id));
}

/** Ends one of the person's own feeds; false where there is no such feed. */
export async function revokeFeed(
	tx: Tx,
	{ id, staffId, now }: { id: string; staffId: string; now: Date }
): Promise<boolean> {
	const [result] = await tx
		.update(calendarFeeds)
		.set({ revokedAt: now })
		.where(
			and(eq(calendarFeeds.id, id), eq(calendarFeeds.staffId, staffId), isNull(calendarFeeds.revokedAt))
		);
	return result.affectedRows === 1;
}

export async function findFeedByHash(db: Reader, tokenHash: string) {
	const [row] = await db
		.select({ feed: calendarFeeds, site: sites })
		.from(calendarFeeds)
		.innerJoin(sites, eq(sites.id, calendarFeeds.siteId))
		.where(and(eq(calendarFeeds.tokenHash, tokenHash), isNull(calendarFeeds.revokedAt)))
		.limit(1);
	return row ?? null;
}

/** A clinic's visits that stand, and those that were cancelled, in a stretch of time; a moved visit is in its new place only. */
export async function listFeedVisits(
	db: Reader,
	clinicId: string,
	stretch: { readonly from: Date; readonly until: Date }
) {
	return db
		.select({ visit: visits, givenName: newborns.givenName, familyName: newborns.familyName })
		.from(visits)
		.innerJoin(followUps, eq(followUps.id, visits.followUpId))
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(
			and(
				eq(visits.clinicId, clinicId),
				inArray(visits.state, ['booked', 'confirmed', 'arrived', 'missed', 'cancelled']),
				gte(visits.startsAt, stretch.from),
				lt(visits.startsAt, stretch.until)
			)
		)
		.orderBy(asc(visits.startsAt), asc(visits.id));
}

/** The visit that a family's calendar should show: the last one that was made, with its clinic. */
export async function findLatestVisit(db: Reader, followUpId: string) {
	const [row] = await db
		.select({ visit: visits, clinic: sites })
		.from(visits)
		.innerJoin(sites, eq(sites.id, visits.clinicId))
		.where(
			and(eq(visits.followUpId, followUpId), inArray(visits.state, ['booked', 'confirmed', 'cancelled']))
		)
		.orderBy(desc(visits.bookedAt), desc(visits.calendarSequence))
		.limit(1);
	return row ?? null;
}
