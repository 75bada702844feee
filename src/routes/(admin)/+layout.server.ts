import { requireActor } from '$lib/server/auth/guard';
import { getFrame } from '$lib/server/services/frame';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals }) => ({
	actor: await getFrame(locals.ctx, requireActor(locals.actor))
});
