import { carerOfLink, getCheckInResult } from '$lib/server/services/parent-page';
import { error } from '@sveltejs/kit';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, locals }) => {
	const carer = await carerOfLink(locals.ctx, params.token);
	if (!carer.ok) error(404, 'link');
	const found = await getCheckInResult(locals.ctx, carer.value, params.checkInId);
	if (!found.ok) error(404, 'link');
	const deciding = found.value.reasons.filter((reason) => reason.result === found.value.result);
	return { result: found.value.result, fields: [...new Set(deciding.map((reason) => reason.field))] };
};
