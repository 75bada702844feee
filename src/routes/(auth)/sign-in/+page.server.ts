import { redirect } from '@sveltejs/kit';
import { fail, message, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { signInSchema } from '$lib/schemas/sign-in';
import { signIn, type SignInRefusal } from '$lib/server/auth/sign-in';
import { setSessionCookie } from '$lib/server/http/cookies';
import { safeNext } from '$lib/server/http/refusal';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	if (locals.actor) redirect(303, safeNext(url.searchParams.get('next')));
	return {
		form: await superValidate(zod4(signInSchema)),
		comesFromElsewhere: url.searchParams.has('next'),
		isDemo: locals.ctx.config.demo
	};
};

export const actions: Actions = {
	default: async ({ request, locals, cookies, url, getClientAddress }) => {
		const form = await superValidate(request, zod4(signInSchema));
		const { email, password } = form.data;
		form.data.password = '';
		if (!form.valid) return fail(422, { form });
		const { ctx, sessionId: oldSessionId } = locals;
		const result = await signIn(ctx, { email, password, address: getClientAddress(), oldSessionId });
		if (!result.ok)
			return message(form, { tone: 'refused', text: sentence(result.error) }, answer(result.error));
		setSessionCookie(cookies, result.value.cookie);
		const next = safeNext(url.searchParams.get('next'));
		redirect(303, result.value.needsCode ? `/sign-in/code?next=${encodeURIComponent(next)}` : next);
	}
};

const answer = (refusal: SignInRefusal): { status: 401 | 429 } => ({
	status: refusal.code === 'wrong' ? 401 : 429
});

function sentence(refusal: SignInRefusal): string {
	if (refusal.code === 'wrong') return 'The e-mail address and the password do not belong together.';
	const minutes = Math.ceil(refusal.waitSeconds / 60);
	return `Too many tries. Please wait ${minutes === 1 ? 'a minute' : `${minutes} minutes`} and try again.`;
}
