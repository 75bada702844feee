import { can, type Action, type Resource } from '../../domain/access/can';
import type { Actor } from '../../domain/access/roles';
import type { Result } from '../../domain/result';
import { err } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { notAllowed, notFound, type AppError } from '../errors';
import { lockFollowUp, type LoadedFollowUp } from '../repos/follow-ups';

/** The sites and organisation against which a follow-up's access is decided. */
export const resourceOf = ({ organisationId, row }: LoadedFollowUp): Resource => ({
	organisationId,
	birthSiteId: row.birthSiteId,
	clinicId: row.clinicId
});

/** Staff may where the table says so; a carer only on the own follow-up; the worker acts for the product. */
export function mayOn(actor: Actor, actions: readonly Action[], loaded: LoadedFollowUp): boolean {
	switch (actor.kind) {
		case 'staff':
			return actions.some((action) => can(actor, action, resourceOf(loaded)));
		case 'carer':
			return actor.followUpId === loaded.row.id;
		case 'worker':
			return true;
	}
}

class Refused extends Error {
	constructor(readonly error: AppError) {
		super(error.code);
	}
}

/**
 * Changes one follow-up: one transaction, the row held, access decided before anything is touched.
 * Records outside the actor's sites are answered as if they did not exist. A refusal undoes everything.
 * @param actions any one of these is enough
 */
export async function changeFollowUp<T>(
	ctx: Ctx,
	asked: { readonly actor: Actor; readonly followUpId: string; readonly actions: readonly Action[] },
	work: (tx: Tx, loaded: LoadedFollowUp) => Promise<Result<T, AppError>>
): Promise<Result<T, AppError>> {
	try {
		return await withTx(ctx.db, async (tx) => {
			const loaded = await lockFollowUp(tx, asked.followUpId);
			if (!loaded || !mayOn(asked.actor, ['follow-up.view', 'discharge.view'], loaded))
				throw new Refused(notFound);
			if (!mayOn(asked.actor, asked.actions, loaded)) throw new Refused(notAllowed);
			const result = await work(tx, loaded);
			if (!result.ok) throw new Refused(result.error);
			return result;
		});
	} catch (error) {
		if (error instanceof Refused) return err(error.error);
		throw error;
	}
}
