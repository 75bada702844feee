import { and, eq } from 'drizzle-orm';
import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { DischargeFacts } from '../../domain/followup/discharge';
import { DEFAULT_POLICY } from '../../domain/followup/policy';
import { openFollowUp } from '../../domain/followup/transition';
import type { Assessment, Refusal } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { organisations, sites } from '../db/schema/organisation';
import { isDuplicate, withTx } from '../db/tx';
import { conflict, invalid, notAllowed, notFound, type AppError } from '../errors';
import { insertNewborn, saveDischargeFacts, updateNewborn } from '../repos/discharge-facts';
import {
	insertFollowUp,
	insertTransition,
	lockFollowUp,
	saveFollowUp,
	type LoadedFollowUp
} from '../repos/follow-ups';
import { findNewbornRecord } from '../repos/newborns';
import { advance } from './advance';
import { assessRecord } from './assessment';
import { changeFollowUp } from './change';
import { ensureParentLink } from './parent-links';
import { bookWithin, type WantedPlace } from './visits';

export interface SavedDischarge {
	readonly followUpId: string;
	readonly assessment: Assessment;
}

const SAME_RECORD = conflict('Another newborn already has this record number.');

function refusalAsError(refusals: readonly Refusal[]): AppError {
	const [first] = refusals;
	return invalid(first?.message ?? 'These values cannot be assessed.', first?.field);
}

async function reassess(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	actor: StaffActor
): Promise<Result<SavedDischarge, AppError>> {
	const record = await findNewbornRecord(tx, loaded.row.newbornId);
	if (!record) return err(notFound);
	const { standard, plannedDischargeAt } = loaded.row;
	const assessed = assessRecord(record, { standard, dischargeAt: plannedDischargeAt, now: ctx.clock.now() });
	if (!assessed.ok) return err(refusalAsError(assessed.error));
	const { disposition, window } = assessed.value;
	const saved = await advance(
		tx,
		ctx,
		loaded,
		{ kind: 'assessed', disposition, window },
		{ actor, detail: { edition: assessed.value.edition } }
	);
	return saved.ok ? ok({ followUpId: loaded.row.id, assessment: assessed.value }) : saved;
}

/** The clinic must be one of the same organisation; its policy gives the due times. */
async function clinicOf(tx: Tx, organisationId: string, clinicId: string) {
	const [clinic] = await tx
		.select({ standard: organisations.standard, policy: sites.policy })
		.from(sites)
		.innerJoin(organisations, eq(organisations.id, sites.organisationId))
		.where(and(eq(sites.id, clinicId), eq(sites.organisationId, organisationId), eq(sites.kind, 'clinic')));
	return clinic ?? null;
}

async function begin(
	tx: Tx,
	ctx: Ctx,
	asked: { actor: StaffActor; birthSiteId: string; facts: DischargeFacts }
): Promise<Result<LoadedFollowUp, AppError>> {
	const { actor, birthSiteId, facts } = asked;
	const clinic = await clinicOf(tx, actor.organisationId, facts.clinicId);
	if (!clinic) return err(invalid('Choose a clinic.', 'clinicId'));
	const now = ctx.clock.now();
	const newbornId = await insertNewborn(tx, ctx, {
		organisationId: actor.organisationId,
		birthSiteId,
		facts
	});
	const followUpId = ctx.random.id();
	const state = openFollowUp(
		{ birthSiteId, clinicId: facts.clinicId, plannedDischargeAt: facts.plannedDischargeAt },
		{ now, policy: clinic.policy ?? DEFAULT_POLICY }
	);
	await insertFollowUp(tx, { id: followUpId, newbornId, standard: clinic.standard }, state, now);
	await insertTransition(tx, {
		id: ctx.random.id(),
		followUpId,
		kind: 'entered',
		fromStage: null,
		toStage: state.stage,
		actor,
		why: null,
		detail: {},
		at: now,
		sequence: 1
	});
	const loaded = await lockFollowUp(tx, followUpId);
	if (!loaded) throw new Error('A follow-up vanished while it was entered.');
	return ok(loaded);
}

class Refused extends Error {
	constructor(readonly error: AppError) {
		super(error.code);
	}
}

/**
 * Enters a newborn: record, family, measurements, follow-up and its first assessment in one transaction.
 * Refused: record number in use, clinic of another organisation, values outside the standard's range.
 */
