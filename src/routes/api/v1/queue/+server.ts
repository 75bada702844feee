import { queueQuerySchema } from '$lib/schemas/desk';
import { requireActor } from '$lib/server/auth/guard';
import { getQueue } from '$lib/server/services/queue';
import { json } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

/** The queue of the reader's own clinics, for keeping the page fresh. */
export const GET: RequestHandler = async ({ locals, url }) => {
	const { clinic, show, rows } = queueQuerySchema.parse(Object.fromEntries(url.searchParams));
	const asked = { clinicId: clinic, group: show, limit: rows };
	return json(await getQueue(locals.ctx, requireActor(locals.actor), asked));
};
