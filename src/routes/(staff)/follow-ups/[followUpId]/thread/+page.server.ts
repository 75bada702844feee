import type { Channel } from '$lib/domain/messaging/kinds';
import { assignSchema, wordsSchema } from '$lib/schemas/thread';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { done, refuseForm } from '$lib/server/http/form';
import { getThread } from '$lib/server/services/thread';
import { assignText, markThreadRead, writeToFamily } from '$lib/server/services/thread-words';
import { error, redirect } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad } from './$types';

const NOT_HERE = 'There is no such record, or it is not one of yours.';

export const load: PageServerLoad = async ({ params, locals }) => {
	const actor = requireActor(locals.actor);
	const { ctx } = locals;
	const { followUpId } = params;
	const thread = await getThread(ctx, actor, followUpId);
	if (!thread.ok) error(404, NOT_HERE);
	const { organisationId, staffId } = actor;
	await recordAccess(ctx.db, ctx, { organisationId, staffId, action: 'thread.viewed', followUpId });
	const first = thread.value.carers.find(({ channels }) => channels.length > 0);
	const to = first ? `${first.id} ${first.channels[0] ?? 'sms'}` : '';
	const blank = { to, words: '', key: ctx.random.id() };
	return {
		thread: thread.value,
		form: await superValidate(blank, zod4(wordsSchema), { id: 'words', errors: false })
	};
};

const channelOf = (word: string | undefined): Channel => (word === 'mail' ? 'mail' : 'sms');

export const actions: Actions = {
	write: async ({ request, params, locals }) => {
		const actor = requireActor(locals.actor);
		const form = await superValidate(request, zod4(wordsSchema), { id: 'words' });
		if (!form.valid) return fail(422, { form });
		const [carerId = '', channel] = form.data.to.split(' ');
		const { words, key } = form.data;
		const asked = { followUpId: params.followUpId, carerId, channel: channelOf(channel), words, key };
		const written = await writeToFamily(locals.ctx, actor, asked);
		if (!written.ok) return refuseForm(form, written.error);
		form.data = { ...form.data, words: '', key: locals.ctx.random.id() };
		return done(form, 'It goes out now. Whether it arrived is shown beside it.');
	},
	read: async ({ params, locals }) => {
		const read = await markThreadRead(locals.ctx, requireActor(locals.actor), params.followUpId);
		if (!read.ok) error(404, NOT_HERE);
		redirect(303, `/follow-ups/${params.followUpId}/thread`);
	},
	assign: async ({ request, params, locals }) => {
		const asked = assignSchema.safeParse(Object.fromEntries(await request.formData()));
		const { followUpId } = params;
		const assigned = asked.success
			? await assignText(locals.ctx, requireActor(locals.actor), { followUpId, ...asked.data })
			: null;
		if (!assigned?.ok) error(404, NOT_HERE);
		redirect(303, `/follow-ups/${followUpId}/thread`);
	}
};
