import { redirect } from '@sveltejs/kit';
import { firstScreen } from '$lib/server/auth/first-screen';
import type { PageServerLoad } from './$types';

/** There is no page here: everybody goes to where their work begins. */
export const load: PageServerLoad = ({ locals }) => {
	redirect(303, locals.actor ? firstScreen(locals.actor) : '/sign-in');
};
