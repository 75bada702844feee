import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { Channel } from '../../domain/messaging/kinds';
import { dedupeKeyOf, PRIORITY } from '../../domain/messaging/plan-facts';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { invalid, notAllowed, notFound, type AppError } from '../errors';
import { insertMessages, isPlanned } from '../repos/messages';
import { assignEntries, findThreadHead, insertEntry, listThread, markRead } from '../repos/thread';
import { findStray } from '../repos/stray-texts';
import { settleAlertsOf } from './alerts';
import { ensureParentLink } from './parent-links';
import { canMail, canSms } from './message-plan';
import { intoThread } from './stray-settle';
import { threadResource } from './thread';

const HOUR = 3_600_000;
/** Words of staff that could not be sent in half a day are no longer an answer. */
const USEFUL_HOURS = 12;

export interface StaffWords {
	readonly followUpId: string;
	readonly carerId: string;
	readonly channel: Channel;
	readonly words: string;
	/** Of the form: the same key again is the same words. */
	readonly key: string;
}

type Head = NonNullable<Awaited<ReturnType<typeof findThreadHead>>>;

/**
 * Writes to a carer: the words stand in the thread, the outbox sends them, and the wish to be read is settled. Sent at once
 * whatever the hour, since a person decided it. Alarming words stay owed until somebody settles them by name.
 */
export async function writeToFamily(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, carerId, channel, words, key }: StaffWords
): Promise<Result<null, AppError>> {
	return changeThread(ctx, actor, followUpId, async (tx, head) => {
		const carer = head.carers.find(({ id }) => id === carerId);
		const isOpen = carer && (channel === 'sms' ? canSms(carer) : canMail(carer));
		if (carer === undefined || !isOpen)
			return err(invalid('This channel is closed. Please call instead.', 'to'));
		const message = { kind: 'desk-words' as const, occasion: key, carerId, channel };
		const dedupeKey = dedupeKeyOf(followUpId, message);
		if (await isPlanned(tx, dedupeKey)) return ok(null);
		const now = ctx.clock.now();
		const [entryId, messageId] = [ctx.random.id(), ctx.random.id()];
		await ensureParentLink(tx, ctx, followUpId, carerId);
		await insertEntry(tx, {
			...{ id: entryId, followUpId, carerId, direction: 'out', body: words, staffId: actor.staffId },
			...{ messageId, readAt: now, readBy: actor.staffId, at: now }
		});
		await insertMessages(tx, [
			{
				...message,
				...{ id: messageId, dedupeKey, followUpId, siteId: head.followUp.clinicId, language: carer.language },
				...{ facts: { threadEntryId: entryId }, state: 'planned', priority: PRIORITY.answer, runAt: now },
				...{ expiresAt: new Date(now.getTime() + USEFUL_HOURS * HOUR), createdAt: now, updatedAt: now }
			}
		]);
		await settleReading(tx, ctx, { head, actor, how: 'Answered in the thread.' });
		return ok(null);
	});
}

/** Read, and no answer needed. */
export async function markThreadRead(
	ctx: Ctx,
	actor: StaffActor,
	followUpId: string
): Promise<Result<null, AppError>> {
	return changeThread(ctx, actor, followUpId, async (tx, head) => {
		await settleReading(tx, ctx, { head, actor, how: 'Read in the thread; no answer needed.' });
		return ok(null);
	});
}

/** Says that a text of a number with several newborns is about this one. */
export async function assignText(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, entryId }: { readonly followUpId: string; readonly entryId: string }
): Promise<Result<null, AppError>> {
	return changeThread(ctx, actor, followUpId, async (tx, head) => {
		const open = await listThread(tx, followUpId, phonesOf(head));
		const found = open.find(({ entry }) => entry.id === entryId && entry.followUpId === null);
		const carer = head.carers.find(({ phone }) => phone === found?.entry.phone);
		if (found === undefined || carer === undefined) return err(notFound);
		await assignEntries(tx, [entryId], { followUpId, carerId: carer.id });
		// It came before its number was the carer's: what the desks of the organisation owe is owed here from now on.
		const stray = await findStray(tx, entryId);
		const about = { followUpId, clinicId: head.followUp.clinicId };
		if (stray?.stray.settledAt === null) await intoThread(tx, ctx, { actor, about, open: [stray] });
		return ok(null);
	});
}

const phonesOf = (head: Head): string[] =>
	head.carers.flatMap(({ phone }) => (phone === null ? [] : [phone]));

async function settleReading(
	tx: Tx,
	ctx: Ctx,
	{ head, actor, how }: { readonly head: Head; readonly actor: StaffActor; readonly how: string }
): Promise<void> {
	const followUpId = head.followUp.id;
	const rows = await listThread(tx, followUpId, []);
	const unread = rows.filter(({ entry }) => entry.direction === 'in' && entry.readAt === null);
	const ids = unread.map(({ entry }) => entry.id);
	await markRead(tx, ids, { staffId: actor.staffId, at: ctx.clock.now() });
	await settleAlertsOf(tx, ctx, {
		followUpId,
		kind: 'words-from-family',
		how: `${actor.name}: ${how}`.slice(0, 300)
	});
}

async function changeThread(
	ctx: Ctx,
	actor: StaffActor,
	followUpId: string,
	work: (tx: Tx, head: Head) => Promise<Result<null, AppError>>
): Promise<Result<null, AppError>> {
	return withTx(ctx.db, async (tx) => {
		const head = await findThreadHead(tx, followUpId);
		if (head === null || !can(actor, 'thread.view', threadResource(head))) return err(notFound);
		if (!can(actor, 'thread.write', threadResource(head))) return err(notAllowed);
		const done = await work(tx, head);
		const { organisationId, staffId } = actor;
		if (done.ok)
			await recordAccess(tx, ctx, { organisationId, staffId, action: 'follow-up.changed', followUpId });
		return done;
	});
}
