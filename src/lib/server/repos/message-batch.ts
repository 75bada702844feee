import { and, eq, inArray, max } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { attempts, checkIns, followUps, visits } from '../db/schema/follow-up';
import { threadEntries } from '../db/schema/messaging';
import { carers, newborns } from '../db/schema/newborn';
import { organisations, sites } from '../db/schema/organisation';

/*
 * Readings for many messages at once: one query for each kind of record, however many messages are rendered together.
 */

export async function listHeads(db: Reader, followUpIds: readonly string[]) {
	if (followUpIds.length === 0) return [];
	return db
		.select()
		.from(followUps)
		.where(inArray(followUps.id, [...followUpIds]));
}

/** The sites that messages are sent for, with their organisation's name and emergency number. */
export async function listSitesOfMessages(db: Reader, siteIds: readonly string[]) {
	if (siteIds.length === 0) return [];
	return db
		.select({
			site: sites,
			organisationName: organisations.name,
			emergencyNumber: organisations.emergencyNumber
		})
		.from(sites)
		.innerJoin(organisations, eq(organisations.id, sites.organisationId))
		.where(inArray(sites.id, [...siteIds]));
}

export async function listVisitsOf(db: Reader, followUpIds: readonly string[]) {
	if (followUpIds.length === 0) return [];
	return db
		.select()
		.from(visits)
		.where(inArray(visits.followUpId, [...followUpIds]));
}

export async function listCarersByIds(db: Reader, ids: readonly string[]) {
	if (ids.length === 0) return [];
	return db
		.select()
		.from(carers)
		.where(inArray(carers.id, [...ids]));
}

export async function listLastCheckIns(db: Reader, followUpIds: readonly string[]) {
	if (followUpIds.length === 0) return [];
	return db
		.select({ followUpId: checkIns.followUpId, at: max(checkIns.answeredAt) })
		.from(checkIns)
		.where(inArray(checkIns.followUpId, [...followUpIds]))
		.groupBy(checkIns.followUpId);
}

export async function listLastReached(db: Reader, followUpIds: readonly string[]) {
	if (followUpIds.length === 0) return [];
	return db
		.select({ followUpId: attempts.followUpId, at: max(attempts.at) })
		.from(attempts)
		.where(and(inArray(attempts.followUpId, [...followUpIds]), eq(attempts.outcome, 'reached')))
		.groupBy(attempts.followUpId);
}

export async function listEntriesByIds(db: Reader, ids: readonly string[]) {
	if (ids.length === 0) return [];
	return db
		.select({ id: threadEntries.id, body: threadEntries.body, phone: threadEntries.phone })
		.from(threadEntries)
		.where(inArray(threadEntries.id, [...ids]));
}

/** What tells newborns of one family apart. */
export async function listNewbornMarks(db: Reader, followUpIds: readonly string[]) {
	if (followUpIds.length === 0) return [];
	return db
		.select({
			followUpId: followUps.id,
			givenName: newborns.givenName,
			bornAt: newborns.bornAt,
			birthTimeZone: newborns.birthTimeZone
		})
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(inArray(followUps.id, [...followUpIds]));
}
