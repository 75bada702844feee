import type { Actor } from '../../domain/access/roles';
import type { DueContext } from '../../domain/followup/due';
import { transition, type FollowUpEvent } from '../../domain/followup/transition';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { conflict, type AppError } from '../errors';
import { insertTransition, lockFollowUp, saveFollowUp, type LoadedFollowUp } from '../repos/follow-ups';
import { releaseVisit } from '../repos/visits';
import { replanMessages } from './message-plan';

export interface Told {
	readonly actor: Actor;
	readonly why?: string;
	readonly detail?: Record<string, string | number | null>;
}

/** The site policy that counts for the step owed now: the unit's until the hand-over, the clinic's after it. */
function dueContext(loaded: LoadedFollowUp, event: FollowUpEvent, now: Date): DueContext {
	const isUnits = event.kind === 'climbed' && loaded.state.nextStep?.siteId === loaded.row.birthSiteId;
	return { now, policy: isUnits ? loaded.unitPolicy : loaded.clinic.policy };
}

/**
 * The only place where a follow-up's stage is saved: decides, saves, writes who, when, from, to and why, and derives
 * the messages anew, all in the caller's transaction.
 * @returns the follow-up as saved, or the refusal as a sentence
 */
export async function advance(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	event: FollowUpEvent,
	{ actor, why, detail }: Told
): Promise<Result<LoadedFollowUp, AppError>> {
	const now = ctx.clock.now();
	const decided = transition(loaded.state, event, dueContext(loaded, event, now));
	if (!decided.ok) return err(conflict(decided.error.message));
	// A visit that the new stage no longer holds leaves the calendar before the messages are derived.
	if (loaded.openVisit && !decided.value.visit)
		await releaseVisit(tx, loaded.openVisit, { state: 'cancelled', at: now });
	await saveFollowUp(tx, loaded.row, decided.value, now);
	await insertTransition(tx, {
		id: ctx.random.id(),
		followUpId: loaded.row.id,
		kind: event.kind,
		fromStage: loaded.state.stage,
		toStage: decided.value.stage,
		actor,
		why: why ?? null,
		detail: detail ?? {},
		at: now,
		sequence: loaded.row.version + 1
	});
	await replanMessages(tx, ctx, loaded.row.id);
	const saved = await lockFollowUp(tx, loaded.row.id);
	if (!saved) throw new Error('A follow-up vanished under its lock.');
	return ok(saved);
}
