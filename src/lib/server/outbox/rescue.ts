import { and, eq, inArray, lt, sql } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { messages } from '../db/schema/messaging';
import { withTx } from '../db/tx';
import { databaseNow } from './lease';
import type { Outbox } from './port';

const AT_ONCE = 500;
/** Stands in `last_error` of what was freed: no fault of the message, so it does not count as an attempt. */
export const WORKER_STOPPED = 'its worker stopped';

/**
 * Frees messages whose worker died or lost touch: their calls may have been made, so they become `unknown` and the provider
 * is asked once what it took has had time to show. A delivery report that came meanwhile is proof enough of the sending.
 */
export async function rescueAbandoned({ ctx, settings }: Outbox): Promise<number> {
	const now = ctx.clock.now();
	const askAt = new Date(now.getTime() + settings.settleSeconds * 1000);
	return withTx(ctx.db, async (tx) => {
		const ids = (await abandonedQuery(tx)).map(({ id }) => id);
		if (ids.length === 0) return 0;
		await tx
			.update(messages)
			.set({
				state: sql`if(${messages.providerId} is null, 'unknown', 'sent')`,
				sentAt: sql`if(${messages.providerId} is null, null, ${now})`,
				runAt: askAt,
				lockedBy: null,
				lockedUntil: null,
				lastError: WORKER_STOPPED,
				updatedAt: now
			})
			.where(inArray(messages.id, ids));
		return ids.length;
	});
}

export const abandonedQuery = (db: Reader) =>
	db
		.select({ id: messages.id })
		.from(messages, { forceIndex: 'messages_lease' })
		.where(and(eq(messages.state, 'sending'), lt(messages.lockedUntil, databaseNow)))
		.limit(AT_ONCE)
		.for('update', { skipLocked: true });
