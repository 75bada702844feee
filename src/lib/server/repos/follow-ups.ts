import { and, eq, sql } from 'drizzle-orm';
import type { Actor } from '../../domain/access/roles';
import { actorId } from '../../domain/access/roles';
import type { SitePolicy } from '../../domain/followup/policy';
import type { FollowUpState, OpenVisit } from '../../domain/followup/state';
import type { Stage, TransitionKind } from '../../domain/followup/states';
import type { Reader, Tx } from '../db/client';
import { followUps, transitions, visits } from '../db/schema/follow-up';
import { newborns } from '../db/schema/newborn';
import { sites } from '../db/schema/organisation';

export type FollowUpRow = typeof followUps.$inferSelect;
export type VisitRow = typeof visits.$inferSelect;

/** A follow-up as a use case works on it: its row, its state for the rules, and the facts of its clinic. */
export interface LoadedFollowUp {
	readonly row: FollowUpRow;
	readonly state: FollowUpState;
	readonly openVisit: VisitRow | null;
	readonly organisationId: string;
	readonly clinic: { readonly policy: SitePolicy; readonly timeZone: string; readonly name: string };
	readonly unitPolicy: SitePolicy;
}

function stateOf(row: FollowUpRow, visit: OpenVisit | null): FollowUpState {
	return {
		stage: row.stage,
		round: row.round,
		birthSiteId: row.birthSiteId,
		clinicId: row.clinicId,
		plannedDischargeAt: row.plannedDischargeAt,
		handedOverAt: row.handedOverAt,
		disposition: row.disposition,
		window:
			row.windowFromAt && row.windowUntilAt
				? { from: row.windowFromAt, until: row.windowUntilAt, test: row.windowTest ?? 'judgement' }
				: null,
		visit,
		laterCheckAt: row.laterCheckAt,
		laterCheckAsks: row.laterCheckAsks,
		nextStep:
			row.nextStep && row.nextStepRole && row.nextStepSiteId && row.nextStepDueAt
				? {
						kind: row.nextStep,
						role: row.nextStepRole,
						siteId: row.nextStepSiteId,
						staffId: row.nextStepStaffId,
						dueAt: row.nextStepDueAt,
						climb: row.nextStepClimb,
						climbAt: row.nextStepClimbAt
					}
				: null,
		outcome: row.outcome,
		closedAt: row.closedAt,
		mergedIntoId: row.mergedIntoId
	};
}

async function load(db: Reader, followUpId: string, isForChange: boolean): Promise<LoadedFollowUp | null> {
	const query = db.select().from(followUps).where(eq(followUps.id, followUpId));
	const [row] = await (isForChange ? query.for('update') : query);
	if (!row) return null;
	const [visit] = await db
		.select()
		.from(visits)
		.where(and(eq(visits.followUpId, followUpId), eq(visits.isOpen, true)));
	const unit = sql<SitePolicy>`(select ${sites.policy} from ${sites} where ${sites.id} = ${row.birthSiteId})`;
	const [clinic] = await db
		.select({
			organisationId: newborns.organisationId,
			policy: sites.policy,
			timeZone: sites.timeZone,
			name: sites.name,
			unitPolicy: unit.mapWith(sites.policy)
		})
		.from(sites)
		.innerJoin(newborns, eq(newborns.id, row.newbornId))
		.where(eq(sites.id, row.clinicId));
	if (!clinic) return null;
	const openVisit = visit
		? { id: visit.id, startsAt: visit.startsAt, isConfirmed: visit.state === 'confirmed' }
		: null;
	return {
		row,
		state: stateOf(row, openVisit),
		openVisit: visit ?? null,
		organisationId: clinic.organisationId,
		clinic: { policy: clinic.policy, timeZone: clinic.timeZone, name: clinic.name },
		unitPolicy: clinic.unitPolicy
	};
}

/** Loads a follow-up and holds its row until the transaction ends, so that two changes never cross. */
export const lockFollowUp = (tx: Tx, followUpId: string) => load(tx, followUpId, true);

/** Loads a follow-up to look at. */
export const findFollowUp = (db: Reader, followUpId: string) => load(db, followUpId, false);

function columnsOf(state: FollowUpState) {
	return {
		stage: state.stage,
		round: state.round,
		plannedDischargeAt: state.plannedDischargeAt,
		handedOverAt: state.handedOverAt,
		disposition: state.disposition,
		windowFromAt: state.window?.from ?? null,
		windowUntilAt: state.window?.until ?? null,
		windowTest: state.window?.test ?? null,
		laterCheckAt: state.laterCheckAt,
		laterCheckAsks: state.laterCheckAsks,
		nextStep: state.nextStep?.kind ?? null,
		nextStepRole: state.nextStep?.role ?? null,
		nextStepSiteId: state.nextStep?.siteId ?? null,
		nextStepStaffId: state.nextStep?.staffId ?? null,
		nextStepDueAt: state.nextStep?.dueAt ?? null,
		nextStepClimb: state.nextStep?.climb ?? 0,
		nextStepClimbAt: state.nextStep?.climbAt ?? null,
		outcome: state.outcome,
		closedAt: state.closedAt,
		mergedIntoId: state.mergedIntoId
	};
}

export interface FollowUpFacts {
	readonly id: string;
	readonly newbornId: string;
	readonly standard: FollowUpRow['standard'];
}

export async function insertFollowUp(
	tx: Tx,
	facts: FollowUpFacts,
	state: FollowUpState,
	now: Date
): Promise<void> {
	await tx.insert(followUps).values({
		...facts,
		...columnsOf(state),
		birthSiteId: state.birthSiteId,
		clinicId: state.clinicId,
		createdAt: now,
		updatedAt: now
	});
}

/** Saves a state over the version it was read at. @throws Error when another change came between, which the lock forbids. */
export async function saveFollowUp(tx: Tx, row: FollowUpRow, state: FollowUpState, now: Date): Promise<void> {
	const [result] = await tx
		.update(followUps)
		.set({ ...columnsOf(state), clinicId: state.clinicId, version: row.version + 1, updatedAt: now })
		.where(and(eq(followUps.id, row.id), eq(followUps.version, row.version)));
	if (result.affectedRows !== 1) throw new Error('A follow-up changed under its lock.');
}

export interface TransitionNote {
	readonly id: string;
	readonly followUpId: string;
	readonly kind: TransitionKind;
	readonly fromStage: Stage | null;
	readonly toStage: Stage;
	readonly actor: Actor;
	readonly why: string | null;
	readonly detail: Record<string, string | number | null>;
	readonly at: Date;
	readonly sequence: number;
}

export async function insertTransition(tx: Tx, { actor, ...note }: TransitionNote): Promise<void> {
	await tx.insert(transitions).values({ ...note, actorKind: actor.kind, actorId: actorId(actor) });
}
