import { and, eq } from 'drizzle-orm';
import type { StaffActor } from '../../domain/access/roles';
import type { AttemptChannel, AttemptOutcome } from '../../domain/followup/attempt';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import { attempts } from '../db/schema/follow-up';
import { carers } from '../db/schema/newborn';
import { invalid, type AppError } from '../errors';
import { changeFollowUp } from './change';
import { replanMessages } from './message-plan';

export interface NewAttempt {
	readonly followUpId: string;
	readonly carerId: string | null;
	readonly channel: AttemptChannel;
	readonly outcome: AttemptOutcome;
	readonly note: string;
}

/** Writes down one try to reach a family, with its outcome. */
export function logAttempt(
	ctx: Ctx,
	actor: StaffActor,
	attempt: NewAttempt
): Promise<Result<null, AppError>> {
	const { followUpId, carerId, note, channel, outcome } = attempt;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['attempt.log'] }, async (tx, loaded) => {
		if (carerId !== null) {
			const ofNewborn = and(eq(carers.id, carerId), eq(carers.newbornId, loaded.row.newbornId));
			const [carer] = await tx.select({ id: carers.id }).from(carers).where(ofNewborn);
			if (!carer) return err(invalid('Choose one of the carers of this newborn.', 'carerId'));
		}
		await tx.insert(attempts).values({
			id: ctx.random.id(),
			followUpId,
			round: loaded.row.round,
			carerId,
			channel,
			outcome,
			note: note || null,
			staffId: actor.staffId,
			at: ctx.clock.now()
		});
		// A family that was reached needs no further rung of the ladder.
		await replanMessages(tx, ctx, followUpId);
		return ok(null);
	});
}
