import { mayFallBack, nextRoute } from '../../domain/messaging/fallback';
import { dedupeKeyOf } from '../../domain/messaging/plan-facts';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { tellUndelivered } from '../outbox/tell-desk';
import {
	listCarersOf,
	listSameMessages,
	listUnproven,
	lockUnproven,
	settleUnproven
} from '../repos/fallback';
import { insertMessages, type MessageRow } from '../repos/messages';
import { raiseAlert } from './alerts';
import { canMail, canSms } from './message-plan';
import { ensureParentLink } from './parent-links';

const BATCH = 100;

/**
 * Messages that did not arrive go the next way: mail, then the second carer, then a call by the desk. Returns how many were
 * dealt with.
 */
export async function fallBack(ctx: Ctx): Promise<number> {
	let dealtWith = 0;
	for (;;) {
		const ids = await listUnproven(ctx.db, ctx.clock.now(), BATCH);
		for (const id of ids) await withTx(ctx.db, (tx) => goNextWay(tx, ctx, id));
		dealtWith += ids.length;
		if (ids.length < BATCH) return dealtWith;
	}
}

async function goNextWay(tx: Tx, ctx: Ctx, id: string): Promise<void> {
	const row = await lockUnproven(tx, id);
	if (row === null) return;
	const now = ctx.clock.now();
	const { followUpId, carerId, channel } = row;
	if (followUpId === null || carerId === null || !mayFallBack(row.kind)) {
		return settleUnproven(tx, id, now, null);
	}
	const route = row.expiresAt > now ? await findRoute(tx, row, { followUpId, carerId, channel }) : null;
	await settleUnproven(tx, id, now, route === null ? null : now);
	if (route === null) {
		await tellUndelivered(
			{ ctx, raiseAlert },
			tx,
			row,
			'did not arrive, and there is no other way to send it'
		);
		return;
	}
	await ensureParentLink(tx, ctx, followUpId, route.carerId);
	const same = { kind: row.kind, occasion: row.occasion, carerId: route.carerId, channel: route.channel };
	await insertMessages(tx, [
		{
			...same,
			id: ctx.random.id(),
			followUpId,
			siteId: row.siteId,
			language: route.carer.language,
			dedupeKey: dedupeKeyOf(followUpId, same),
			facts: { ...row.facts, insteadOf: row.id },
			state: 'planned',
			priority: row.priority,
			runAt: now,
			expiresAt: row.expiresAt,
			createdAt: now,
			updatedAt: now
		}
	]);
	ctx.log.info({ messageId: id, kind: row.kind, channel: route.channel }, 'a message goes another way');
}

async function findRoute(
	tx: Tx,
	row: MessageRow,
	failed: { readonly followUpId: string; readonly carerId: string; readonly channel: MessageRow['channel'] }
) {
	const carers = await listCarersOf(tx, failed.followUpId);
	const used = (await listSameMessages(tx, row)).flatMap(({ carerId, channel }) =>
		carerId === null ? [] : [{ carerId, channel }]
	);
	const open = carers.map((carer) => ({ ...carer, canSms: canSms(carer), canMail: canMail(carer) }));
	return nextRoute(open, failed, used);
}
