import type { Tx } from '../db/client';
import type { MessageRow, Outbox } from './port';

const URGENT = 1;
const MINUTE = 60_000;

/**
 * Makes a message that did not arrive a task with an owner and a time, once for each message. Mail to our own people has no
 * follow-up and no desk: the watch shows it instead.
 */
export async function tellUndelivered(
	{ ctx, raiseAlert }: Pick<Outbox, 'ctx' | 'raiseAlert'>,
	tx: Tx,
	row: MessageRow,
	what: string
): Promise<void> {
	ctx.log.warn({ messageId: row.id, kind: row.kind, channel: row.channel, what }, 'a message did not arrive');
	if (row.followUpId === null) return;
	const minutes = row.priority <= URGENT ? 10 : 60;
	await raiseAlert(tx, ctx, {
		followUpId: row.followUpId,
		kind: 'message-undeliverable',
		role: 'desk',
		siteId: row.siteId,
		dueAt: new Date(ctx.clock.now().getTime() + minutes * MINUTE),
		detail: `${row.channel === 'sms' ? 'Text message' : 'Mail'} "${row.kind}" ${what}.`,
		dedupeKey: `undeliverable:${row.id}`
	});
}
