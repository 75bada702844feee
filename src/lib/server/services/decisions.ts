import { and, eq, gte, inArray } from 'drizzle-orm';
import type { StaffActor } from '../../domain/access/roles';
import { isLadderDone } from '../../domain/followup/ladder';
import type { Outcome } from '../../domain/followup/states';
import {
	allowsDischarge,
	isUrgentDisposition,
	type Decision,
	type FollowUpEvent
} from '../../domain/followup/transition';
import type { Assessment, AssessmentInput, PhototherapySetting } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { attempts, decisions, visits } from '../db/schema/follow-up';
import { messages } from '../db/schema/messaging';
import { phototherapyCourses } from '../db/schema/newborn';
import { conflict, invalid, notFound, type AppError } from '../errors';
import { lockFollowUp, type LoadedFollowUp } from '../repos/follow-ups';
import { findNewbornRecord, findRunningPhototherapy } from '../repos/newborns';
import { advance, type Told } from './advance';
import { settleAllAlerts } from './alerts';
import { assessmentInputOf, assessRecord, lastLeftAt } from './assessment';
import { changeFollowUp } from './change';

interface Judged {
	readonly input: AssessmentInput;
	readonly assessment: Assessment;
}

async function judge(tx: Tx, ctx: Ctx, loaded: LoadedFollowUp): Promise<Result<Judged, AppError>> {
	const record = await findNewbornRecord(tx, loaded.row.newbornId);
	if (!record) return err(notFound);
	const dischargeAt = lastLeftAt(loaded.row, record);
	const asked = { standard: loaded.row.standard, dischargeAt, now: ctx.clock.now() };
	const assessed = assessRecord(record, asked);
	if (!assessed.ok) return err(invalid(assessed.error[0]?.message ?? 'The values cannot be assessed.'));
	return ok({ input: assessmentInputOf(record, asked), assessment: assessed.value });
}

async function advanceAndTidy(
	tx: Tx,
	ctx: Ctx,
	asked: { loaded: LoadedFollowUp; event: FollowUpEvent; told: Told }
): Promise<Result<LoadedFollowUp, AppError>> {
	const { loaded, event, told } = asked;
	const advanced = await advance(tx, ctx, loaded, event, told);
	if (!advanced.ok) return advanced;
	if (advanced.value.state.stage === 'closed')
		await settleAllAlerts(tx, ctx, loaded.row.id, 'The follow-up was closed.');
	return advanced;
}

/** What the standard's disposition comes to as a decision; a decision that differs is an override and needs a reason. */
export function isOverride(assessment: Assessment, decision: Decision): boolean {
	if (isUrgentDisposition(assessment.disposition)) return decision.then !== 'treat';
	if (allowsDischarge(assessment.disposition)) {
		if (assessment.disposition === 'judgement') return decision.then === 'treat';
		if (decision.then !== 'repeat') return true;
		return assessment.window !== null && decision.window.until > assessment.window.until;
	}
	return decision.then !== 'repeat';
}

async function insertDecision(
	tx: Tx,
	ctx: Ctx,
	asked: {
		loaded: LoadedFollowUp;
		judged: Judged;
		decision: Decision;
		reason: string;
		actor: StaffActor;
		isOverride: boolean;
	}
): Promise<void> {
	const { loaded, judged, decision, reason, actor } = asked;
	const { assessment, input } = judged;
	const deciding =
		assessment.decidingIndex === null ? undefined : assessment.measurements[assessment.decidingIndex];
	await tx.insert(decisions).values({
		id: ctx.random.id(),
		followUpId: loaded.row.id,
		round: loaded.row.round,
		measurementId: deciding?.measurement.id ?? null,
		standard: assessment.standard,
		edition: assessment.edition,
		recommended: assessment.disposition,
		chosen: decision.then,
		isOverride: asked.isOverride,
		reason: reason || null,
		assessment: { input, result: assessment },
		decidedBy: actor.staffId,
		decidedAt: ctx.clock.now()
	});
}

async function startCourse(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	asked: { actor: StaffActor; setting: PhototherapySetting }
): Promise<void> {
	if (await findRunningPhototherapy(tx, loaded.row.newbornId)) return;
	const now = ctx.clock.now();
	await tx.insert(phototherapyCourses).values({
		id: ctx.random.id(),
		newbornId: loaded.row.newbornId,
		setting: asked.setting,
		startedAt: now,
		recordedAt: now,
		recordedBy: asked.actor.staffId
	});
}

export interface DecisionAsked {
	readonly followUpId: string;
	readonly decision: Decision;
	/** Required where the decision differs from the recommendation. */
	readonly reason: string;
	/** Where phototherapy is given, when the decision is to treat. */
	readonly setting?: PhototherapySetting;
}

