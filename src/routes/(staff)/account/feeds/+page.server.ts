import { feedEndSchema, feedSchema } from '$lib/schemas/feeds';
import { requireActor } from '$lib/server/auth/guard';
import { listCalendarFeeds, makeCalendarFeed, revokeCalendarFeed } from '$lib/server/services/calendar-feeds';
import { error, fail, redirect } from '@sveltejs/kit';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => ({
	list: await listCalendarFeeds(locals.ctx, requireActor(locals.actor))
});

export const actions: Actions = {
	make: async ({ request, locals }) => {
		const actor = requireActor(locals.actor);
		const asked = feedSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!asked.success) return fail(422, { refused: 'Choose a clinic from the list.' });
		const made = await makeCalendarFeed(locals.ctx, actor, asked.data.siteId);
		if (!made.ok) error(404, 'There is no such clinic, or it is not one of yours.');
		return { newUrl: made.value.url };
	},
	revoke: async ({ request, locals }) => {
		const actor = requireActor(locals.actor);
		const asked = feedEndSchema.safeParse(Object.fromEntries(await request.formData()));
		const ended = asked.success ? await revokeCalendarFeed(locals.ctx, actor, asked.data.id) : null;
		if (!ended?.ok) return fail(422, { refused: 'This address had ended already.' });
		redirect(303, '/account/feeds');
	}
};
