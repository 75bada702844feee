import { MESSAGE_KINDS } from '$lib/domain/messaging/kinds';
import { KIND_WORDING } from '$lib/domain/messaging/wording';
import { requireCanEverywhere } from '$lib/server/auth/guard';
import { listWording } from '$lib/server/services/wording';
import { error } from '@sveltejs/kit';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const actor = requireCanEverywhere(locals.actor, 'wording.manage');
	const heads = await listWording(locals.ctx, actor);
	if (!heads.ok) error(404, 'There is no wording.');
	const rows = MESSAGE_KINDS.flatMap((kind) =>
		KIND_WORDING[kind].channels.map((channel) => ({
			kind,
			channel,
			when: KIND_WORDING[kind].when,
			heads: heads.value.filter((head) => head.kind === kind && head.channel === channel)
		}))
	);
	return {
		rows,
		drafts: heads.value.filter(({ standing }) => standing === 'draft').length,
		all: heads.value.length
	};
};
