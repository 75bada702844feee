import { and, eq, type SQL } from 'drizzle-orm';
import { afterFailure } from '../../domain/messaging/retry';
import type { Tx } from '../db/client';
import { messages } from '../db/schema/messaging';
import type { MessageRow, Outbox } from './port';
import { tellUndelivered } from './tell-desk';

/** Every way in which one message leaves a worker's hands, other than being sent. The caller holds the row or its lease. */

const MINUTE = 60_000;

type Change = Partial<typeof messages.$inferInsert>;

const free = { lockedBy: null, lockedUntil: null, callBeganAt: null } as const;

/** Changes the row if it still is as the caller knows it; false when somebody else was faster. */
async function change(tx: Tx, outbox: Outbox, { row, holds }: Known, values: Change): Promise<boolean> {
	const where = and(eq(messages.id, row.id), holds);
	const [result] = await tx
		.update(messages)
		.set({ ...values, updatedAt: outbox.ctx.clock.now() })
		.where(where);
	return result.affectedRows === 1;
}

/** A row, and what must still be true of it. */
export interface Known {
	readonly row: MessageRow;
	readonly holds: SQL | undefined;
}

const planned = (row: MessageRow): Known => ({ row, holds: eq(messages.state, 'planned') });

/** Too late to be of use. Where it was tried in vain, somebody has to know. */
async function expired(tx: Tx, outbox: Outbox, row: MessageRow): Promise<void> {
	await change(tx, outbox, planned(row), { ...free, state: 'expired' });
	if (row.attempts > 0) await tellUndelivered(outbox, tx, row, 'could not be sent in time');
}

async function withdrawn(tx: Tx, outbox: Outbox, row: MessageRow, reason: string): Promise<void> {
	await change(tx, outbox, planned(row), { ...free, state: 'withdrawn', lastError: cut(reason) });
}

async function postponed(
	tx: Tx,
	outbox: Outbox,
	row: MessageRow,
	{ until, reason }: { readonly until: Date; readonly reason: string }
): Promise<void> {
	// Never "until now": a message that is postponed without end would keep its worker busy.
	const soonest = new Date(outbox.ctx.clock.now().getTime() + MINUTE);
	const runAt = until > soonest ? until : soonest;
	await change(tx, outbox, planned(row), { ...free, runAt, lastError: cut(reason) });
}

/** Counts like a failed call. */
async function failedBeforeCall(tx: Tx, outbox: Outbox, row: MessageRow, reason: string): Promise<void> {
	outbox.ctx.log.error({ messageId: row.id, kind: row.kind }, reason);
	await failed(tx, outbox, planned(row), { reason });
}

export interface Failure {
	readonly reason: string;
	readonly retryAfterSeconds?: number | undefined;
	/** False where the message and its provider are not to blame: a slower pace was asked for, or our worker died. */
	readonly isCounted?: boolean;
}

/** A call that certainly sent nothing: tried again after a pause, or given up. */
async function failed(tx: Tx, outbox: Outbox, known: Known, failure: Failure): Promise<void> {
	const { ctx } = outbox;
	const { row } = known;
	const { retryAfterSeconds, isCounted = true } = failure;
	const attempts = row.attempts + (isCounted ? 1 : 0);
	const { claims, expiresAt } = row;
	const drawn = { fraction: ctx.random.fraction(), now: ctx.clock.now() };
	const after = afterFailure({ ...drawn, attempts, claims, retryAfterSeconds, expiresAt });
	const lastError = cut(failure.reason);
	if (after.kind === 'again') {
		await change(tx, outbox, known, { ...free, state: 'planned', runAt: after.runAt, attempts, lastError });
	} else if (after.why === 'too-late') {
		const isOurs = await change(tx, outbox, known, { ...free, state: 'expired', attempts, lastError });
		if (isOurs) await tellUndelivered(outbox, tx, row, 'could not be sent in time');
	} else {
		await dead(tx, outbox, known, { reason: failure.reason, attempts });
	}
}

/** Given up; the desk owes it from the same transaction on, and another route is tried. */
async function dead(
	tx: Tx,
	outbox: Outbox,
	known: Known,
	{ reason, attempts = known.row.attempts + 1 }: { readonly reason: string; readonly attempts?: number }
): Promise<void> {
	const unprovenSince = known.row.followUpId === null ? null : outbox.ctx.clock.now();
	const values = { ...free, state: 'dead', attempts, lastError: cut(reason), unprovenSince } as const;
	const isOurs = await change(tx, outbox, known, values);
	if (isOurs) await tellUndelivered(outbox, tx, known.row, `could not be sent (${reason})`);
}

const cut = (reason: string): string => reason.slice(0, 300);

export const conclude = { expired, withdrawn, postponed, failedBeforeCall, failed, dead };
