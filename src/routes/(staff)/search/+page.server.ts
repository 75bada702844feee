import { mayEver } from '$lib/domain/access/can';
import { searchQuerySchema } from '$lib/schemas/desk';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { searchFollowUps } from '$lib/server/services/search';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = requireActor(locals.actor);
	const asked = searchQuerySchema.safeParse(Object.fromEntries(url.searchParams));
	const words = asked.success ? asked.data.q : '';
	const found = await searchFollowUps(locals.ctx, actor, words);
	if (words.length >= 2) {
		// What was searched for is a family's name or number: only how many answers it had is kept.
		await recordAccess(locals.ctx.db, locals.ctx, {
			organisationId: actor.organisationId,
			staffId: actor.staffId,
			action: 'search.made',
			detail: `${found.length} found`
		});
	}
	return {
		words,
		found,
		worksQueue: mayEver(actor, 'queue.view'),
		mayEnter: mayEver(actor, 'discharge.enter')
	};
};
