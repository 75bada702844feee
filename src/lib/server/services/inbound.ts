import type { CarerActor } from '../../domain/access/roles';
import { understand, type Meaning, type Understood } from '../../domain/messaging/words';
import type { Ctx } from '../context';
import { withTx } from '../db/tx';
import {
	assignEntries,
	findEntryOfProvider,
	findQuestionAbout,
	insertEntry,
	listFollowUpsOfPhone,
	listUnassigned,
	setSmsStopped,
	type PhoneFollowUp,
	type ThreadEntryRow
} from '../repos/thread';
import {
	adviseEmergency,
	alertContactStopped,
	alertWords,
	answerBy,
	askWhich,
	settleUncertain
} from './inbound-answers';
import { replanMessages } from './message-plan';
import { receiveStray } from './stray-texts';
import { askForAnotherTime, confirmVisit } from './visits';

const HOUR = 3_600_000;
/** A number sent later than this after the question which newborn is meant answers something else. */
const QUESTION_HOURS = 48;

export interface IncomingText {
	readonly providerId: string;
	/** E.164. */
	readonly from: string;
	readonly body: string;
}

/**
 * Takes in one text of a family: writes it into the thread, understands it, and does what it asks. Done twice, it changes
 * nothing more: the entry is found by the provider's id, and what follows carries the entry's id as its key.
 */
export async function receiveText(ctx: Ctx, text: IncomingText): Promise<void> {
	const all = await listFollowUpsOfPhone(ctx.db, text.from);
	const known = mostRelevant(all);
	const said = understand(text.body);
	const chosen = await chosenNewborn(ctx, { text, said, known });
	const means = chosen === null ? said.means : 'choice';
	const about = chosen?.about ?? only(known);
	const entry = await keepEntry(ctx, { text, means, isAlarming: said.isAlarming, about });
	if (known.length === 0) return receiveStray(ctx, { entry, said });
	if (chosen !== null) return actOnWaiting(ctx, chosen, known);
	await act(ctx, { entry, said, known });
}

/** Open follow-ups, or else the latest closed one: a family may write after the end, and must still be heard. */
function mostRelevant(all: readonly PhoneFollowUp[]): PhoneFollowUp[] {
	const open = all.filter(({ stage }) => stage !== 'closed');
	if (open.length > 0) return open;
	return [...all].sort((a, b) => b.updatedAt.getTime() - a.updatedAt.getTime()).slice(0, 1);
}

const only = (known: readonly PhoneFollowUp[]): PhoneFollowUp | null =>
	known.length === 1 ? (known[0] ?? null) : null;

interface Kept {
	readonly text: IncomingText;
	readonly means: Meaning;
	readonly isAlarming: boolean;
	readonly about: PhoneFollowUp | null;
}

async function keepEntry(ctx: Ctx, { text, means, isAlarming, about }: Kept): Promise<ThreadEntryRow> {
	const before = await findEntryOfProvider(ctx.db, text.providerId);
	if (before !== null) return before;
	const id = ctx.random.id();
	await insertEntry(ctx.db, {
		id,
		followUpId: about?.followUpId ?? null,
		carerId: about?.carer.id ?? null,
		phone: text.from,
		direction: 'in',
		body: text.body,
		understoodAs: means,
		isAlarming,
		providerId: text.providerId,
		at: ctx.clock.now()
	});
	const entry = await findEntryOfProvider(ctx.db, text.providerId);
	if (entry === null) throw new Error('A text vanished after it was written.');
	return entry;
}

interface Saying {
	readonly entry: ThreadEntryRow;
	readonly said: Understood;
	readonly known: readonly PhoneFollowUp[];
}

async function act(ctx: Ctx, { entry, said, known }: Saying): Promise<void> {
	switch (said.means) {
		case 'stop':
			return stop(ctx, entry, known);
		case 'start':
			return start(ctx, entry, known);
		case 'help':
			return answerBy(ctx, { kind: 'help-answer', entry, known });
		case 'thanks':
			return;
		case 'confirm':
		case 'other-time':
		case 'choice':
		case 'words':
			return said.isAlarming ? alarm(ctx, entry, known) : aboutOne(ctx, { entry, said, known });
	}
}

/** Nobody is asked which newborn is meant before help is on its way: every follow-up of the number is alerted. */
async function alarm(ctx: Ctx, entry: ThreadEntryRow, known: readonly PhoneFollowUp[]): Promise<void> {
	await adviseEmergency(ctx, { entry, known });
	for (const about of known)
		await alertWords(ctx, { entry, about, isAlarming: true, isUncertain: known.length > 1 });
}

