import { error, redirect } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { mayEver } from '$lib/domain/access/can';
import { newSiteSchema, storedPhone } from '$lib/schemas/sites';
import { requireActor, requireCanEverywhere } from '$lib/server/auth/guard';
import { refuseForm } from '$lib/server/http/form';
import { addSite, listEditableSites } from '$lib/server/services/sites';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const actor = requireActor(locals.actor);
	const sites = await listEditableSites(locals.ctx, actor);
	return {
		sites: sites.map(({ id, name, kind, address, phone, timeZone }) => ({
			id,
			name,
			kind,
			address,
			phone,
			timeZone
		})),
		newSiteForm: mayEver(actor, 'sites.manage') ? await superValidate(zod4(newSiteSchema)) : null
	};
};

export const actions: Actions = {
	add: async ({ request, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'sites.manage');
		const form = await superValidate(request, zod4(newSiteSchema));
		const phone = storedPhone(form.data.phone);
		const afterHoursPhone = storedPhone(form.data.afterHoursPhone);
		if (!form.valid || phone === null || afterHoursPhone === null) return fail(422, { form });
		const added = await addSite(locals.ctx, actor, { ...form.data, phone, afterHoursPhone });
		if (!added.ok) return refuseForm(form, added.error);
		if (!added.value) error(500);
		redirect(303, `/sites/${added.value}`);
	}
};
