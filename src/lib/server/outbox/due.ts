import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Channel } from '../../domain/messaging/kinds';
import type { Reader } from '../db/client';
import { messages } from '../db/schema/messaging';

/** Planned messages of one site and priority, the oldest of which is due. */
export interface DueGroup {
	readonly priority: number;
	readonly siteId: string;
}

const rows = z.array(z.object({ priority: z.number(), siteId: z.string(), oldestAt: z.date() }));

/**
 * The groups that hold due messages, urgent ones first. One step in the claim index for each group, however many messages
 * wait (EXPLAIN: "Using index for group-by"), so an idle worker may ask every second.
 */
export async function findDueGroups(db: Reader, channel: Channel, now: Date): Promise<DueGroup[]> {
	const found = await dueGroupsQuery(db, channel);
	return rows.parse(found).filter(({ oldestAt }) => oldestAt <= now);
}

/** Grouped from the index's first column on, although two are constant: otherwise MariaDB reads every planned row. */
export const dueGroupsQuery = (db: Reader, channel: Channel) =>
	db
		.select({
			priority: messages.priority,
			siteId: messages.siteId,
			oldestAt: sql<Date>`min(${messages.runAt})`.mapWith(messages.runAt)
		})
		.from(messages)
		.where(sql`${messages.state} = 'planned' and ${messages.channel} = ${channel}`)
		.groupBy(messages.state, messages.channel, messages.priority, messages.siteId);