async function aboutOne(ctx: Ctx, { entry, said, known }: Saying): Promise<void> {
	const meant = known.length === 1 ? known : meantBy(said, known);
	const [about] = meant;
	if (about === undefined) return;
	if (meant.length === 1) return follow(ctx, { entry, said, about });
	await askWhich(ctx, { entry, known: meant });
	// The question may never be answered: until then the words are owed to somebody.
	await alertWords(ctx, { entry, about, isAlarming: false, isUncertain: true });
}

/** "Yes" can only be about a visit that waits for it; other words may be about any. */
function meantBy(said: Understood, known: readonly PhoneFollowUp[]): readonly PhoneFollowUp[] {
	const withVisit = known.filter(({ visitId }) => visitId !== null);
	const waiting = withVisit.filter(({ visitState }) => visitState === 'booked');
	if (said.means === 'confirm' && waiting.length > 0) return waiting;
	if (said.means === 'other-time' && withVisit.length > 0) return withVisit;
	return known;
}

interface Following {
	readonly entry: ThreadEntryRow;
	readonly said: Understood;
	readonly about: PhoneFollowUp;
}

async function follow(ctx: Ctx, { entry, said, about }: Following): Promise<void> {
	const { followUpId, carer } = about;
	if (entry.followUpId === null) await assignEntries(ctx.db, [entry.id], { followUpId, carerId: carer.id });
	const actor: CarerActor = { kind: 'carer', carerId: carer.id, followUpId };
	if (said.means === 'confirm') {
		const done = await confirmVisit(ctx, actor, { followUpId, via: 'sms' });
		if (done.ok) return;
	}
	if (said.means === 'other-time') {
		const done = await askForAnotherTime(ctx, actor, { followUpId, wish: entry.body.slice(0, 300) });
		if (done.ok) return withTx(ctx.db, (tx) => replanMessages(tx, ctx, followUpId));
	}
	// Nothing to confirm or to move, or words in full: a person reads them.
	await alertWords(ctx, { entry, about, isAlarming: false, isUncertain: false });
}

async function stop(ctx: Ctx, entry: ThreadEntryRow, known: readonly PhoneFollowUp[]): Promise<void> {
	await withTx(ctx.db, async (tx) => {
		await setSmsStopped(tx, entry.phone ?? '', ctx.clock.now());
		for (const about of known) {
			await alertContactStopped(tx, ctx, { entry, about });
			await replanMessages(tx, ctx, about.followUpId);
		}
	});
	await answerBy(ctx, { kind: 'stop-answer', entry, known });
}

async function start(ctx: Ctx, entry: ThreadEntryRow, known: readonly PhoneFollowUp[]): Promise<void> {
	await withTx(ctx.db, async (tx) => {
		await setSmsStopped(tx, entry.phone ?? '', null);
		for (const { followUpId } of known) await replanMessages(tx, ctx, followUpId);
	});
	await answerBy(ctx, { kind: 'start-answer', entry, known });
}

interface Chosen {
	readonly about: PhoneFollowUp;
	readonly waiting: readonly ThreadEntryRow[];
	/** The text that the question was about. */
	readonly asked: ThreadEntryRow;
}

/** The newborn that a number picks out, where we have asked; null where the text is no such answer. */
async function chosenNewborn(
	ctx: Ctx,
	{ text, said, known }: { text: IncomingText; said: Understood; known: readonly PhoneFollowUp[] }
): Promise<Chosen | null> {
	if (said.number === null || known.length < 2) return null;
	const since = new Date(ctx.clock.now().getTime() - QUESTION_HOURS * HOUR);
	const unassigned = await listUnassigned(ctx.db, text.from, since);
	const waiting = unassigned.filter(({ providerId }) => providerId !== text.providerId);
	const question = await findQuestionAbout(
		ctx.db,
		waiting.map(({ id }) => id)
	);
	const followUpId = question?.facts.choices?.split(' ')[said.number - 1];
	const about = known.find((one) => one.followUpId === followUpId);
	const asked = waiting.find(({ id }) => id === question?.occasion);
	return about && asked ? { about, waiting, asked } : null;
}

async function actOnWaiting(
	ctx: Ctx,
	{ about, waiting, asked }: Chosen,
	known: readonly PhoneFollowUp[]
): Promise<void> {
	const ids = waiting.map(({ id }) => id);
	await assignEntries(ctx.db, ids, { followUpId: about.followUpId, carerId: about.carer.id });
	await settleUncertain(ctx, ids, known);
	await follow(ctx, {
		entry: { ...asked, followUpId: about.followUpId },
		said: understand(asked.body),
		about
	});
}
