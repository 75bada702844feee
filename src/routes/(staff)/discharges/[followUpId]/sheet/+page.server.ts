import { error } from '@sveltejs/kit';
import { requireActor } from '$lib/server/auth/guard';
import { getDischargeSheet } from '$lib/server/services/discharge-sheet';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const sheet = await getDischargeSheet(locals.ctx, requireActor(locals.actor), params.followUpId);
	if (!sheet.ok) error(404, 'There is no such record, or it is not one of yours.');
	const { families, ...rest } = sheet.value;
	const asked = url.searchParams.get('for');
	return {
		...rest,
		families: families.map(({ carerId, name, language }) => ({ carerId, name, language })),
		family: families.find(({ carerId }) => carerId === asked) ?? families[0] ?? null,
		done: url.searchParams.has('done')
	};
};
