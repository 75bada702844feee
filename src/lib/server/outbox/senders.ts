import { eq } from 'drizzle-orm';
import {
	afterCalls,
	grantCalls,
	isUnbroken,
	type SenderNews,
	type SenderState
} from '../../domain/messaging/breaker';
import type { Channel } from '../../domain/messaging/kinds';
import type { Reader, Tx } from '../db/client';
import { senders } from '../db/schema/messaging';
import { withTx } from '../db/tx';
import type { Outbox } from './port';

const FRESH: SenderState = { pausedUntil: null, failuresInARow: 0, rateFreeAt: null };

/**
 * How many of `wanted` calls this worker may make now, by the sender's rate and breaker, which all workers share. The row is
 * locked only when there is something to count, and never while messages are.
 */
export async function reserveCalls(
	outbox: Outbox,
	channel: Channel,
	wanted: number
): Promise<{ readonly granted: number; readonly isUnbroken: boolean }> {
	const { ctx, settings } = outbox;
	const perSecond = settings.perSecond[channel];
	const now = ctx.clock.now();
	const seen = await findSender(ctx.db, channel);
	const known = { isUnbroken: isUnbroken(seen) && seen.failuresInARow === 0 };
	if (perSecond === null && isUnbroken(seen)) return { granted: wanted, ...known };
	if (seen.pausedUntil !== null && seen.pausedUntil > now) return { granted: 0, ...known };
	const probeSeconds = settings.callSeconds + settings.breakerSeconds;
	return withTx(ctx.db, async (tx) => {
		const sender = await lockSender(tx, channel);
		const { granted, next } = grantCalls(sender, wanted, now, { perSecond, probeSeconds });
		await saveSender(tx, channel, next);
		return { granted, ...known };
	});
}

/** Tells all workers how a batch of calls went. Returns until when nobody should call; null when calls may go on. */
export async function reportCalls(outbox: Outbox, channel: Channel, news: SenderNews): Promise<Date | null> {
	const { ctx, settings } = outbox;
	const now = ctx.clock.now();
	const fraction = ctx.random.fraction();
	const next = await withTx(ctx.db, async (tx) => {
		const sender = await lockSender(tx, channel);
		const after = afterCalls(sender, news, { now, fraction, openSeconds: settings.breakerSeconds });
		await saveSender(tx, channel, after);
		return after;
	});
	return next.pausedUntil !== null && next.pausedUntil > now ? next.pausedUntil : null;
}

async function findSender(db: Reader, channel: Channel): Promise<SenderState> {
	const [row] = await db.select().from(senders).where(eq(senders.id, channel));
	return row ?? FRESH;
}

/** The row is made first where there is none: a lock on nothing would let two workers have the same calls. */
async function lockSender(tx: Tx, channel: Channel): Promise<SenderState> {
	const locked = () => tx.select().from(senders).where(eq(senders.id, channel)).for('update');
	const [row] = await locked();
	if (row !== undefined) return row;
	await tx.insert(senders).ignore().values({ id: channel });
	return (await locked())[0] ?? FRESH;
}

async function saveSender(tx: Tx, channel: Channel, state: SenderState): Promise<void> {
	const { pausedUntil, failuresInARow, rateFreeAt } = state;
	const values = { pausedUntil, failuresInARow, rateFreeAt };
	await tx.update(senders).set(values).where(eq(senders.id, channel));
}
