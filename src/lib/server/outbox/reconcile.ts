import { and, eq, inArray, isNull, lt, lte, or } from 'drizzle-orm';
import { smsReferenceSuffix, mailReferenceOf } from '../../domain/messaging/reference';
import type { Reader, Tx } from '../db/client';
import { messages } from '../db/schema/messaging';
import { withTx } from '../db/tx';
import type { Lookup } from '../providers/call';
import { conclude, type Failure } from './conclude';
import { applyDelivery } from './delivery';
import { databaseIn, databaseNow } from './lease';
import type { MessageRow, Outbox } from './port';
import { WORKER_STOPPED } from './rescue';

const AT_ONCE = 40;
const SIDE_BY_SIDE = 8;

/**
 * Asks the provider about messages whose answer was lost: found means sent, absent means it may be tried again. Until the
 * provider has answered, nothing is sent. Returns how many were asked about.
 */
export async function reconcileUnknown(outbox: Outbox): Promise<number> {
	const token = `${outbox.workerId}/r${outbox.ctx.random.id()}`;
	const rows = await holdUnknown(outbox, token);
	for (let start = 0; start < rows.length; start += SIDE_BY_SIDE) {
		const some = rows.slice(start, start + SIDE_BY_SIDE);
		await Promise.all(some.map(async (row) => settle(outbox, row, token, await lookUp(outbox, row))));
	}
	return rows.length;
}

/** Rows stay `unknown` while they are asked about; the short lease only keeps two workers from asking at once. */
async function holdUnknown(outbox: Outbox, token: string): Promise<MessageRow[]> {
	const { ctx, settings } = outbox;
	const seconds = settings.callSeconds * 2 * (AT_ONCE / SIDE_BY_SIDE) + 10;
	return withTx(ctx.db, async (tx) => {
		const rows = await unknownQuery(tx, ctx.clock.now());
		if (rows.length === 0) return [];
		await tx
			.update(messages)
			.set({ lockedBy: token, lockedUntil: databaseIn(seconds) })
			.where(
				inArray(
					messages.id,
					rows.map(({ id }) => id)
				)
			);
		return rows;
	});
}

export const unknownQuery = (db: Reader, now: Date) =>
	db
		.select()
		.from(messages, { forceIndex: 'messages_claim' })
		.where(
			and(
				eq(messages.state, 'unknown'),
				lte(messages.runAt, now),
				or(isNull(messages.lockedUntil), lt(messages.lockedUntil, databaseNow))
			)
		)
		.limit(AT_ONCE)
		.for('update', { skipLocked: true });

async function lookUp({ providers, ctx }: Outbox, row: MessageRow): Promise<Lookup> {
	if (row.address === null || row.callBeganAt === null) return { kind: 'absent' };
	return row.channel === 'sms'
		? providers.sms.findSent({
				to: row.address,
				mark: smsReferenceSuffix(row.id).trim(),
				since: row.callBeganAt
			})
		: providers.mail.findSent(mailReferenceOf(row.id, ctx.config.mail.from));
}

async function settle(outbox: Outbox, row: MessageRow, token: string, lookup: Lookup): Promise<void> {
	const { ctx } = outbox;
	const known = { row, holds: and(eq(messages.state, 'unknown'), eq(messages.lockedBy, token)) };
	ctx.log.info(
		{ messageId: row.id, channel: row.channel, found: lookup.kind },
		'a lost answer was looked up'
	);
	await withTx(ctx.db, async (tx) => {
		if (lookup.kind === 'found') await recordFound(tx, outbox, row, lookup);
		else if (lookup.kind === 'unavailable') await askLater(tx, outbox, row);
		else if (lookup.kind === 'absent') await conclude.failed(tx, outbox, known, absence(row));
		// Mail hosts without a list: sent again under the same Message-ID, by which the receiving side knows a repeat.
		else await conclude.failed(tx, outbox, known, { reason: 'answer lost, and no list to look in' });
	});
}

const absence = ({ lastError }: MessageRow): Failure => ({
	reason: 'never arrived at the provider',
	isCounted: lastError !== WORKER_STOPPED
});

async function recordFound(
	tx: Tx,
	{ ctx }: Outbox,
	row: MessageRow,
	{ providerId, status }: Extract<Lookup, { kind: 'found' }>
): Promise<void> {
	const now = ctx.clock.now();
	const unprovenSince = row.channel === 'sms' && row.followUpId !== null ? now : null;
	const [{ affectedRows }] = await tx
		.update(messages)
		.set({
			state: 'sent',
			providerId,
			sentAt: now,
			unprovenSince,
			lockedBy: null,
			lockedUntil: null,
			updatedAt: now
		})
		.where(and(eq(messages.id, row.id), eq(messages.state, 'unknown')));
	if (affectedRows === 1 && status !== null) await applyDelivery(tx, ctx, { providerId, status });
}

async function askLater(tx: Tx, { ctx, settings }: Outbox, row: MessageRow): Promise<void> {
	const now = ctx.clock.now();
	const runAt = new Date(now.getTime() + settings.settleSeconds * 1000);
	await tx
		.update(messages)
		.set({
			runAt,
			lockedBy: null,
			lockedUntil: null,
			lastError: 'the provider could not be asked',
			updatedAt: now
		})
		.where(and(eq(messages.id, row.id), eq(messages.state, 'unknown')));
}
