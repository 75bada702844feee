import { getHealth } from '$lib/server/services/operations';
import type { RequestHandler } from './$types';

/** Counts for a machine that watches; 503 where a person should look. Nothing about anybody. */
export const GET: RequestHandler = async ({ locals }) => {
	const health = await getHealth(locals.ctx);
	return Response.json(health, { status: health.isWell ? 200 : 503 });
};
