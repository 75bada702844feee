import { eq, inArray, type SQL, sql } from 'drizzle-orm';
import { smsReferenceSuffix } from '../../domain/messaging/reference';
import type { Channel } from '../../domain/messaging/kinds';
import type { Tx } from '../db/client';
import { messages } from '../db/schema/messaging';
import { withTx } from '../db/tx';
import { lockDue } from './claim';
import { conclude } from './conclude';
import { findDueGroups } from './due';
import { databaseIn, databaseNow } from './lease';
import type { Held, MessageRow, Outbox, RenderedMessage } from './port';
import { renderEach } from './render-each';
import { reserveCalls } from './senders';

export interface Taken {
	/** Messages that were due and dealt with: held for a call, withdrawn, moved on, or too late. */
	readonly looked: number;
	readonly held: readonly Held[];
	/** Something is due but locked for the moment: by another worker's claim, or as the neighbour of one in the index. */
	readonly isContended: boolean;
	/** The sender's breaker, as it was when the calls were granted: a success has nothing to repair. */
	readonly isUnbroken: boolean;
}

const NOTHING: Taken = { looked: 0, held: [], isContended: false, isUnbroken: true };

/**
 * Takes up to `limit` due messages of a channel: locks them, checks each against its follow-up as it is now, renders it, and
 * writes that its call has begun, all in one transaction. Only after the commit may a call be made; from then on the row says
 * that one may have been, whatever happens to this process.
 */
export async function takeDue(
	outbox: Outbox,
	channel: Channel,
	limit: number,
	token: string
): Promise<Taken> {
	const { ctx } = outbox;
	const now = ctx.clock.now();
	const groups = await findDueGroups(ctx.db, channel, now);
	if (groups.length === 0) return NOTHING;
	const { granted, isUnbroken } = await reserveCalls(outbox, channel, limit);
	if (granted === 0) return NOTHING;
	return withTx(ctx.db, async (tx) => {
		const fraction = ctx.random.fraction();
		const rows = await lockDue(tx, groups, { channel, limit: granted, now, fraction });
		if (rows.length === 0) return { ...NOTHING, isContended: true };
		const held = await checkAndRender(tx, outbox, { rows, now, token });
		await markBegun(tx, outbox, held);
		return { looked: rows.length, held, isContended: false, isUnbroken };
	});
}

interface Batch {
	readonly rows: readonly MessageRow[];
	readonly now: Date;
	readonly token: string;
}

async function checkAndRender(tx: Tx, outbox: Outbox, { rows, now, token }: Batch): Promise<Held[]> {
	const inTime = rows.filter(({ expiresAt }) => expiresAt > now);
	for (const row of rows) if (row.expiresAt <= now) await conclude.expired(tx, outbox, row);
	const rendered = await renderEach(tx, outbox, inTime);
	const held: Held[] = [];
	for (const row of inTime) {
		const result = rendered.get(row.id);
		if (result === undefined) await conclude.failedBeforeCall(tx, outbox, row, 'not rendered');
		else if (result instanceof Error) await conclude.failedBeforeCall(tx, outbox, row, 'rendering failed');
		else if (result.kind === 'withdraw') await conclude.withdrawn(tx, outbox, row, result.reason);
		else if (result.kind === 'postpone') await conclude.postponed(tx, outbox, row, result);
		else held.push({ row, token, content: marked(row, result) });
	}
	return held;
}

/** A lost SMS is found by its mark: no text leaves without it. */
function marked(row: MessageRow, content: Extract<RenderedMessage, { kind: 'send' }>) {
	const mark = smsReferenceSuffix(row.id);
	if (row.channel === 'mail' || content.text.endsWith(mark)) return content;
	return { ...content, text: content.text.trimEnd() + mark };
}

async function markBegun(tx: Tx, { settings }: Outbox, held: readonly Held[]): Promise<void> {
	const [first] = held;
	if (first === undefined) return;
	await tx
		.update(messages)
		.set({
			state: 'sending',
			lockedBy: first.token,
			lockedUntil: databaseIn(settings.leaseSeconds),
			claims: sql`${messages.claims} + 1`,
			callBeganAt: databaseNow,
			address: byId(held, ({ content }) => content.to),
			templateId: byId(held, ({ content }) => content.templateId),
			lastError: null
		})
		.where(
			inArray(
				messages.id,
				held.map(({ row }) => row.id)
			)
		);
}

/** `case id when … then … end`: one statement for a batch whose rows differ. */
function byId(held: readonly Held[], valueOf: (one: Held) => string | null): SQL {
	const cases = held.map((one) => sql`when ${one.row.id} then ${valueOf(one)}`);
	return sql`case ${messages.id} ${sql.join(cases, sql` `)} end`;
}

/** Gives messages back whose calls were certainly not made: nothing counts, and the next worker may have them at once. */
export async function giveBack(outbox: Outbox, held: readonly Held[]): Promise<void> {
	const [first] = held;
	if (first === undefined) return;
	const now = outbox.ctx.clock.now();
	const ids = held.map(({ row }) => row.id);
	await withTx(outbox.ctx.db, (tx) =>
		tx
			.update(messages)
			.set({ state: 'planned', lockedBy: null, lockedUntil: null, callBeganAt: null, updatedAt: now })
			.where(sql`${inArray(messages.id, ids)} and ${eq(messages.lockedBy, first.token)}`)
	);
}
