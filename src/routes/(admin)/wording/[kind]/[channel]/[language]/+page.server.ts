import { KIND_WORDING } from '$lib/domain/messaging/wording';
import { restoreSchema, reviewSchema, wordingPlaceSchema, wordingSchema } from '$lib/schemas/wording';
import { requireCanEverywhere } from '$lib/server/auth/guard';
import { done, refuseForm } from '$lib/server/http/form';
import { getWording, markReviewed, restoreWording, saveWording } from '$lib/server/services/wording';
import { sampleValues } from '$lib/server/services/wording-sample';
import { error, redirect, type RequestEvent } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad } from './$types';

const NO_TEXT = 'There is no such text.';

function placeOf(params: Record<string, string>) {
	const place = wordingPlaceSchema.safeParse(params);
	if (!place.success) error(404, NO_TEXT);
	return place.data;
}

export const load: PageServerLoad = async ({ params, locals }) => {
	const actor = requireCanEverywhere(locals.actor, 'wording.manage');
	const place = placeOf(params);
	const versions = await getWording(locals.ctx, actor, place);
	if (!versions.ok) error(404, NO_TEXT);
	const current = versions.value.find(({ isCurrent }) => isCurrent);
	if (current === undefined) error(404, NO_TEXT);
	const words = { subject: current.subject ?? '', body: current.body, basedOn: current.version };
	const review = { version: current.version, reviewedBy: current.reviewedBy ?? '' };
	return {
		place,
		fields: KIND_WORDING[place.kind],
		sample: await sampleValues(locals.ctx, actor, place),
		standing: current.standing,
		reviewedBy: current.reviewedBy,
		versions: versions.value.map(({ version, subject, body, standing, createdAt, isCurrent }) => ({
			...{ version, subject, body, standing, createdAt },
			isCurrent: isCurrent === true
		})),
		form: await superValidate(words, zod4(wordingSchema), { id: 'wording', errors: false }),
		reviewForm: await superValidate(review, zod4(reviewSchema), { id: 'review', errors: false })
	};
};

const pageOf = ({ url }: RequestEvent): string => url.pathname;

export const actions: Actions = {
	save: async ({ request, params, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'wording.manage');
		const form = await superValidate(request, zod4(wordingSchema), { id: 'wording' });
		if (!form.valid) return fail(422, { form });
		const place = placeOf(params);
		const { basedOn, body } = form.data;
		const subject = place.channel === 'mail' ? form.data.subject : null;
		const saved = await saveWording(locals.ctx, actor, { ...place, subject, body, basedOn });
		if (!saved.ok) return refuseForm(form, saved.error);
		form.data.basedOn = saved.value.version;
		return done(form, `Version ${saved.value.version} is in use from now on, as a draft.`);
	},
	restore: async (event) => {
		const actor = requireCanEverywhere(event.locals.actor, 'wording.manage');
		const asked = restoreSchema.safeParse(Object.fromEntries(await event.request.formData()));
		if (!asked.success) return fail(422, { refused: NO_TEXT });
		const place = { ...placeOf(event.params), version: asked.data.version };
		const restored = await restoreWording(event.locals.ctx, actor, place);
		if (!restored.ok) error(404, NO_TEXT);
		redirect(303, pageOf(event));
	},
	review: async ({ request, params, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'wording.manage');
		const form = await superValidate(request, zod4(reviewSchema), { id: 'review' });
		if (!form.valid) return fail(422, { form });
		const { version, reviewedBy } = form.data;
		const mark = { ...placeOf(params), version, reviewedBy: reviewedBy || null };
		const marked = await markReviewed(locals.ctx, actor, mark);
		if (!marked.ok) return refuseForm(form, marked.error);
		return done(form, reviewedBy ? 'Marked as reviewed.' : 'It is a draft again.');
	}
};
