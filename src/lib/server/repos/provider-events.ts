import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { providerEvents } from '../db/schema/messaging';

export type ProviderEventRow = typeof providerEvents.$inferSelect;

/** Keeps what a provider told us; told twice, it is one event. */
export async function keepEvent(db: Reader, event: typeof providerEvents.$inferInsert): Promise<void> {
	await db
		.insert(providerEvents)
		.values(event)
		.onDuplicateKeyUpdate({ set: { id: sql`${providerEvents.id}` } });
}

export async function findEvent(db: Reader, eventKey: string): Promise<ProviderEventRow | null> {
	const [row] = await db
		.select()
		.from(providerEvents)
		.where(and(eq(providerEvents.provider, 'sms'), eq(providerEvents.eventKey, eventKey)));
	return row ?? null;
}

/** Events that were kept and not yet acted upon, oldest first. */
export async function listWaitingEvents(db: Reader, limit: number): Promise<ProviderEventRow[]> {
	return db
		.select()
		.from(providerEvents)
		.where(isNull(providerEvents.handledAt))
		.orderBy(asc(providerEvents.receivedAt))
		.limit(limit);
}

/** Holds an event while it is acted upon, so that two processes do not act on it together; null where it is done. */
export async function lockWaitingEvent(tx: Tx, id: string): Promise<ProviderEventRow | null> {
	const [row] = await tx
		.select()
		.from(providerEvents)
		.where(and(eq(providerEvents.id, id), isNull(providerEvents.handledAt)))
		.for('update', { skipLocked: true });
	return row ?? null;
}

export async function markHandled(tx: Reader, id: string, now: Date): Promise<void> {
	await tx.update(providerEvents).set({ handledAt: now }).where(eq(providerEvents.id, id));
}
