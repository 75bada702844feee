import { searchQuerySchema } from '$lib/schemas/desk';
import { requireActor } from '$lib/server/auth/guard';
import { searchFollowUps } from '$lib/server/services/search';
import { json } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

/** Newborns of the reader's own sites that match `q`, for the search page while somebody types. */
export const GET: RequestHandler = async ({ locals, url }) => {
	const asked = searchQuerySchema.safeParse(Object.fromEntries(url.searchParams));
	const words = asked.success ? asked.data.q : '';
	return json({ found: await searchFollowUps(locals.ctx, requireActor(locals.actor), words) });
};
