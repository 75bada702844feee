import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { MessageState } from '../../domain/messaging/kinds';
import type { PlannedMessage } from '../../domain/messaging/plan-facts';
import type { Reader, Tx } from '../db/client';
import { messages } from '../db/schema/messaging';

export type MessageRow = typeof messages.$inferSelect;
export type NewMessage = typeof messages.$inferInsert;

/** Every message of one follow-up, oldest first. */
export async function listMessages(db: Reader, followUpId: string): Promise<MessageRow[]> {
	return db
		.select()
		.from(messages)
		.where(eq(messages.followUpId, followUpId))
		.orderBy(asc(messages.runAt), asc(messages.id));
}

/** Adds messages; one whose dedupe key exists already is left as it is. */
export async function insertMessages(tx: Tx, rows: readonly NewMessage[]): Promise<void> {
	if (rows.length === 0) return;
	await tx
		.insert(messages)
		.values([...rows])
		.onDuplicateKeyUpdate({ set: { id: sql`${messages.id}` } });
}

const untouched = and(eq(messages.state, 'planned'), isNull(messages.callBeganAt));

/** Withdraws what still waits; a message that a worker holds is checked again by it before it is sent. */
export async function withdrawMessages(
	tx: Tx,
	ids: readonly string[],
	reason: string,
	now: Date
): Promise<void> {
	if (ids.length === 0) return;
	await tx
		.update(messages)
		.set({ state: 'withdrawn', lastError: reason, updatedAt: now })
		.where(and(inArray(messages.id, [...ids]), untouched));
}

/** Gives a message that waits, or was withdrawn without ever being tried, the plan's present times. */
export async function replanMessage(
	tx: Tx,
	id: string,
	from: Extract<MessageState, 'planned' | 'withdrawn'>,
	plan: Pick<PlannedMessage, 'runAt' | 'expiresAt' | 'priority' | 'language' | 'facts'> & {
		readonly siteId: string;
	},
	now: Date
): Promise<void> {
	const { runAt, expiresAt, priority, language, facts, siteId } = plan;
	await tx
		.update(messages)
		.set({
			state: 'planned',
			runAt,
			expiresAt,
			priority,
			language,
			facts: { ...facts },
			siteId,
			lastError: null,
			updatedAt: now
		})
		.where(
			and(
				eq(messages.id, id),
				eq(messages.state, from),
				isNull(messages.callBeganAt),
				isNull(messages.sentAt)
			)
		);
}

/** True where a message with this key exists, whatever became of it. */
export async function isPlanned(db: Reader, dedupeKey: string): Promise<boolean> {
	const rows = await db
		.select({ id: messages.id })
		.from(messages)
		.where(eq(messages.dedupeKey, dedupeKey))
		.limit(1);
	return rows.length > 0;
}