/** The pediatrician accepts the recommendation or overrides it with a reason; the result on the screen is kept with it. */
export function decide(
	ctx: Ctx,
	actor: StaffActor,
	asked: DecisionAsked
): Promise<Result<{ readonly followUpId: string }, AppError>> {
	const { followUpId, decision, reason } = asked;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.decide'] }, async (tx, loaded) => {
		const judged = await judge(tx, ctx, loaded);
		if (!judged.ok) return judged;
		const isOther = isOverride(judged.value.assessment, decision);
		if (isOther && !reason.trim()) return err(invalid('Say why you decide otherwise.', 'reason'));
		await insertDecision(tx, ctx, {
			loaded,
			judged: judged.value,
			decision,
			reason,
			actor,
			isOverride: isOther
		});
		if (decision.then === 'treat')
			await startCourse(tx, ctx, loaded, { actor, setting: asked.setting ?? 'readmission' });
		const event: FollowUpEvent = isOther
			? { kind: 'overridden', decision, reason }
			: { kind: 'accepted', decision };
		const told = {
			actor,
			why: reason,
			detail: { recommended: judged.value.assessment.disposition, chosen: decision.then }
		};
		const done = await advanceAndTidy(tx, ctx, { loaded, event, told });
		return done.ok ? ok({ followUpId }) : done;
	});
}

/** Records the end of phototherapy; the window for the repeat value comes from the standard's rule after treatment. */
export function endTreatment(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, endedAt }: { readonly followUpId: string; readonly endedAt: Date }
): Promise<Result<{ readonly followUpId: string }, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.decide'] }, async (tx, loaded) => {
		const course = await findRunningPhototherapy(tx, loaded.row.newbornId);
		if (!course) return err(conflict('No phototherapy is running.'));
		if (endedAt < course.startedAt || endedAt > ctx.clock.now()) {
			return err(invalid('The end must lie after the start and not in the future.', 'endedAt'));
		}
		await tx.update(phototherapyCourses).set({ endedAt }).where(eq(phototherapyCourses.id, course.id));
		const judged = await judge(tx, ctx, loaded);
		if (!judged.ok) return judged;
		const { window } = judged.value.assessment;
		if (!window) return err(conflict('The standard asks for something else first: see the recommendation.'));
		const done = await advance(tx, ctx, loaded, { kind: 'treatment-ended', window }, { actor });
		return done.ok ? ok({ followUpId }) : done;
	});
}

/** Since when the family counts as missing: the start of the visit it last missed in this round. */
async function ladderDone(tx: Tx, ctx: Ctx, loaded: LoadedFollowUp): Promise<boolean> {
	const missed = await tx
		.select({ startsAt: visits.startsAt })
		.from(visits)
		.where(
			and(
				eq(visits.followUpId, loaded.row.id),
				eq(visits.round, loaded.row.round),
				eq(visits.state, 'missed')
			)
		);
	const since = missed.map((visit) => visit.startsAt).sort((a, b) => a.getTime() - b.getTime())[0];
	if (!since) return false;
	const tried = await tx
		.select()
		.from(attempts)
		.where(and(eq(attempts.followUpId, loaded.row.id), gte(attempts.at, since)));
	const sent = await tx
		.select({ id: messages.id })
		.from(messages)
		.where(
			and(
				eq(messages.followUpId, loaded.row.id),
				inArray(messages.kind, ['visit-missed', 'visit-missed-again']),
				eq(messages.state, 'sent')
			)
		)
		.limit(1);
	return isLadderDone({
		since,
		now: ctx.clock.now(),
		policy: loaded.clinic.policy,
		window: loaded.state.window,
		attempts: tried,
		hasMessageSent: sent.length > 0
	});
}

/** Closes the loop with an outcome. "Not reached" needs the whole ladder. */
export function closeFollowUp(
	ctx: Ctx,
	actor: StaffActor,
	{
		followUpId,
		outcome,
		why
	}: { readonly followUpId: string; readonly outcome: Outcome; readonly why: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.decide'] }, async (tx, loaded) => {
		if (!why.trim()) return err(invalid('Say why the follow-up closes.', 'why'));
		const isDone = outcome === 'not-reached' && (await ladderDone(tx, ctx, loaded));
		const event: FollowUpEvent = { kind: 'closed', outcome, isLadderDone: isDone };
		const done = await advanceAndTidy(tx, ctx, { loaded, event, told: { actor, why, detail: { outcome } } });
		return done.ok ? ok(null) : done;
	});
}

/** Opens a closed follow-up again: the pediatrician owes a decision. */
export function reopenFollowUp(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, why }: { readonly followUpId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.decide'] }, async (tx, loaded) => {
		if (!why.trim()) return err(invalid('Say why the follow-up opens again.', 'why'));
		const done = await advance(tx, ctx, loaded, { kind: 'reopened' }, { actor, why });
		return done.ok ? ok(null) : done;
	});
}

/** Closes a follow-up that was entered twice in favour of the other one, which must be open and of the same organisation. */
export function mergeFollowUp(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, intoId, why }: { readonly followUpId: string; readonly intoId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['follow-up.decide'] }, async (tx, loaded) => {
		const other = intoId === followUpId ? null : await lockFollowUp(tx, intoId);
		if (
			!other ||
			other.organisationId !== loaded.organisationId ||
			other.row.clinicId !== loaded.row.clinicId
		) {
			return err(invalid('The other follow-up was not found at this clinic.', 'intoId'));
		}
		if (other.state.stage === 'closed') return err(invalid('The other follow-up is closed.', 'intoId'));
		const told = { actor, why, detail: { intoId } };
		const done = await advanceAndTidy(tx, ctx, { loaded, event: { kind: 'merged', intoId }, told });
		return done.ok ? ok(null) : done;
	});
}