export async function enterDischarge(
	ctx: Ctx,
	actor: StaffActor,
	{ birthSiteId, facts }: { readonly birthSiteId: string; readonly facts: DischargeFacts }
): Promise<Result<SavedDischarge, AppError>> {
	const resource = { organisationId: actor.organisationId, birthSiteId, clinicId: facts.clinicId };
	if (!can(actor, 'discharge.enter', resource)) return err(notAllowed);
	try {
		return await withTx(ctx.db, async (tx) => {
			const begun = await begin(tx, ctx, { actor, birthSiteId, facts });
			if (!begun.ok) throw new Refused(begun.error);
			await saveDischargeFacts(tx, ctx, {
				newbornId: begun.value.row.newbornId,
				facts,
				staffId: actor.staffId
			});
			const saved = await reassess(tx, ctx, begun.value, actor);
			if (!saved.ok) throw new Refused(saved.error);
			return saved;
		});
	} catch (error) {
		if (error instanceof Refused) return err(error.error);
		if (isDuplicate(error)) return err(SAME_RECORD);
		throw error;
	}
}

async function revise(
	tx: Tx,
	ctx: Ctx,
	asked: { loaded: LoadedFollowUp; actor: StaffActor; facts: DischargeFacts }
): Promise<Result<SavedDischarge, AppError>> {
	const { loaded, actor, facts } = asked;
	const clinic = await clinicOf(tx, actor.organisationId, facts.clinicId);
	if (!clinic) return err(invalid('Choose a clinic.', 'clinicId'));
	if (loaded.openVisit && loaded.row.clinicId !== facts.clinicId) {
		return err(invalid('Cancel the visit before you choose another clinic.', 'clinicId'));
	}
	await updateNewborn(tx, loaded.row.newbornId, facts);
	await saveDischargeFacts(tx, ctx, { newbornId: loaded.row.newbornId, facts, staffId: actor.staffId });
	const state = { ...loaded.state, clinicId: facts.clinicId, plannedDischargeAt: facts.plannedDischargeAt };
	await saveFollowUp(tx, loaded.row, state, ctx.clock.now());
	const fresh = await lockFollowUp(tx, loaded.row.id);
	return fresh ? reassess(tx, ctx, fresh, actor) : err(notFound);
}

/** Saves changes to a discharge that was not handed over yet, and assesses anew. */
export async function reviseDischarge(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, facts }: { readonly followUpId: string; readonly facts: DischargeFacts }
): Promise<Result<SavedDischarge, AppError>> {
	try {
		return await changeFollowUp(
			ctx,
			{ actor, followUpId, actions: ['discharge.edit'] },
			async (tx, loaded) => {
				if (loaded.row.handedOverAt)
					return err(conflict('This newborn was already handed over to the clinic.'));
				return revise(tx, ctx, { loaded, actor, facts });
			}
		);
	} catch (error) {
		if (isDuplicate(error)) return err(SAME_RECORD);
		throw error;
	}
}

/**
 * Finishes a discharge: books the visit (unless one stands or judgement leaves it to the desk), makes the parents'
 * links, hands over to the clinic; the messages follow from the same transaction.
 */
export function handOver(
	ctx: Ctx,
	actor: StaffActor,
	asked: {
		readonly followUpId: string;
		readonly place: WantedPlace | null;
		readonly againstAdviceWhy?: string;
	}
): Promise<Result<{ readonly followUpId: string }, AppError>> {
	const { followUpId, place, againstAdviceWhy } = asked;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['discharge.edit'] }, async (tx, loaded) => {
		if (loaded.row.handedOverAt) return err(conflict('This newborn was already handed over to the clinic.'));
		let current = loaded;
		if (place) {
			const booked = await bookWithin(tx, ctx, current, { actor, wanted: place });
			if (!booked.ok) return booked;
			current = booked.value;
		}
		const record = await findNewbornRecord(tx, current.row.newbornId);
		for (const carer of record?.carers ?? []) await ensureParentLink(tx, ctx, followUpId, carer.id);
		const isAgainstAdvice = Boolean(againstAdviceWhy?.trim());
		const done = await advance(
			tx,
			ctx,
			current,
			{ kind: 'handed-over', isAgainstAdvice },
			{ actor, why: againstAdviceWhy }
		);
		return done.ok ? ok({ followUpId }) : done;
	});
}
