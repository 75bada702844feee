import { and, asc, eq, gte, inArray, isNotNull, isNull, lt, lte, ne, or, type SQL, sql } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { alerts, followUps } from '../db/schema/follow-up';
import { messages, senders, ticks, watchFindings, workers } from '../db/schema/messaging';
import { sites } from '../db/schema/organisation';

export type FindingRow = typeof watchFindings.$inferSelect;

const MINUTE = 60_000;
const DEFAULT_CLIMB_MINUTES = 30;
const AT_MOST = 500;

const before = (now: Date, minutes: number): Date => new Date(now.getTime() - minutes * MINUTE);

/** A due time and so many of the site's climbs are over: everybody above has had a turn. */
const isBeyond = (
	dueAt: SQL | typeof followUps.nextStepDueAt | typeof alerts.dueAt,
	now: Date,
	climbs: number
) =>
	sql`${dueAt} <= date_sub(${now}, interval ${climbs} * coalesce(json_value(${sites.policy}, '$.climbMinutes'), ${DEFAULT_CLIMB_MINUTES}) minute)`;

export async function listWithoutNextStep(db: Reader) {
	return db
		.select({ id: followUps.id, siteId: followUps.clinicId })
		.from(followUps)
		.where(
			and(ne(followUps.stage, 'closed'), or(isNull(followUps.nextStep), isNull(followUps.nextStepDueAt)))
		)
		.limit(AT_MOST);
}

export async function listStepsBeyond(db: Reader, now: Date, climbs: number) {
	return db
		.select({ id: followUps.id, siteId: sites.id, what: followUps.nextStep, dueAt: followUps.nextStepDueAt })
		.from(followUps)
		.innerJoin(sites, eq(sites.id, followUps.nextStepSiteId))
		.where(and(ne(followUps.stage, 'closed'), isBeyond(followUps.nextStepDueAt, now, climbs)))
		.orderBy(asc(followUps.nextStepDueAt))
		.limit(AT_MOST);
}

export async function listAlertsBeyond(db: Reader, now: Date, climbs: number) {
	return db
		.select({ id: alerts.id, siteId: sites.id, what: alerts.kind, dueAt: alerts.dueAt })
		.from(alerts)
		.innerJoin(sites, eq(sites.id, alerts.siteId))
		.where(and(isNull(alerts.settledAt), isBeyond(alerts.dueAt, now, climbs)))
		.orderBy(asc(alerts.dueAt))
		.limit(AT_MOST);
}

/** Messages of each site that ought to have moved on: due and not taken, held past every lease, or of unknown fate. */
export async function countStuck(db: Reader, now: Date) {
	const isStuck = or(
		and(eq(messages.state, 'planned'), lte(messages.runAt, before(now, 10))),
		and(eq(messages.state, 'sending'), lt(messages.lockedUntil, sql`utc_timestamp(3) - interval 3 minute`)),
		and(eq(messages.state, 'unknown'), lt(messages.callBeganAt, sql`utc_timestamp(3) - interval 15 minute`))
	);
	return db
		.select({
			siteId: messages.siteId,
			count: sql<number>`count(*)`.mapWith(Number),
			oldestAt: sql`min(${messages.runAt})`.mapWith(messages.runAt)
		})
		.from(messages)
		.where(and(inArray(messages.state, ['planned', 'sending', 'unknown']), isStuck))
		.groupBy(messages.siteId);
}

/** Workers that neither signed off nor were heard from; one that is gone for an hour has been replaced or is missed by health. */
export async function listSilentWorkers(db: Reader, now: Date) {
	return db
		.select({ id: workers.id, heardAt: workers.heardAt })
		.from(workers)
		.where(
			and(
				isNull(workers.stoppedAt),
				lt(workers.heardAt, before(now, 2)),
				gte(workers.heardAt, before(now, 60))
			)
		);
}

export async function listTroubledTicks(db: Reader, now: Date) {
	return db
		.select()
		.from(ticks)
		.where(or(isNotNull(ticks.lastError), lt(ticks.lastRunAt, before(now, 60))));
}

export async function listBrokenSenders(db: Reader, failures: number) {
	return db.select().from(senders).where(gte(senders.failuresInARow, failures));
}

export async function listOpenFindingRows(tx: Tx): Promise<FindingRow[]> {
	return tx.select().from(watchFindings).where(isNull(watchFindings.settledAt));
}

export async function insertFindings(
	tx: Tx,
	rows: readonly (typeof watchFindings.$inferInsert)[]
): Promise<void> {
	if (rows.length > 0) await tx.insert(watchFindings).values([...rows]);
}

export async function settleFindings(tx: Tx, ids: readonly string[], now: Date): Promise<void> {
	if (ids.length === 0) return;
	await tx
		.update(watchFindings)
		.set({ settledAt: now })
		.where(inArray(watchFindings.id, [...ids]));
}

export async function listDutyAddresses(db: Reader): Promise<{ id: string; dutyEmail: string }[]> {
	return db.select({ id: sites.id, dutyEmail: sites.dutyEmail }).from(sites).orderBy(asc(sites.id));
}
