import { can, sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { err, ok, type Result } from '../../domain/result';
import type { StrayAnswer, StrayNumber, StrayPage, StrayText } from '../../schemas/stray';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import { findFollowUp } from '../repos/follow-ups';
import { listClinics } from '../repos/queue';
import {
	findStray,
	listAnswers,
	listOpenStrays,
	listOpenStraysOfPhone,
	type Stray
} from '../repos/stray-texts';
import { mayOn } from './change';
import { strayAnswerKey } from './stray-texts';

/** More than a desk can work through before it looks again; alarming ones come first. */
const MOST_TEXTS = 100;

export interface StrayList {
	readonly numbers: readonly StrayNumber[];
	/** More wait behind these. */
	readonly hasMore: boolean;
}

/** Texts of unknown numbers that the desks of the actor's organisation owe, by number, alarming ones first. */
export async function listStrays(ctx: Ctx, actor: StaffActor): Promise<StrayList> {
	const { organisationId } = actor;
	if (!can(actor, 'stray-text.settle', { organisationId })) return { numbers: [], hasMore: false };
	const open = await listOpenStrays(ctx.db, organisationId, MOST_TEXTS + 1);
	return { numbers: await byNumber(ctx, open.slice(0, MOST_TEXTS)), hasMore: open.length > MOST_TEXTS };
}

const textOf = ({ entry, stray }: Stray): StrayText => ({
	entryId: entry.id,
	at: entry.at,
	words: entry.body,
	isAlarming: entry.isAlarming,
	dueAt: stray.dueAt
});

type Answer = Awaited<ReturnType<typeof listAnswers>>[number];

const FAILED: readonly (string | null)[] = ['failed', 'undelivered'];

function stateOf(answers: readonly Answer[]): StrayAnswer {
	if (answers.length === 0) return 'none';
	if (answers.some(({ state, delivery }) => state === 'sent' && !FAILED.includes(delivery))) return 'sent';
	const waits = answers.some(
		({ state }) => state === 'planned' || state === 'sending' || state === 'unknown'
	);
	return waits ? 'on-its-way' : 'not-sent';
}

async function byNumber(ctx: Ctx, open: readonly Stray[]): Promise<StrayNumber[]> {
	const alarming = open.filter(({ entry }) => entry.isAlarming);
	const answers = await listAnswers(
		ctx.db,
		alarming.map(({ entry }) => strayAnswerKey('emergency-advice', entry.id))
	);
	const phones = [...new Set(open.map(({ entry }) => entry.phone ?? ''))];
	return phones.map((phone) => {
		const texts = open.filter(({ entry }) => (entry.phone ?? '') === phone).map(textOf);
		const ids = texts.map(({ entryId }) => entryId);
		return {
			phone,
			texts: texts.sort((a, b) => a.at.getTime() - b.at.getTime()),
			isAlarming: texts.some(({ isAlarming }) => isAlarming),
			dueAt: new Date(Math.min(...texts.map(({ dueAt }) => dueAt.getTime()))),
			advice: stateOf(answers.filter(({ occasion }) => ids.includes(occasion)))
		};
	});
}

/** One number with everything that is owed for it, found by one of its texts; also says who settled that text. */
export async function getStray(
	ctx: Ctx,
	actor: StaffActor,
	entryId: string
): Promise<Result<StrayPage, AppError>> {
	const found = await findStray(ctx.db, entryId);
	if (found === null || !can(actor, 'stray-text.settle', found.stray)) return err(notFound);
	const { stray, entry } = found;
	const phone = entry.phone ?? '';
	const open = stray.settledAt ? [] : await listOpenStraysOfPhone(ctx.db, stray.organisationId, phone);
	const [number = null] = await byNumber(ctx, open);
	const clinics = await listClinics(ctx.db, sitesWhere(actor, 'queue.view'));
	return ok({
		nowAt: ctx.clock.now(),
		timeZone: clinics[0]?.timeZone ?? 'UTC',
		entryId,
		phone,
		number,
		settled: stray.settledAt && {
			by: found.settledByName,
			at: stray.settledAt,
			as: stray.settledAs ?? 'not-ours',
			followUpId: await ownOnly(ctx, actor, stray.followUpId)
		}
	});
}

async function ownOnly(ctx: Ctx, actor: StaffActor, followUpId: string | null): Promise<string | null> {
	const loaded = followUpId === null ? null : await findFollowUp(ctx.db, followUpId);
	return loaded && mayOn(actor, ['thread.view'], loaded) ? followUpId : null;
}
