import { redirect } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { invitationSchema } from '$lib/schemas/sign-in';
import { acceptInvitation, readInvitation } from '$lib/server/auth/invitation';
import { setSessionCookie } from '$lib/server/http/cookies';
import type { Actions, PageServerLoad } from './$types';

/** Looking at the link never spends it: only the button does. */
export const load: PageServerLoad = async ({ locals, params, getClientAddress }) => {
	const invitation = await readInvitation(locals.ctx, params.token, getClientAddress());
	return {
		person: invitation && { name: invitation.name, email: invitation.email },
		form: await superValidate(zod4(invitationSchema))
	};
};

export const actions: Actions = {
	default: async ({ request, locals, params, cookies }) => {
		const form = await superValidate(request, zod4(invitationSchema));
		const { password } = form.data;
		form.data.password = '';
		form.data.again = '';
		if (!form.valid) return fail(422, { form });
		const { ctx, sessionId: oldSessionId } = locals;
		const result = await acceptInvitation(ctx, { token: params.token, password, oldSessionId });
		// The page that loads again says what to do about a link that is gone.
		if (!result.ok) return fail(410, { form });
		setSessionCookie(cookies, result.value.cookie);
		redirect(303, result.value.needsCode ? '/sign-in/code' : '/');
	}
};
