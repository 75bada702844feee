import { error } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { dischargeSchema } from '$lib/schemas/discharge';
import { fillForm } from '$lib/schemas/discharge-fill';
import { requireActor } from '$lib/server/auth/guard';
import { getDischarge } from '$lib/server/services/discharge-view';
import { answerDischarge } from '../answer.server';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

async function dischargeOf({ locals, params }: Pick<RequestEvent, 'locals' | 'params'>) {
	const discharge = await getDischarge(locals.ctx, requireActor(locals.actor), params.followUpId);
	if (!discharge.ok) error(404, 'There is no such record, or it is not one of yours.');
	return discharge.value;
}

const UNFINISHED: Record<string, string> = {
	conflict: 'The newborn is saved, but that place was taken in the meantime. Choose another one.',
	invalid:
		'The newborn is saved, but the discharge could not be finished: the place does not fit any longer. Choose another one.'
};

export const load: PageServerLoad = async (event) => {
	const discharge = await dischargeOf(event);
	const filled = fillForm(discharge.facts, discharge.unit.timeZone);
	const unfinished = event.url.searchParams.get('unfinished');
	return {
		...discharge,
		form: await superValidate(filled, zod4(dischargeSchema), { errors: false }),
		saved: event.url.searchParams.has('saved'),
		unfinished:
			unfinished === null
				? null
				: (UNFINISHED[unfinished] ?? 'The newborn is saved, but not handed over yet.')
	};
};

async function answer(event: RequestEvent, isFinish: boolean) {
	const setting = await dischargeOf(event);
	if (!setting.mayEdit) error(409, 'This newborn was handed over; its values belong to the clinic now.');
	return answerDischarge(event, { setting, isFinish, data: await event.request.formData() });
}

export const actions: Actions = {
	save: (event) => answer(event, false),
	finish: (event) => answer(event, true)
};
