import type { StaffActor } from '../../domain/access/roles';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import { invalid, type AppError } from '../errors';
import { findFollowUp } from '../repos/follow-ups';
import { bookVisit, moveVisit, type WantedPlace } from './visits';

export interface PlaceAsked extends WantedPlace {
	readonly followUpId: string;
	/** Why a visit moves; needed where the newborn has one. */
	readonly why: string;
}

/** Takes a place on the calendar: a first visit, or the newborn's visit moved there. */
export async function takePlace(
	ctx: Ctx,
	actor: StaffActor,
	{ why, ...wanted }: PlaceAsked
): Promise<Result<'booked' | 'moved', AppError>> {
	const loaded = await findFollowUp(ctx.db, wanted.followUpId);
	if (!loaded?.openVisit) {
		const booked = await bookVisit(ctx, actor, wanted);
		return booked.ok ? ok('booked') : booked;
	}
	if (why.trim() === '') return err(invalid('Say why the visit moves, in a few words.', 'why'));
	const moved = await moveVisit(ctx, actor, { ...wanted, why });
	return moved.ok ? ok('moved') : moved;
}
