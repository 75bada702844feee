import { and, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { SenderNews } from '../../domain/messaging/breaker';
import type { Reader, Tx } from '../db/client';
import { messages } from '../db/schema/messaging';
import { withTx } from '../db/tx';
import type { Called } from './call';
import { conclude } from './conclude';
import type { Outbox } from './port';

/**
 * Records the outcomes of calls, all in one transaction. Each statement names the claim, so a worker whose lease is over
 * changes nothing: what it sent is then found at the provider. Returns how many were no longer this worker's.
 */
export async function recordCalls(outbox: Outbox, called: readonly Called[]): Promise<number> {
	const { db } = outbox.ctx;
	const taken = called.filter(({ outcome }) => outcome.kind === 'accepted');
	// Nearly always all were taken: one statement for each claim, which is a transaction by itself.
	if (taken.length === called.length) return taken.length - (await recordSent(db, outbox, taken));
	const unknown = called.filter(({ outcome }) => outcome.kind === 'unknown');
	return withTx(db, async (tx) => {
		const kept = (await recordSent(tx, outbox, taken)) + (await recordUnknown(tx, outbox, unknown));
		for (const one of called) await recordFailure(tx, outbox, one);
		return taken.length + unknown.length - kept;
	});
}

async function recordSent(tx: Reader, { ctx }: Outbox, called: readonly Called[]): Promise<number> {
	const now = ctx.clock.now();
	return byClaim(called, async (batch, isOurs) => {
		const [{ affectedRows }] = await tx
			.update(messages)
			.set({
				state: 'sent',
				providerId: providerIds(batch),
				sentAt: now,
				// A text message owes its proof; a mail server's yes is all the proof there is for mail.
				unprovenSince: sql`if(${messages.channel} = 'sms' and ${messages.followUpId} is not null and coalesce(${messages.delivery}, '') not in ('delivered', 'read'), ${now}, null)`,
				lockedBy: null,
				lockedUntil: null,
				updatedAt: now
			})
			.where(isOurs);
		return affectedRows;
	});
}

async function recordUnknown(tx: Tx, { ctx, settings }: Outbox, called: readonly Called[]): Promise<number> {
	const now = ctx.clock.now();
	const askAt = new Date(now.getTime() + settings.settleSeconds * 1000);
	return byClaim(called, async (batch, isOurs) => {
		const [first] = batch;
		const reason = first?.outcome.kind === 'unknown' ? first.outcome.reason : 'unknown';
		const [{ affectedRows }] = await tx
			.update(messages)
			.set({
				state: 'unknown',
				runAt: askAt,
				lastError: reason,
				lockedBy: null,
				lockedUntil: null,
				updatedAt: now
			})
			.where(isOurs);
		return affectedRows;
	});
}

async function recordFailure(tx: Tx, outbox: Outbox, { held, outcome }: Called): Promise<void> {
	const known = { row: held.row, holds: heldBy(held.token) };
	if (outcome.kind === 'refused') await conclude.dead(tx, outbox, known, { reason: outcome.reason });
	if (outcome.kind === 'not-taken') {
		await conclude.failed(tx, outbox, known, { ...outcome, isCounted: outcome.blame !== 'pace' });
	}
}

const heldBy = (token: string): SQL | undefined =>
	and(eq(messages.state, 'sending'), eq(messages.lockedBy, token));

async function byClaim(
	called: readonly Called[],
	update: (batch: readonly Called[], isOurs: SQL | undefined) => Promise<number>
): Promise<number> {
	let changed = 0;
	for (const token of new Set(called.map(({ held }) => held.token))) {
		const batch = called.filter(({ held }) => held.token === token);
		const ids = batch.map(({ held }) => held.row.id);
		changed += await update(batch, and(inArray(messages.id, ids), heldBy(token)));
	}
	return changed;
}

function providerIds(batch: readonly Called[]): SQL {
	const cases = batch.map(({ held, outcome }) =>
		outcome.kind === 'accepted' ? sql`when ${held.row.id} then ${outcome.providerId}` : sql``
	);
	return sql`case ${messages.id} ${sql.join(cases, sql` `)} end`;
}

/** What a batch of calls says about the provider itself. A refused message is an answer, so the provider is well. */
export function newsOf(called: readonly Called[]): SenderNews {
	let successes = 0;
	let failures = 0;
	let pauseSeconds = 0;
	for (const { outcome } of called) {
		if (outcome.kind === 'accepted' || outcome.kind === 'refused') successes++;
		else if (outcome.kind === 'unknown') failures++;
		else if (outcome.blame === 'provider') failures++;
		else if (outcome.blame === 'pace') pauseSeconds = Math.max(pauseSeconds, outcome.retryAfterSeconds ?? 1);
		else successes++;
	}
	return { successes, failures, pauseSeconds };
}
