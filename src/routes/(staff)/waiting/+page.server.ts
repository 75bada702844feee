import { requireActor } from '$lib/server/auth/guard';
import { listWaiting } from '$lib/server/services/waiting';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	depends('fadewell:waiting');
	const rows = await listWaiting(locals.ctx, requireActor(locals.actor));
	return { rows, now: locals.ctx.clock.now() };
};
