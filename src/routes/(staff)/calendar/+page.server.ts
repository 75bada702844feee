import { chooseSchema, dayQuerySchema, placeOfWord } from '$lib/schemas/desk';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { refuseForm } from '$lib/server/http/form';
import { getCalendar } from '$lib/server/services/desk-calendar';
import { takePlace } from '$lib/server/services/take-place';
import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const asked = dayQuerySchema.parse(Object.fromEntries(url.searchParams));
	const calendar = await getCalendar(locals.ctx, requireActor(locals.actor), {
		clinicId: asked.clinic,
		on: asked.on,
		forId: asked.for
	});
	if (!calendar.ok) error(404, 'There is no such calendar, or it is not one of yours.');
	const place = asked.place && placeOfWord(asked.place) ? asked.place : null;
	return {
		calendar: calendar.value,
		place: calendar.value.choosingFor ? place : null,
		form: await superValidate(zod4(chooseSchema), { id: 'choose' })
	};
};

export const actions: Actions = {
	choose: async ({ locals, request, url }) => {
		const actor = requireActor(locals.actor);
		const { ctx } = locals;
		const form = await superValidate(request, zod4(chooseSchema), { id: 'choose' });
		const followUpId = dayQuerySchema.parse(Object.fromEntries(url.searchParams)).for;
		if (!followUpId) error(404, 'Choose a newborn first.');
		const place = placeOfWord(form.data.place);
		if (!form.valid || !place) return fail(422, { form });
		const { why, outsideWindowWhy } = form.data;
		const done = await takePlace(ctx, actor, {
			...place,
			followUpId,
			why,
			outsideWindowWhy: outsideWindowWhy || undefined
		});
		if (!done.ok) {
			const { error: refusal } = done;
			const isPlace = refusal.code === 'invalid' && refusal.field === 'startsAt';
			return refuseForm(form, isPlace ? { ...refusal, field: 'place' } : refusal);
		}
		await recordAccess(ctx.db, ctx, {
			organisationId: actor.organisationId,
			staffId: actor.staffId,
			action: 'follow-up.changed',
			followUpId,
			detail: done.value
		});
		redirect(303, `/queue/${followUpId}?done=${done.value}`);
	}
};
