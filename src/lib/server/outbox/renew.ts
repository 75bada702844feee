import { and, eq, inArray } from 'drizzle-orm';
import type { Db } from '../db/client';
import { messages } from '../db/schema/messaging';
import { databaseIn, type Lease } from './lease';

/** Prolongs the claim on messages still in hand. Returns the ids that are no longer ours; their calls must not be made. */
export async function renewLease(db: Db, lease: Lease, ids: readonly string[]): Promise<ReadonlySet<string>> {
	const began = performance.now();
	const isOurs = and(
		inArray(messages.id, [...ids]),
		eq(messages.state, 'sending'),
		eq(messages.lockedBy, lease.token)
	);
	const [{ affectedRows }] = await db
		.update(messages)
		.set({ lockedUntil: databaseIn(lease.seconds) })
		.where(isOurs);
	lease.renewed(began);
	if (affectedRows === ids.length) return new Set();
	// Recorded in the meantime, or lost: only the rows can tell.
	const ours = await db.select({ id: messages.id }).from(messages).where(isOurs);
	const kept = new Set(ours.map(({ id }) => id));
	return new Set(ids.filter((id) => !kept.has(id)));
}
