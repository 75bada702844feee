import { error } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import {
	closedDaySchema,
	NEW_OPENING,
	openingSchema,
	rowSchema,
	siteSchema,
	storedPhone
} from '$lib/schemas/sites';
import { requireActor } from '$lib/server/auth/guard';
import { done, refuseForm } from '$lib/server/http/form';
import {
	addClosedDay,
	addOpening,
	getSiteScreen,
	removeClosedDay,
	removeOpening,
	saveSite
} from '$lib/server/services/sites';
import type { Actions, PageServerLoad } from './$types';

/** How many visits stay although their opening or day is gone, in words. */
function left(standing: number): string {
	if (standing === 0) return 'No visit was booked there.';
	const visits =
		standing === 1 ? '1 visit that was booked there stays' : `${standing} visits that were booked there stay`;
	return `${visits} in the calendar: move or keep each with its family.`;
}

export const load: PageServerLoad = async ({ locals, params }) => {
	const found = await getSiteScreen(locals.ctx, requireActor(locals.actor), params.siteId);
	if (!found.ok) error(404, 'There is no such site, or it is not one of yours.');
	const { site, ...screen } = found.value;
	const { policy: _policy, ...shown } = site;
	return {
		...screen,
		site: shown,
		siteForm: await superValidate(shown, zod4(siteSchema), { id: 'site' }),
		openingForm: await superValidate(NEW_OPENING, zod4(openingSchema), { id: 'opening', errors: false }),
		closedDayForm: await superValidate(zod4(closedDaySchema), { id: 'closed-day' })
	};
};

export const actions: Actions = {
	save: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(siteSchema), { id: 'site' });
		const phone = storedPhone(form.data.phone);
		const afterHoursPhone = storedPhone(form.data.afterHoursPhone);
		if (!form.valid || phone === null || afterHoursPhone === null) return fail(422, { form });
		const fields = { ...form.data, phone, afterHoursPhone };
		const saved = await saveSite(locals.ctx, requireActor(locals.actor), { siteId: params.siteId, fields });
		return saved.ok ? done(form, 'Saved.') : refuseForm(form, saved.error);
	},
	addOpening: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(openingSchema), { id: 'opening' });
		if (!form.valid) return fail(422, { form });
		const asked = { siteId: params.siteId, opening: form.data };
		const added = await addOpening(locals.ctx, requireActor(locals.actor), asked);
		return added.ok
			? done(form, 'The opening is added; its places can be booked now.')
			: refuseForm(form, added.error);
	},
	removeOpening: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(rowSchema), { id: 'row' });
		if (!form.valid) error(404, 'There is no such opening.');
		const asked = { siteId: params.siteId, id: form.data.id };
		const removed = await removeOpening(locals.ctx, requireActor(locals.actor), asked);
		if (!removed.ok) return refuseForm(form, removed.error);
		return done(form, `The opening is removed. ${left(removed.value.standing)}`);
	},
	addClosedDay: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(closedDaySchema), { id: 'closed-day' });
		if (!form.valid) return fail(422, { form });
		const asked = { siteId: params.siteId, ...form.data };
		const added = await addClosedDay(locals.ctx, requireActor(locals.actor), asked);
		if (!added.ok) return refuseForm(form, added.error);
		return done(form, `The day is closed. ${left(added.value.standing)}`);
	},
	removeClosedDay: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(rowSchema), { id: 'row' });
		if (!form.valid) error(404, 'There is no such day.');
		const asked = { siteId: params.siteId, id: form.data.id };
		const removed = await removeClosedDay(locals.ctx, requireActor(locals.actor), asked);
		return removed.ok ? done(form, 'The day is open again.') : refuseForm(form, removed.error);
	}
};
