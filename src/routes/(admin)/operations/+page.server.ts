import { requireCanEverywhere } from '$lib/server/auth/guard';
import { getOperations } from '$lib/server/services/operations';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) =>
	getOperations(locals.ctx, requireCanEverywhere(locals.actor, 'operations.view'));
