import { isDuplicate, withTx } from '../db/tx';
import type { Ctx } from '../context';
import { applyDelivery } from '../outbox/delivery';
import {
	findEvent,
	keepEvent,
	listWaitingEvents,
	lockWaitingEvent,
	markHandled,
	type ProviderEventRow
} from '../repos/provider-events';
import { receiveText } from './inbound';

const HOUR = 3_600_000;
/** A report about a message that we do not know waits this long for our own record of it, then counts as handled. */
const STRANGER_HOURS = 24;
const BATCH = 50;

export interface IncomingEvent {
	readonly kind: ProviderEventRow['kind'];
	/** The provider's own key of this event; the same again is the same event. */
	readonly eventKey: string;
	readonly payload: Record<string, string>;
}

/**
 * Keeps what a provider tells, then acts on it. Kept and not acted on (a crash, a lost database) it is taken up again by
 * `handleWaitingEvents`; told twice, it is acted on once.
 */
export async function receiveEvent(ctx: Ctx, event: IncomingEvent): Promise<void> {
	const receivedAt = ctx.clock.now();
	await keepEvent(ctx.db, { ...event, provider: 'sms', id: ctx.random.id(), receivedAt });
	const kept = await findEvent(ctx.db, event.eventKey);
	if (kept === null || kept.handledAt !== null) return;
	try {
		await handle(ctx, kept);
	} catch (error) {
		// It is safe in the database: the provider need not tell it again, and the next tick tries.
		ctx.log.error({ err: error, eventKind: event.kind }, 'an event of a provider could not be handled yet');
	}
}

/** Acts on events that were kept and not finished; for a tick of the worker. Returns how many were finished. */
export async function handleWaitingEvents(ctx: Ctx): Promise<number> {
	let finished = 0;
	for (const event of await listWaitingEvents(ctx.db, BATCH)) {
		try {
			if (await handle(ctx, event)) finished += 1;
		} catch (error) {
			ctx.log.error(
				{ err: error, eventId: event.id, eventKind: event.kind },
				'an event still cannot be handled'
			);
		}
	}
	return finished;
}

async function handle(ctx: Ctx, event: ProviderEventRow): Promise<boolean> {
	return event.kind === 'delivery' ? applyReport(ctx, event) : understandText(ctx, event);
}

async function applyReport(ctx: Ctx, { id }: ProviderEventRow): Promise<boolean> {
	return withTx(ctx.db, async (tx) => {
		const event = await lockWaitingEvent(tx, id);
		if (event === null) return false;
		const { sid = '', status = '', error, message } = event.payload;
		const report = { providerId: sid, messageId: message || undefined, status, error: error || null };
		const outcome = await applyDelivery(tx, ctx, report);
		const now = ctx.clock.now();
		const isOld = now.getTime() - event.receivedAt.getTime() > STRANGER_HOURS * HOUR;
		if (outcome === 'no-message' && !isOld) return false;
		await markHandled(tx, id, now);
		return true;
	});
}

/** The steps of a text are use cases with transactions of their own, each of which may be done again without harm. */
async function understandText(ctx: Ctx, { id, payload }: ProviderEventRow): Promise<boolean> {
	const { sid = '', from = '', body = '' } = payload;
	try {
		await receiveText(ctx, { providerId: sid, from, body });
	} catch (error) {
		// Another process writes the same text at this moment, and will finish it.
		if (!isDuplicate(error)) throw error;
		return false;
	}
	await markHandled(ctx.db, id, ctx.clock.now());
	return true;
}
