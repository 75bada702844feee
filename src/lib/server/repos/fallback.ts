import { and, asc, eq, inArray, isNotNull, ne, or, sql } from 'drizzle-orm';
import { REFUSED_STATUSES } from '../../domain/messaging/delivery';
import type { Reader, Tx } from '../db/client';
import { followUps } from '../db/schema/follow-up';
import { messages } from '../db/schema/messaging';
import { carers } from '../db/schema/newborn';
import { sites } from '../db/schema/organisation';
import type { CarerRow } from './message-facts';
import type { MessageRow } from './messages';

const DEFAULT_MINUTES = 30;

/**
 * Messages that did not arrive: given up by us or by the provider at once, without any report once the site's limit has
 * passed. Oldest first.
 */
export async function listUnproven(db: Reader, now: Date, limit: number): Promise<string[]> {
	const minutes = sql`coalesce(json_value(${sites.policy}, '$.smsUndeliveredMinutes'), ${DEFAULT_MINUTES})`;
	const rows = await db
		.select({ id: messages.id })
		.from(messages)
		.innerJoin(sites, eq(sites.id, messages.siteId))
		.where(
			and(
				isNotNull(messages.unprovenSince),
				or(
					eq(messages.state, 'dead'),
					inArray(messages.delivery, [...REFUSED_STATUSES]),
					sql`${messages.unprovenSince} <= date_sub(${now}, interval ${minutes} minute)`
				)
			)
		)
		.orderBy(asc(messages.unprovenSince))
		.limit(limit);
	return rows.map(({ id }) => id);
}

/** Holds the message while its next way is chosen; null when that has been done. */
export async function lockUnproven(tx: Tx, id: string): Promise<MessageRow | null> {
	const [row] = await tx
		.select()
		.from(messages)
		.where(and(eq(messages.id, id), isNotNull(messages.unprovenSince)))
		.for('update');
	return row ?? null;
}

/** Every message of the same kind and occasion, over whatever way. */
export async function listSameMessages(
	tx: Tx,
	{ followUpId, kind, occasion }: MessageRow
): Promise<MessageRow[]> {
	if (followUpId === null) return [];
	return tx
		.select()
		.from(messages)
		.where(
			and(
				eq(messages.followUpId, followUpId),
				eq(messages.kind, kind),
				eq(messages.occasion, occasion),
				ne(messages.state, 'withdrawn')
			)
		);
}

export async function listCarersOf(tx: Tx, followUpId: string): Promise<CarerRow[]> {
	const rows = await tx
		.select({ carer: carers })
		.from(carers)
		.innerJoin(followUps, eq(followUps.newbornId, carers.newbornId))
		.where(eq(followUps.id, followUpId));
	return rows.map(({ carer }) => carer);
}

export async function settleUnproven(tx: Tx, id: string, now: Date, fellBackAt: Date | null): Promise<void> {
	await tx
		.update(messages)
		.set({ unprovenSince: null, fellBackAt, updatedAt: now })
		.where(eq(messages.id, id));
}
