import { redirect } from '@sveltejs/kit';
import { fail, message, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { codeSchema } from '$lib/schemas/sign-in';
import { signInWithCode } from '$lib/server/auth/sign-in';
import { setSessionCookie } from '$lib/server/http/cookies';
import { safeNext } from '$lib/server/http/refusal';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	if (locals.actor) redirect(303, safeNext(url.searchParams.get('next')));
	if (locals.pendingStaffId === null) redirect(303, '/sign-in');
	return { form: await superValidate(zod4(codeSchema)) };
};

export const actions: Actions = {
	default: async ({ request, locals, cookies, url }) => {
		const { ctx, sessionId, pendingStaffId: staffId } = locals;
		if (sessionId === null || staffId === null) redirect(303, '/sign-in');
		const form = await superValidate(request, zod4(codeSchema));
		const { code } = form.data;
		form.data.code = '';
		if (!form.valid) return fail(422, { form });
		const result = await signInWithCode(ctx, { sessionId, staffId }, code);
		if (!result.ok) {
			const isWrong = result.error.code === 'wrong';
			const text = isWrong
				? 'This code does not fit, or it was used before. Wait for the next one.'
				: 'Too many tries. Please wait 15 minutes and try again.';
			return message(form, { tone: 'refused', text }, { status: isWrong ? 401 : 429 });
		}
		setSessionCookie(cookies, result.value.cookie);
		redirect(303, safeNext(url.searchParams.get('next')));
	}
};
