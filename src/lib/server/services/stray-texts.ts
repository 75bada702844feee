import { readBy } from '../../domain/messaging/reading';
import { PRIORITY } from '../../domain/messaging/plan-facts';
import {
	ANSWER_AGAIN_MINUTES,
	strayAsks,
	strayPriority,
	type StrayAnswerKind
} from '../../domain/messaging/stray';
import type { Understood } from '../../domain/messaging/words';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { insertMessages } from '../repos/messages';
import { findHomeOfNumber, insertStray, listAnswers, listEntryIdsBetween } from '../repos/stray-texts';
import type { ThreadEntryRow } from '../repos/thread';

const MINUTE = 60_000;
/** As for families that we know: later than this an answer is none. */
const ANSWER_USEFUL_MINUTES = 120;

/** One word for an answer to a stray text: there is one of a kind, however often the text is delivered. */
export const strayAnswerKey = (kind: StrayAnswerKind, entryId: string): string => `stray:${kind}:${entryId}`;

interface Arrived {
	readonly entry: ThreadEntryRow;
	readonly said: Understood;
}

/**
 * Owes a text of a number that belongs to no family to every desk of the organisation, and plans the answer that it asks
 * for. Done twice, it changes nothing more: the entry is the key of both.
 */
export async function receiveStray(ctx: Ctx, { entry, said }: Arrived): Promise<void> {
	const { isOwed, answer } = strayAsks(said);
	await withTx(ctx.db, async (tx) => {
		const home = await findHomeOfNumber(tx);
		if (home === null)
			return ctx.log.error({ entryId: entry.id }, 'a text came before there was an organisation');
		const { organisationId, clinicId } = home;
		const { id: entryId, at, isAlarming } = entry;
		if (isOwed)
			await insertStray(tx, {
				entryId,
				organisationId,
				priority: strayPriority(isAlarming),
				dueAt: readBy(at, isAlarming)
			});
		if (answer === null || (await isAnsweredLately(tx, entry, answer))) return;
		if (clinicId === null)
			return ctx.log.error({ entryId }, 'there is no clinic whose telephones an answer could name');
		await planAnswer(tx, ctx, { entryId, kind: answer, siteId: clinicId, said });
	});
}

async function isAnsweredLately(tx: Tx, entry: ThreadEntryRow, kind: StrayAnswerKind): Promise<boolean> {
	const from = new Date(entry.at.getTime() - ANSWER_AGAIN_MINUTES * MINUTE);
	const before = await listEntryIdsBetween(tx, entry, { from, until: entry.at });
	const answers = await listAnswers(
		tx,
		before.map((id) => strayAnswerKey(kind, id))
	);
	return answers.some(({ state }) => state !== 'dead' && state !== 'withdrawn' && state !== 'expired');
}

interface Answering {
	readonly entryId: string;
	readonly kind: StrayAnswerKind;
	readonly siteId: string;
	readonly said: Understood;
}

/** The number is not copied: it is read from the entry at the moment of sending. */
async function planAnswer(tx: Tx, ctx: Ctx, { entryId, kind, siteId, said }: Answering): Promise<void> {
	const now = ctx.clock.now();
	await insertMessages(tx, [
		{
			id: ctx.random.id(),
			dedupeKey: strayAnswerKey(kind, entryId),
			siteId,
			kind,
			occasion: entryId,
			channel: 'sms',
			language: said.language ?? 'en',
			facts: { threadEntryId: entryId },
			state: 'planned',
			priority: kind === 'emergency-advice' ? PRIORITY.urgent : PRIORITY.answer,
			runAt: now,
			expiresAt: new Date(now.getTime() + ANSWER_USEFUL_MINUTES * MINUTE),
			createdAt: now,
			updatedAt: now
		}
	]);
}
