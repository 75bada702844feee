import { and, asc, eq, max } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { attempts, checkIns, followUps, visits } from '../db/schema/follow-up';
import { carers, newborns } from '../db/schema/newborn';
import { sites } from '../db/schema/organisation';

export type FollowUpRow = typeof followUps.$inferSelect;
export type VisitRow = typeof visits.$inferSelect;
export type CarerRow = typeof carers.$inferSelect;
export type CheckInRow = typeof checkIns.$inferSelect;
export type NewbornRow = typeof newborns.$inferSelect;
export type SiteRow = typeof sites.$inferSelect;

/** Holds the follow-up for the rest of the transaction, so that two derivations of its plan run one after the other. */
export async function lockFollowUp(tx: Tx, followUpId: string): Promise<FollowUpRow | null> {
	const rows = await tx.select().from(followUps).where(eq(followUps.id, followUpId)).for('update');
	return rows[0] ?? null;
}

/** What the plan of one follow-up reads, in five queries. */
export async function loadPlanRows(db: Reader, followUp: FollowUpRow) {
	const [head] = await db
		.select({ newborn: newborns, clinic: sites })
		.from(newborns)
		.innerJoin(sites, eq(sites.id, followUp.clinicId))
		.where(eq(newborns.id, followUp.newbornId));
	const carerRows = await db
		.select()
		.from(carers)
		.where(eq(carers.newbornId, followUp.newbornId))
		.orderBy(asc(carers.callOrder));
	const visitRows = await db
		.select()
		.from(visits)
		.where(eq(visits.followUpId, followUp.id))
		.orderBy(asc(visits.bookedAt), asc(visits.id));
	const checkInRows = await db
		.select({
			id: checkIns.id,
			carerId: checkIns.carerId,
			result: checkIns.result,
			answeredAt: checkIns.answeredAt
		})
		.from(checkIns)
		.where(eq(checkIns.followUpId, followUp.id));
	const [reached] = await db
		.select({ at: max(attempts.at) })
		.from(attempts)
		.where(and(eq(attempts.followUpId, followUp.id), eq(attempts.outcome, 'reached')));
	const lastReachedAt = reached?.at ?? null;
	return head
		? { ...head, carers: carerRows, visits: visitRows, checkIns: checkInRows, lastReachedAt }
		: null;
}
