import { and, eq } from 'drizzle-orm';
import type { CarerActor } from '../../domain/access/roles';
import type { AlertKind } from '../../domain/followup/alert';
import { triageCheckIn } from '../../domain/guideline';
import type { CheckInAnswers, CheckInResult, CheckInTriage } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { checkIns } from '../db/schema/follow-up';
import { conflict, notFound, type AppError } from '../errors';
import type { LoadedFollowUp } from '../repos/follow-ups';
import { findNewbornRecord } from '../repos/newborns';
import { raiseAlert } from './alerts';
import { changeFollowUp } from './change';
import { replanMessages } from './message-plan';

const MINUTE = 60_000;

interface Raised {
	readonly kind: AlertKind;
	readonly dueInMinutes: number;
	readonly alsoPediatrician: boolean;
}

/** What each result owes: an emergency is due now to desk and pediatrician; times follow what the parent is told. */
const RAISES: Readonly<Record<CheckInResult, Raised | null>> = {
	emergency: { kind: 'check-in-emergency', dueInMinutes: 0, alsoPediatrician: true },
	today: { kind: 'check-in-today', dueInMinutes: 30, alsoPediatrician: true },
	'call-back': { kind: 'check-in-call-back', dueInMinutes: 240, alsoPediatrician: false },
	'as-planned': null
};

async function raise(
	tx: Tx,
	ctx: Ctx,
	asked: { loaded: LoadedFollowUp; checkInId: string; triage: CheckInTriage }
): Promise<void> {
	const { loaded, checkInId, triage } = asked;
	const raised = RAISES[triage.result];
	if (!raised) return;
	const roles = raised.alsoPediatrician ? (['desk', 'pediatrician'] as const) : (['desk'] as const);
	for (const role of roles) {
		await raiseAlert(tx, ctx, {
			followUpId: loaded.row.id,
			kind: raised.kind,
			role,
			siteId: loaded.row.clinicId,
			dueAt: new Date(ctx.clock.now().getTime() + raised.dueInMinutes * MINUTE),
			detail: triage.reasons
				.map((reason) => reason.text)
				.join(' ')
				.slice(0, 500),
			dedupeKey: `check-in ${checkInId} ${role}`
		});
	}
}

export interface AnsweredCheckIn {
	readonly checkInId: string;
	readonly triage: CheckInTriage;
}

async function findSame(tx: Tx, followUpId: string, submissionKey: string): Promise<AnsweredCheckIn | null> {
	const [same] = await tx
		.select()
		.from(checkIns)
		.where(and(eq(checkIns.followUpId, followUpId), eq(checkIns.submissionKey, submissionKey)));
	return same ? { checkInId: same.id, triage: { result: same.result, reasons: same.reasons } } : null;
}

/**
 * A carer's answers, judged at once; the worst answer decides and raises what it owes, in the same transaction.
 * The same submission key again (a second press of the button) gives the same answer and raises nothing new.
 */
export function answerCheckIn(
	ctx: Ctx,
	actor: CarerActor,
	{ answers, submissionKey }: { readonly answers: CheckInAnswers; readonly submissionKey: string }
): Promise<Result<AnsweredCheckIn, AppError>> {
	const { followUpId } = actor;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.view'] }, async (tx, loaded) => {
		const same = await findSame(tx, followUpId, submissionKey);
		if (same) return ok(same);
		if (loaded.state.stage === 'closed')
			return err(conflict('This follow-up is closed. Please call the clinic.'));
		const record = await findNewbornRecord(tx, loaded.row.newbornId);
		if (!record) return err(notFound);
		const now = ctx.clock.now();
		const birthWeightGrams = record.newborn.birthWeightGrams ?? undefined;
		const triage = triageCheckIn(answers, {
			bornAt: record.newborn.bornAt,
			feeding: record.newborn.feeding,
			now,
			birthWeightGrams
		});
		const id = ctx.random.id();
		await tx.insert(checkIns).values({
			id,
			followUpId,
			carerId: actor.carerId,
			answers,
			result: triage.result,
			reasons: [...triage.reasons],
			answeredAt: now,
			submissionKey
		});
		await raise(tx, ctx, { loaded, checkInId: id, triage });
		await replanMessages(tx, ctx, followUpId);
		return ok({ checkInId: id, triage });
	});
}
