import { measuresSchema } from '$lib/schemas/clinician';
import { requireActor } from '$lib/server/auth/guard';
import { getMeasures, listMeasuredSites } from '$lib/server/services/measures';
import { error } from '@sveltejs/kit';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = requireActor(locals.actor);
	const sites = await listMeasuredSites(locals.ctx, actor);
	// What cannot be read falls back to the first site and thirty days: this page only looks.
	const asked = measuresSchema.safeParse({
		site: url.searchParams.get('site') ?? '',
		days: url.searchParams.get('days') ?? '30'
	});
	const days = asked.success ? asked.data.days : '30';
	const siteId = (asked.success && asked.data.site) || (sites[0]?.id ?? '');
	if (sites.length === 0) return { sites, siteId, days, result: null };
	const result = await getMeasures(locals.ctx, actor, { siteId, days: Number(days) });
	if (!result) error(404, 'There is no such site, or it is not one of yours.');
	return { sites, siteId, days, result };
};
