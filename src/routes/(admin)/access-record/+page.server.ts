import { fromFieldValues } from '$lib/format/time';
import { requireActor } from '$lib/server/auth/guard';
import { readAccessLog } from '$lib/server/services/access-log';
import { getFrame } from '$lib/server/services/frame';
import type { PageServerLoad } from './$types';

/** The search is in the address, so that it can be repeated and works without scripts. */
export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = requireActor(locals.actor);
	const { timeZone } = await getFrame(locals.ctx, actor);
	const asked = (name: string): string => url.searchParams.get(name)?.trim() ?? '';
	const from = fromFieldValues(asked('from'), '00:00', timeZone);
	const until = fromFieldValues(asked('until'), '23:59', timeZone);
	const page = await readAccessLog(locals.ctx, actor, {
		staffId: asked('person') || undefined,
		recordNumber: asked('newborn') || undefined,
		from: from.ok ? from.at : undefined,
		until: until.ok ? new Date(until.at.getTime() + 59_999) : undefined,
		cursor: asked('after') || undefined
	});
	const rest = new URLSearchParams(url.searchParams);
	rest.delete('after');
	if (page.next !== null) rest.set('after', page.next);
	return {
		...page,
		timeZone,
		olderHref: page.next === null ? null : `?${rest.toString()}`,
		isFirstPage: asked('after') === '',
		asked: { person: asked('person'), newborn: asked('newborn'), from: asked('from'), until: asked('until') }
	};
};
