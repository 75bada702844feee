import { requireActor } from '$lib/server/auth/guard';
import { listDischarges } from '$lib/server/services/discharge-list';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) =>
	listDischarges(locals.ctx, requireActor(locals.actor));
