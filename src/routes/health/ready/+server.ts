import { isDatabaseReady } from '$lib/server/services/operations';
import type { RequestHandler } from './$types';

/** The database answers and has every migration of this version. */
export const GET: RequestHandler = async ({ locals }) => {
	const ready = await isDatabaseReady(locals.ctx);
	return Response.json({ ready }, { status: ready ? 200 : 503 });
};
