import { familyWords } from '$lib/i18n/family-words';
import { familyLocale } from '$lib/i18n/family-locale';
import { otherTimeSchema } from '$lib/schemas/check-in';
import { carerOfLink } from '$lib/server/services/parent-page';
import { askForAnotherTime, confirmVisit } from '$lib/server/services/visits';
import { error, fail, redirect } from '@sveltejs/kit';
import type { Actions, RequestEvent } from './$types';

async function carerOf({ params, locals }: RequestEvent) {
	const carer = await carerOfLink(locals.ctx, params.token);
	if (!carer.ok) error(carer.error === 'ended' ? 410 : 404, 'link');
	return carer.value;
}

/** The refusal in the family's words: what they can do about it is always to call. */
function refusal({ url }: RequestEvent) {
	return fail(409, {
		refused: familyWords(familyLocale(url.searchParams.get('lang'), 'en'))('public_error_no_visit')
	});
}

const backTo = ({ url }: RequestEvent) =>
	`${url.pathname}${url.searchParams.has('lang') ? `?lang=${url.searchParams.get('lang')}` : ''}`;

export const actions: Actions = {
	confirm: async (event) => {
		const actor = await carerOf(event);
		const done = await confirmVisit(event.locals.ctx, actor, { followUpId: actor.followUpId, via: 'link' });
		if (!done.ok) return refusal(event);
		redirect(303, backTo(event));
	},
	otherTime: async (event) => {
		const actor = await carerOf(event);
		const parsed = otherTimeSchema.safeParse(Object.fromEntries(await event.request.formData()));
		const wish = parsed.success ? parsed.data.wish : '';
		const done = await askForAnotherTime(event.locals.ctx, actor, { followUpId: actor.followUpId, wish });
		if (!done.ok) return refusal(event);
		redirect(303, backTo(event));
	}
};
