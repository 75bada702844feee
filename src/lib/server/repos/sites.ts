import { and, asc, eq, gt, gte } from 'drizzle-orm';
import type { StandardId } from '../../domain/guideline/types';
import type { VisitKind } from '../../domain/followup/visit';
import type { Reader, Tx } from '../db/client';
import { visits } from '../db/schema/follow-up';
import { closedDays, openings, organisations, sites } from '../db/schema/organisation';

export type Site = typeof sites.$inferSelect;
export type OpeningRow = typeof openings.$inferSelect;
export type ClosedDay = typeof closedDays.$inferSelect;
export type Organisation = typeof organisations.$inferSelect;

export async function findOrganisation(db: Reader, id: string): Promise<Organisation | null> {
	const [row] = await db.select().from(organisations).where(eq(organisations.id, id)).limit(1);
	return row ?? null;
}

/** Holds the organisation's row until the transaction ends, so that changes of its people come one after another. */
export async function lockOrganisation(tx: Tx, id: string): Promise<void> {
	await tx.select({ id: organisations.id }).from(organisations).where(eq(organisations.id, id)).for('update');
}

export async function updateStandard(tx: Tx, organisationId: string, standard: StandardId): Promise<void> {
	await tx.update(organisations).set({ standard }).where(eq(organisations.id, organisationId));
}

/** Birth units first, then clinics, by name. */
export async function listSites(db: Reader, organisationId: string): Promise<Site[]> {
	return db
		.select()
		.from(sites)
		.where(eq(sites.organisationId, organisationId))
		.orderBy(asc(sites.kind), asc(sites.name));
}

export async function findSite(db: Reader, organisationId: string, siteId: string): Promise<Site | null> {
	const [row] = await db
		.select()
		.from(sites)
		.where(and(eq(sites.id, siteId), eq(sites.organisationId, organisationId)))
		.limit(1);
	return row ?? null;
}

/** The site with its row held, so that two changes of its openings cannot pass each other. */
export async function lockSite(tx: Tx, organisationId: string, siteId: string): Promise<Site | null> {
	const [row] = await tx
		.select()
		.from(sites)
		.where(and(eq(sites.id, siteId), eq(sites.organisationId, organisationId)))
		.for('update');
	return row ?? null;
}

export async function insertSite(tx: Tx, row: typeof sites.$inferInsert): Promise<void> {
	await tx.insert(sites).values(row);
}

export async function updateSite(
	tx: Tx,
	siteId: string,
	set: Partial<Omit<Site, 'id' | 'organisationId' | 'kind' | 'createdAt'>>
): Promise<void> {
	await tx.update(sites).set(set).where(eq(sites.id, siteId));
}

export async function listOpenings(db: Reader, siteId: string): Promise<OpeningRow[]> {
	return db
		.select()
		.from(openings)
		.where(and(eq(openings.siteId, siteId), eq(openings.isActive, true)))
		.orderBy(asc(openings.weekday), asc(openings.from));
}

export async function insertOpening(tx: Tx, row: typeof openings.$inferInsert): Promise<void> {
	await tx.insert(openings).values(row);
}

/** Takes an opening out of use; its row stays, so that the past can be explained. */
export async function retireOpening(tx: Tx, id: string): Promise<void> {
	await tx.update(openings).set({ isActive: false }).where(eq(openings.id, id));
}

/** Closed days from a local date on. */
export async function listClosedDays(db: Reader, siteId: string, from: string): Promise<ClosedDay[]> {
	return db
		.select()
		.from(closedDays)
		.where(and(eq(closedDays.siteId, siteId), gte(closedDays.closedOn, from)))
		.orderBy(asc(closedDays.closedOn));
}

export async function insertClosedDay(tx: Tx, row: typeof closedDays.$inferInsert): Promise<void> {
	await tx.insert(closedDays).values(row);
}

/** False where the day was not closed. */
export async function deleteClosedDay(tx: Tx, siteId: string, id: string): Promise<boolean> {
	const [result] = await tx
		.delete(closedDays)
		.where(and(eq(closedDays.id, id), eq(closedDays.siteId, siteId)));
	return result.affectedRows > 0;
}

/** The visits still to come at a clinic: when they start and of which kind. */
export async function listComingVisits(
	db: Reader,
	siteId: string,
	now: Date
): Promise<{ startsAt: Date; kind: VisitKind }[]> {
	return db
		.select({ startsAt: visits.startsAt, kind: visits.kind })
		.from(visits)
		.where(and(eq(visits.clinicId, siteId), gt(visits.startsAt, now), eq(visits.isOpen, true)));
}
