import { and, asc, gt, gte, ne, or } from 'drizzle-orm';
import type { Ctx } from '../context';
import { followUps } from '../db/schema/follow-up';
import { withTx } from '../db/tx';
import { replanMessages } from './message-plan';

const PAGE = 200;
const CLOSED_LATELY_MILLISECONDS = 3 * 86_400_000;

/**
 * Derives the plan of every follow-up that may still have messages. Each change of a follow-up does the same for itself; this
 * takes in what changes beside it: a site's quiet hours, a new kind of message, a restored backup.
 */
export async function deriveAll(ctx: Ctx): Promise<number> {
	const closedSince = new Date(ctx.clock.now().getTime() - CLOSED_LATELY_MILLISECONDS);
	let count = 0;
	for (let after = ''; ;) {
		const page = await ctx.db
			.select({ id: followUps.id })
			.from(followUps)
			.where(
				and(gt(followUps.id, after), or(ne(followUps.stage, 'closed'), gte(followUps.closedAt, closedSince)))
			)
			.orderBy(asc(followUps.id))
			.limit(PAGE);
		for (const { id } of page) await withTx(ctx.db, (tx) => replanMessages(tx, ctx, id));
		count += page.length;
		after = page.at(-1)?.id ?? '';
		if (page.length < PAGE) return count;
	}
}
