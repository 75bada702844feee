import type { StaffActor } from '$lib/domain/access/roles';
import type { Result } from '$lib/domain/result';
import { dayQuerySchema, doneWords, markSchema, type Done } from '$lib/schemas/desk';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import type { Ctx } from '$lib/server/context';
import type { AppError } from '$lib/server/errors';
import { getMorning } from '$lib/server/services/morning';
import { confirmVisit, markArrived, markMissed } from '$lib/server/services/visits';
import { addressOf } from '$lib/ui/staff/desk/address';
import { error, fail, redirect } from '@sveltejs/kit';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const { clinic, on } = dayQuerySchema.parse(Object.fromEntries(url.searchParams));
	const morning = await getMorning(locals.ctx, requireActor(locals.actor), { clinicId: clinic, on });
	if (!morning.ok) error(404, 'There is no such list, or it is not one of yours.');
	return {
		morning: morning.value,
		done: doneWords(url.searchParams.get('done')),
		doneId: url.searchParams.get('for')
	};
};

type Work = (
	ctx: Ctx,
	actor: StaffActor,
	asked: { followUpId: string }
) => Promise<Result<unknown, AppError>>;

/** One button of one row: does it, then the same day again with a word of what was done. */
async function mark({ locals, request, url }: RequestEvent, done: Done, work: Work) {
	const asked = markSchema.safeParse(Object.fromEntries(await request.formData()));
	if (!asked.success) error(404, 'There is no such visit.');
	const { followUpId } = asked.data;
	const actor = requireActor(locals.actor);
	const result = await work(locals.ctx, actor, { followUpId });
	if (!result.ok) {
		if (result.error.code === 'not_found') error(404, 'There is no such record, or it is not one of yours.');
		const isRole = result.error.code === 'not_allowed';
		return fail(isRole ? 403 : 409, {
			followUpId,
			refused: 'message' in result.error ? result.error.message : 'Your role does not allow this.'
		});
	}
	await recordAccess(locals.ctx.db, locals.ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'follow-up.changed',
		followUpId,
		detail: done
	});
	const { clinic, on } = dayQuerySchema.parse(Object.fromEntries(url.searchParams));
	redirect(303, addressOf('/morning', { clinic, on, done, for: followUpId }));
}

export const actions: Actions = {
	confirm: (event) =>
		mark(event, 'confirmed', (ctx, actor, asked) => confirmVisit(ctx, actor, { ...asked, via: 'at-desk' })),
	arrive: (event) => mark(event, 'arrived', markArrived),
	miss: (event) => mark(event, 'missed', markMissed)
};
