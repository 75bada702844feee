import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { conflict, invalid, notFound, type AppError } from '../errors';
import {
	findStray,
	listUnassignedIds,
	lockStraysOfPhone,
	moveAnswers,
	settleStrays,
	type Stray
} from '../repos/stray-texts';
import { assignEntries, findThreadHead, markRead } from '../repos/thread';
import { raiseWords } from './inbound-answers';
import { strayAnswerKey } from './stray-texts';
import { threadResource } from './thread';

interface Held {
	/** The text that was named. */
	readonly named: Stray;
	readonly phone: string;
	/** Every text of its number that is still owed, oldest first. */
	readonly open: readonly Stray[];
}

/**
 * Says that the texts of a number are about this newborn: they, and all else from the number that is in nobody's thread,
 * go into its thread; who has to read them by when stays as it was, now as an alert of the follow-up.
 */
export async function assignStray(
	ctx: Ctx,
	actor: StaffActor,
	{ entryId, followUpId }: { readonly entryId: string; readonly followUpId: string }
): Promise<Result<{ readonly followUpId: string }, AppError>> {
	return changeStray(ctx, actor, entryId, async (tx, { open, phone }) => {
		const about = await findOwn(tx, actor, followUpId);
		if (about === null)
			return err(invalid('There is no such newborn at your clinic. Choose another one.', 'followUpId'));
		await intoThread(tx, ctx, { actor, about, open });
		await assignEntries(tx, await listUnassignedIds(tx, phone), { followUpId, carerId: null });
		const { organisationId, staffId } = actor;
		const detail = open.length === 1 ? 'one text' : `${open.length} texts`;
		const action = 'stray-text.assigned';
		await recordAccess(tx, ctx, { organisationId, staffId, action, followUpId, detail });
		return ok({ followUpId });
	});
}

interface IntoThread {
	readonly actor: StaffActor;
	readonly about: { readonly followUpId: string; readonly clinicId: string };
	readonly open: readonly Stray[];
}

/** Turns the debt for texts into alerts of a follow-up, and takes the answers to them along. The entries are moved by the caller. */
export async function intoThread(tx: Tx, ctx: Ctx, { actor, about, open }: IntoThread): Promise<void> {
	for (const { entry, stray } of open) {
		const { isAlarming } = entry;
		await raiseWords(tx, ctx, {
			...{ entry, about, isAlarming, isUncertain: false },
			...{ dueAt: stray.dueAt, isStray: true }
		});
	}
	const ids = open.map(({ entry }) => entry.id);
	const { followUpId } = about;
	await settleStrays(tx, ids, { at: ctx.clock.now(), by: actor.staffId, as: 'assigned', followUpId });
	const keys = ids.flatMap((id) =>
		(['emergency-advice', 'help-answer'] as const).map((kind) => strayAnswerKey(kind, id))
	);
	await moveAnswers(tx, keys, followUpId);
}

/** A follow-up whose thread the actor may write in, and that was not merged into another. */
async function findOwn(tx: Tx, actor: StaffActor, followUpId: string): Promise<IntoThread['about'] | null> {
	const head = await findThreadHead(tx, followUpId);
	if (head === null || !can(actor, 'thread.write', threadResource(head))) return null;
	return head.followUp.mergedIntoId === null ? { followUpId, clinicId: head.followUp.clinicId } : null;
}

/** Says that the texts of a number, up to the last one that was seen, concern none of the organisation's families. */
export async function dismissStray(
	ctx: Ctx,
	actor: StaffActor,
	asked: { readonly entryId: string; readonly seenId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	return changeStray(ctx, actor, asked.entryId, async (tx, { named, open }) => {
		const seen = open.find(({ entry }) => entry.id === asked.seenId) ?? named;
		const ids = open.filter(({ entry }) => entry.at <= seen.entry.at).map(({ entry }) => entry.id);
		const now = ctx.clock.now();
		const { organisationId, staffId } = actor;
		await settleStrays(tx, ids, { at: now, by: staffId, as: 'not-ours', reason: asked.why });
		await markRead(tx, ids, { staffId, at: now });
		const action = 'stray-text.not-ours';
		await recordAccess(tx, ctx, { organisationId, staffId, action, detail: asked.why });
		return ok(null);
	});
}

/** One transaction over everything owed for a number, held; another organisation's is answered as if it did not exist. */
async function changeStray<T>(
	ctx: Ctx,
	actor: StaffActor,
	entryId: string,
	work: (tx: Tx, held: Held) => Promise<Result<T, AppError>>
): Promise<Result<T, AppError>> {
	return withTx(ctx.db, async (tx) => {
		const found = await findStray(tx, entryId);
		const phone = found?.entry.phone ?? null;
		if (found === null || phone === null || !can(actor, 'stray-text.settle', found.stray))
			return err(notFound);
		const all = await lockStraysOfPhone(tx, found.stray.organisationId, phone);
		const named = all.find(({ entry }) => entry.id === entryId);
		if (named === undefined) return err(notFound);
		if (named.stray.settledAt !== null) return err(conflict(await saidBy(tx, entryId)));
		return work(tx, { named, phone, open: all.filter(({ stray }) => stray.settledAt === null) });
	});
}

async function saidBy(tx: Tx, entryId: string): Promise<string> {
	const settled = await findStray(tx, entryId);
	const who = settled?.settledByName ?? 'Somebody';
	const what =
		settled?.stray.settledAs === 'assigned'
			? 'put this text into a newborn’s thread'
			: 'marked this text as not one of ours';
	return `${who} ${what} before you. Nothing was changed.`;
}
