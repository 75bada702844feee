import { searchQuerySchema, type Done } from '$lib/schemas/desk';
import { assignStraySchema, notOursSchema } from '$lib/schemas/stray';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { refuseForm } from '$lib/server/http/form';
import { searchFollowUps } from '$lib/server/services/search';
import { assignStray, dismissStray } from '$lib/server/services/stray-settle';
import { getStray } from '$lib/server/services/stray-view';
import { addressOf } from '$lib/ui/staff/desk/address';
import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

/** Newborns of the reader's sites; that somebody searched is kept, not for whom. */
async function search({ locals, url }: Pick<RequestEvent, 'locals' | 'url'>) {
	const actor = requireActor(locals.actor);
	const asked = searchQuerySchema.safeParse({ q: url.searchParams.get('q') ?? undefined });
	const words = asked.success ? asked.data.q : '';
	const found = await searchFollowUps(locals.ctx, actor, words);
	const { organisationId, staffId } = actor;
	const detail = `${found.length} found`;
	if (words.length >= 2)
		await recordAccess(locals.ctx.db, locals.ctx, { organisationId, staffId, action: 'search.made', detail });
	return { words, found };
}

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const stray = await getStray(locals.ctx, requireActor(locals.actor), params.entryId);
	if (!stray.ok) error(404, 'There is no such text, or it is not one of yours.');
	return {
		stray: stray.value,
		search: await search({ locals, url }),
		forms: {
			assign: await superValidate(zod4(assignStraySchema), { id: 'assign', errors: false }),
			notOurs: await superValidate(zod4(notOursSchema), { id: 'not-ours', errors: false })
		}
	};
};

/** On to the next page, with the queue's own choices kept and a word of what was done. */
function goOn(url: URL, path: string, done: Done): never {
	const [clinic, show, rows] = ['clinic', 'show', 'rows'].map((name) => url.searchParams.get(name));
	redirect(303, addressOf(path, { clinic, show, rows, done }));
}

export const actions: Actions = {
	assign: async ({ locals, params, request, url }) => {
		const form = await superValidate(request, zod4(assignStraySchema), { id: 'assign' });
		if (!form.valid) return fail(422, { form });
		const asked = { entryId: params.entryId, followUpId: form.data.followUpId };
		const assigned = await assignStray(locals.ctx, requireActor(locals.actor), asked);
		if (!assigned.ok) return refuseForm(form, assigned.error);
		goOn(url, `/queue/${assigned.value.followUpId}`, 'textAssigned');
	},
	notOurs: async ({ locals, params, request, url }) => {
		const form = await superValidate(request, zod4(notOursSchema), { id: 'not-ours' });
		if (!form.valid) return fail(422, { form });
		const asked = { entryId: params.entryId, ...form.data };
		const dismissed = await dismissStray(locals.ctx, requireActor(locals.actor), asked);
		if (!dismissed.ok) return refuseForm(form, dismissed.error);
		goOn(url, '/queue', 'notOurs');
	}
};
