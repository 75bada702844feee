import { and, eq, lte } from 'drizzle-orm';
import type { Channel } from '../../domain/messaging/kinds';
import type { Reader, Tx } from '../db/client';
import { messages } from '../db/schema/messaging';
import type { DueGroup } from './due';
import type { MessageRow } from './port';

export interface ClaimWish {
	readonly channel: Channel;
	readonly limit: number;
	readonly now: Date;
	/** 0 to 1: which site is served first this time. */
	readonly fraction: number;
}

/**
 * Locks up to `limit` due messages, urgent ones first and within a priority an equal share for each site; a site that has
 * less leaves its rest to the others. What another worker has locked is passed over, not waited for.
 */
export async function lockDue(tx: Tx, groups: readonly DueGroup[], wish: ClaimWish): Promise<MessageRow[]> {
	const locked: MessageRow[] = [];
	for (const sites of byPriority(groups, wish.fraction)) {
		for (const [index, group] of sites.entries()) {
			const share = Math.ceil((wish.limit - locked.length) / (sites.length - index));
			if (share > 0) locked.push(...(await lockGroupQuery(tx, group, { ...wish, limit: share })));
		}
	}
	return locked;
}

/** Every condition but the last is an equality of the claim index, the last its next column, and so is the order. */
export const lockGroupQuery = (db: Reader, group: DueGroup, { channel, limit, now }: ClaimWish) =>
	db
		.select()
		.from(messages, { forceIndex: 'messages_claim' })
		.where(
			and(
				eq(messages.state, 'planned'),
				eq(messages.channel, channel),
				eq(messages.priority, group.priority),
				eq(messages.siteId, group.siteId),
				lte(messages.runAt, now)
			)
		)
		.orderBy(messages.runAt, messages.id)
		.limit(limit)
		.for('update', { skipLocked: true });

/** Groups of one priority together, urgent first, each turned so that every site comes first in its turn. */
function byPriority(groups: readonly DueGroup[], fraction: number): DueGroup[][] {
	const priorities = [...new Set(groups.map(({ priority }) => priority))].sort((a, b) => a - b);
	return priorities.map((priority) => {
		const sites = groups.filter((group) => group.priority === priority);
		const first = Math.floor(fraction * sites.length);
		return [...sites.slice(first), ...sites.slice(0, first)];
	});
}
