import { and, asc, count, desc, eq, gte, inArray, isNull, lte, min, or, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Channel, MessageKind, MessageState } from '../../domain/messaging/kinds';
import type { Reader } from '../db/client';
import { messages, senders, ticks, watchFindings, workers } from '../db/schema/messaging';
import { sites } from '../db/schema/organisation';

export type Worker = typeof workers.$inferSelect;
export type Tick = typeof ticks.$inferSelect;
export type Sender = typeof senders.$inferSelect;
export type WatchFinding = typeof watchFindings.$inferSelect;

/** Workers heard from since then, newest first. */
export async function listWorkers(db: Reader, since: Date): Promise<Worker[]> {
	return db.select().from(workers).where(gte(workers.heardAt, since)).orderBy(desc(workers.heardAt));
}

/** When any worker that has not stopped was last heard from. */
export async function lastHeardAt(db: Reader): Promise<Date | null> {
	const [row] = await db
		.select({ heardAt: workers.heardAt })
		.from(workers)
		.where(isNull(workers.stoppedAt))
		.orderBy(desc(workers.heardAt))
		.limit(1);
	return row?.heardAt ?? null;
}

export async function listTicks(db: Reader): Promise<Tick[]> {
	return db.select().from(ticks).orderBy(asc(ticks.name));
}

/** Senders that are paused or have failed lately. */
export async function listTroubledSenders(db: Reader, now: Date): Promise<Sender[]> {
	return db
		.select()
		.from(senders)
		.where(or(gte(senders.pausedUntil, now), gte(senders.failuresInARow, 1)));
}

/** Messages by state, of the whole product or of some sites. */
export async function countMessages(
	db: Reader,
	siteIds?: readonly string[]
): Promise<{ state: MessageState; count: number }[]> {
	return db
		.select({ state: messages.state, count: count() })
		.from(messages)
		.where(siteIds ? inArray(messages.siteId, [...siteIds]) : undefined)
		.groupBy(messages.state);
}

/** How many messages are due and not yet claimed, and since when the oldest of them waits. */
export async function dueMessages(db: Reader, now: Date): Promise<{ count: number; oldestAt: Date | null }> {
	const [row] = await db
		.select({ count: count(), oldestAt: min(messages.runAt) })
		.from(messages)
		.where(and(eq(messages.state, 'planned'), lte(messages.runAt, now)));
	return { count: row?.count ?? 0, oldestAt: row?.oldestAt ?? null };
}

export interface DeadMessage {
	readonly id: string;
	readonly kind: MessageKind;
	readonly channel: Channel;
	readonly siteName: string;
	readonly attempts: number;
	readonly lastError: string | null;
	readonly updatedAt: Date;
}

/** Messages that were given up, newest first: no address and no words. */
export async function listDeadMessages(
	db: Reader,
	siteIds: readonly string[],
	limit: number
): Promise<DeadMessage[]> {
	if (siteIds.length === 0) return [];
	return db
		.select({
			id: messages.id,
			kind: messages.kind,
			channel: messages.channel,
			siteName: sites.name,
			attempts: messages.attempts,
			lastError: messages.lastError,
			updatedAt: messages.updatedAt
		})
		.from(messages)
		.innerJoin(sites, eq(sites.id, messages.siteId))
		.where(and(eq(messages.state, 'dead'), inArray(messages.siteId, [...siteIds])))
		.orderBy(desc(messages.updatedAt))
		.limit(limit);
}

export async function listOpenFindings(db: Reader, limit: number): Promise<WatchFinding[]> {
	return db
		.select()
		.from(watchFindings)
		.where(isNull(watchFindings.settledAt))
		.orderBy(desc(watchFindings.foundAt))
		.limit(limit);
}

export async function countOpenFindings(db: Reader): Promise<number> {
	const [row] = await db
		.select({ count: count() })
		.from(watchFindings)
		.where(isNull(watchFindings.settledAt));
	return row?.count ?? 0;
}

/** When the newest migration that the database has was made (milliseconds since 1970); null without any. */
export async function newestMigration(db: Reader): Promise<number | null> {
	const [rows] = await db.execute(sql`select max(created_at) as newest from __drizzle_migrations`);
	const parsed = z.array(z.object({ newest: z.coerce.number().nullable() })).safeParse(rows);
	return parsed.success ? (parsed.data[0]?.newest ?? null) : null;
}
