import { readParentCalendar } from '$lib/server/services/calendar-feeds';
import { error } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ params, locals }) => {
	const calendar = await readParentCalendar(locals.ctx, params.token);
	if (calendar === null) error(404, 'link');
	return new Response(calendar, {
		headers: {
			'content-type': 'text/calendar; charset=utf-8',
			'content-disposition': 'attachment; filename="visit.ics"',
			'cache-control': 'no-store'
		}
	});
};
