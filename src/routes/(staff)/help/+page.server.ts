import { requireActor } from '$lib/server/auth/guard';
import { getHelp } from '$lib/server/services/help';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => ({
	help: await getHelp(locals.ctx, requireActor(locals.actor))
});
