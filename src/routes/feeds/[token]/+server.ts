import { readCalendarFeed } from '$lib/server/services/calendar-feeds';
import { error } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ params, locals }) => {
	const calendar = await readCalendarFeed(locals.ctx, params.token);
	if (calendar === null) error(404, 'There is no such calendar.');
	return new Response(calendar, { headers: { 'content-type': 'text/calendar; charset=utf-8' } });
};
