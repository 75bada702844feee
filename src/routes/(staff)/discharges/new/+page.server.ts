import { error } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { dischargeSchema } from '$lib/schemas/discharge';
import { blankForm, familyFields } from '$lib/schemas/discharge-fill';
import { requireActor } from '$lib/server/auth/guard';
import { startDischarge } from '$lib/server/services/discharge-view';
import { answerDischarge } from '../answer.server';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

async function settingOf({ locals, url }: Pick<RequestEvent, 'locals' | 'url'>) {
	const started = await startDischarge(locals.ctx, requireActor(locals.actor), {
		unitId: url.searchParams.get('unit'),
		familyOf: url.searchParams.get('family-of')
	});
	if (!started.ok) error(403, 'A nurse of a birth unit or a pediatrician of a clinic enters a newborn.');
	return started.value;
}

export const load: PageServerLoad = async (event) => {
	const { family, ...setting } = await settingOf(event);
	const blank = { ...blankForm(setting.unit.timeZone), ...familyFields(family) };
	return { ...setting, form: await superValidate(blank, zod4(dischargeSchema), { errors: false }) };
};

const answer = async (event: RequestEvent, isFinish: boolean) =>
	answerDischarge(event, { setting: await settingOf(event), isFinish, data: await event.request.formData() });

export const actions: Actions = {
	save: (event) => answer(event, false),
	finish: (event) => answer(event, true)
};
