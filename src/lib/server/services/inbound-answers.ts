import type { MessageKind } from '../../domain/messaging/kinds';
import { dedupeKeyOf, PRIORITY } from '../../domain/messaging/plan-facts';
import { readBy } from '../../domain/messaging/reading';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { insertMessages } from '../repos/messages';
import { settleAlertsByKey, type PhoneFollowUp, type ThreadEntryRow } from '../repos/thread';
import { raiseAlert } from './alerts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

type AnswerKind = Extract<
	MessageKind,
	'help-answer' | 'stop-answer' | 'start-answer' | 'emergency-advice' | 'which-newborn'
>;

interface Answer {
	readonly kind: AnswerKind;
	readonly entry: ThreadEntryRow;
	/** Follow-ups of the number; the answer goes out once, to the first one's carer. */
	readonly known: readonly PhoneFollowUp[];
	readonly facts?: Record<string, string>;
}

/** Plans one answer to a text, once for each text: the entry is its occasion. */
export async function answerBy(ctx: Ctx, answer: Answer): Promise<void> {
	await withTx(ctx.db, (tx) => planAnswer(tx, ctx, answer));
}

async function planAnswer(tx: Tx, ctx: Ctx, { kind, entry, known, facts = {} }: Answer): Promise<void> {
	const [about] = known;
	if (about === undefined) return;
	const now = ctx.clock.now();
	const { followUpId, clinicId, carer } = about;
	const message = { kind, occasion: entry.id, carerId: carer.id, channel: 'sms' as const };
	await insertMessages(tx, [
		{
			...message,
			id: ctx.random.id(),
			dedupeKey: dedupeKeyOf(followUpId, message),
			followUpId,
			siteId: clinicId,
			language: carer.language,
			facts,
			state: 'planned',
			priority: kind === 'emergency-advice' ? PRIORITY.urgent : PRIORITY.answer,
			runAt: now,
			expiresAt: new Date(now.getTime() + 2 * HOUR),
			createdAt: now,
			updatedAt: now
		}
	]);
}

/** Emergency advice at once, whatever the hour. */
export async function adviseEmergency(
	ctx: Ctx,
	{ entry, known }: Pick<Answer, 'entry' | 'known'>
): Promise<void> {
	await answerBy(ctx, { kind: 'emergency-advice', entry, known });
}

/** Asks which newborn is meant; the order of the numbers is kept with the question. */
export async function askWhich(ctx: Ctx, { entry, known }: Pick<Answer, 'entry' | 'known'>): Promise<void> {
	const choices = known.map(({ followUpId }) => followUpId).join(' ');
	await answerBy(ctx, { kind: 'which-newborn', entry, known, facts: { choices } });
}

interface Words {
	readonly entry: Pick<ThreadEntryRow, 'id' | 'body'>;
	readonly about: Pick<PhoneFollowUp, 'followUpId' | 'clinicId'>;
	readonly isAlarming: boolean;
	/** The number belongs to several newborns and the words do not say which. */
	readonly isUncertain: boolean;
}

interface OwedWords extends Words {
	readonly dueAt: Date;
	/** The number is none of the family's. */
	readonly isStray?: boolean;
}

const wordsKey = (entryId: string, followUpId: string, role: string, isUncertain: boolean): string =>
	`words ${entryId} ${followUpId} ${role}${isUncertain ? ' uncertain' : ''}`;

/** Once the family has said which newborn is meant, the words are owed there and no longer elsewhere. */
export async function settleUncertain(
	ctx: Ctx,
	entryIds: readonly string[],
	known: readonly PhoneFollowUp[]
): Promise<void> {
	const keys = entryIds.flatMap((id) =>
		known.map(({ followUpId }) => wordsKey(id, followUpId, 'desk', true))
	);
	const how = 'The family said which newborn is meant.';
	await withTx(ctx.db, (tx) => settleAlertsByKey(tx, keys, { at: ctx.clock.now(), how }));
}

/** Words that a person has to read: at once where they alarm, by desk and pediatrician. */
export async function alertWords(ctx: Ctx, words: Words): Promise<void> {
	const dueAt = readBy(ctx.clock.now(), words.isAlarming);
	await withTx(ctx.db, (tx) => raiseWords(tx, ctx, { ...words, dueAt }));
}

/** The same inside a transaction, for words whose due time stands already. */
export async function raiseWords(
	tx: Tx,
	ctx: Ctx,
	{ entry, about, isAlarming, isUncertain, dueAt, isStray = false }: OwedWords
): Promise<void> {
	const which = isUncertain ? 'About one of several newborns of this family. ' : '';
	const from = isStray ? 'From a number that is not on record; the thread shows it. ' : '';
	const roles = isAlarming ? (['desk', 'pediatrician'] as const) : (['desk'] as const);
	for (const role of roles) {
		await raiseAlert(tx, ctx, {
			followUpId: about.followUpId,
			kind: isAlarming ? 'alarming-words' : 'words-from-family',
			role,
			siteId: about.clinicId,
			dueAt,
			detail: `${which}${from}The family wrote: ${entry.body}`.slice(0, 500),
			dedupeKey: wordsKey(entry.id, about.followUpId, role, isUncertain)
		});
	}
}

/** A stopped channel is a family that reminders no longer reach: the desk finds another way. */
export async function alertContactStopped(
	tx: Tx,
	ctx: Ctx,
	{ entry, about }: { readonly entry: ThreadEntryRow; readonly about: PhoneFollowUp }
): Promise<void> {
	const now = ctx.clock.now().getTime();
	const halfWay = about.visitAt === null ? Infinity : Math.max(now, (now + about.visitAt.getTime()) / 2);
	await raiseAlert(tx, ctx, {
		followUpId: about.followUpId,
		kind: 'contact-stopped',
		role: 'desk',
		siteId: about.clinicId,
		dueAt: new Date(Math.min(now + 4 * HOUR, halfWay)),
		detail: 'Text messages were stopped by the family. Agree on another way to reach them.',
		dedupeKey: `stopped ${entry.id} ${about.followUpId}`
	});
}
