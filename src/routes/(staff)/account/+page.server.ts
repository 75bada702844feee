import { error, redirect } from '@sveltejs/kit';
import { fail, message, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { rowSchema } from '$lib/schemas/sites';
import { factorOffSchema, factorOnSchema, passwordChangeSchema } from '$lib/schemas/sign-in';
import { requireActor } from '$lib/server/auth/guard';
import { setSessionCookie } from '$lib/server/http/cookies';
import { done, refuseForm } from '$lib/server/http/form';
import {
	changePassword,
	endOwnSession,
	getAccount,
	offerFactor,
	repeatOffer,
	signOutEverywhere,
	switchOffFactor,
	switchOnFactor
} from '$lib/server/services/account';
import type { Actions, PageServerLoad } from './$types';

const hashOfSession = rowSchema.extend({ id: rowSchema.shape.id.max(64) });

export const load: PageServerLoad = async ({ locals }) => {
	const actor = requireActor(locals.actor);
	if (locals.sessionId === null) error(401, 'Please sign in first.');
	return {
		account: await getAccount(locals.ctx, actor, locals.sessionId),
		passwordForm: await superValidate(zod4(passwordChangeSchema), { id: 'password-change' }),
		factorOnForm: await superValidate(zod4(factorOnSchema), { id: 'factor-on' }),
		factorOffForm: await superValidate(zod4(factorOffSchema), { id: 'factor-off' })
	};
};

export const actions: Actions = {
	password: async ({ request, locals, cookies }) => {
		const form = await superValidate(request, zod4(passwordChangeSchema), { id: 'password-change' });
		const { current, password: next } = form.data;
		form.data = { current: '', password: '', again: '' };
		if (!form.valid) return fail(422, { form });
		const changed = await changePassword(locals.ctx, requireActor(locals.actor), { current, next });
		if (!changed.ok) return refuseForm(form, changed.error);
		setSessionCookie(cookies, changed.value);
		locals.sessionId = changed.value.value;
		return done(form, 'Your password is changed. Every other device was signed out.');
	},
	prepareFactor: async ({ locals }) => ({ offer: await offerFactor(locals.ctx, requireActor(locals.actor)) }),
	switchOnFactor: async ({ request, locals }) => {
		const actor = requireActor(locals.actor);
		const form = await superValidate(request, zod4(factorOnSchema), { id: 'factor-on' });
		const { sealed, code } = form.data;
		form.data.code = '';
		const switched = form.valid ? await switchOnFactor(locals.ctx, actor, { sealed, code }) : null;
		if (switched?.ok) return done(form, 'The second factor is on. From now on sign-in asks for a code.');
		const offer = await repeatOffer(locals.ctx, actor, sealed);
		if (switched === null) return fail(422, { form, offer });
		const refused = refuseForm(form, switched.error);
		return 'data' in refused ? fail(refused.status, { form, offer }) : refused;
	},
	switchOffFactor: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(factorOffSchema), { id: 'factor-off' });
		const { current } = form.data;
		form.data.current = '';
		if (!form.valid) return fail(422, { form });
		const switched = await switchOffFactor(locals.ctx, requireActor(locals.actor), current);
		if (!switched.ok) return refuseForm(form, switched.error);
		return done(form, 'The second factor is off.');
	},
	endSession: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(hashOfSession));
		if (!form.valid) error(404, 'There is no such session.');
		const ended = await endOwnSession(locals.ctx, requireActor(locals.actor), form.data.id);
		if (!ended.ok) return refuseForm(form, ended.error);
		return message(form, { tone: 'done', text: 'That device is signed out.' });
	},
	signOutEverywhere: async ({ locals }) => {
		await signOutEverywhere(locals.ctx, requireActor(locals.actor));
		redirect(303, '/sign-in');
	}
};
