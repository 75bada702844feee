import { and, eq, inArray, isNull, or, sql } from 'drizzle-orm';
import { isProven, isRefused, parseDeliveryStatus, replacedBy } from '../../domain/messaging/delivery';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { messages } from '../db/schema/messaging';

export interface DeliveryReport {
	readonly providerId: string;
	/** From the address that was reported to; finds the message also before its sending was recorded. */
	readonly messageId?: string | undefined;
	/** The provider's word. */
	readonly status: string;
	/** The provider's error code. */
	readonly error?: string | null | undefined;
}

/**
 * Notes a delivery report. `older`: something later is known already, nothing changed. `no-message`: no such message (yet);
 * worth another try later when the report carries no `messageId`.
 */
export async function applyDelivery(
	tx: Tx,
	ctx: Ctx,
	{ providerId, messageId, status, error }: DeliveryReport
): Promise<'applied' | 'older' | 'no-message'> {
	const id = await findId(tx, providerId, messageId);
	if (id === null) return 'no-message';
	const known = parseDeliveryStatus(status);
	if (known === null) return 'older';
	const now = ctx.clock.now();
	const lower = [...replacedBy(known)];
	const [{ affectedRows }] = await tx
		.update(messages)
		.set({
			delivery: known,
			deliveryAt: now,
			deliveryError: error ?? null,
			providerId,
			// A report is proof of the sending, also where our own record of it was lost.
			sentAt: sql`if(${messages.state} = 'unknown', ${now}, ${messages.sentAt})`,
			unprovenSince: isProven(known) ? null : unprovenFrom(now, isRefused(known)),
			state: sql`if(${messages.state} = 'unknown', 'sent', ${messages.state})`,
			updatedAt: now
		})
		.where(and(eq(messages.id, id), or(isNull(messages.delivery), inArray(messages.delivery, lower))));
	return affectedRows === 1 ? 'applied' : 'older';
}

/** Set where the record of the sending was lost, and again at a refusal unless the fallback has been planned. */
function unprovenFrom(now: Date, refused: boolean) {
	const start = refused ? sql`${messages.fellBackAt} is null` : sql`${messages.state} = 'unknown'`;
	return sql`if(${start} and ${messages.followUpId} is not null, coalesce(${messages.unprovenSince}, ${now}), ${messages.unprovenSince})`;
}

async function findId(tx: Tx, providerId: string, messageId: string | undefined): Promise<string | null> {
	const [byProvider] = await tx
		.select({ id: messages.id })
		.from(messages)
		.where(eq(messages.providerId, providerId));
	if (byProvider) return byProvider.id;
	if (messageId === undefined) return null;
	const underWay = inArray(messages.state, ['sending', 'unknown']);
	const [byId] = await tx
		.select({ id: messages.id })
		.from(messages)
		.where(and(eq(messages.id, messageId), underWay));
	return byId?.id ?? null;
}
