import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { getNewbornView } from '$lib/server/services/newborn-view';
import { error } from '@sveltejs/kit';
import type { PageServerLoad } from './$types';

const NOT_HERE = 'There is no such record, or it is not one of yours.';

export const load: PageServerLoad = async ({ locals, params }) => {
	const actor = requireActor(locals.actor);
	const found = await getNewbornView(locals.ctx, actor, params.followUpId);
	if (!found.ok || !found.value.values) error(404, NOT_HERE);
	const { messages: _messages, words: _words, mergeTargets: _targets, ...view } = found.value;
	await recordAccess(locals.ctx.db, locals.ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'summary.viewed',
		followUpId: params.followUpId
	});
	return { view, values: found.value.values, printedBy: actor.name };
};
