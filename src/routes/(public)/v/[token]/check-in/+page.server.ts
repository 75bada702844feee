import { checkInSchema } from '$lib/schemas/check-in';
import { answerCheckIn } from '$lib/server/services/check-ins';
import { carerOfLink } from '$lib/server/services/parent-page';
import { error, fail, redirect } from '@sveltejs/kit';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals }) => ({ submissionKey: locals.ctx.random.id() });

/** What was typed, to be shown again; a question may have one answer only. */
function typed(data: FormData): Record<string, string> {
	return Object.fromEntries(
		[...data].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : []))
	);
}

export const actions: Actions = {
	default: async ({ request, params, locals, url }) => {
		const carer = await carerOfLink(locals.ctx, params.token);
		if (!carer.ok) error(carer.error === 'ended' ? 410 : 404, 'link');
		const values = typed(await request.formData());
		const parsed = checkInSchema.safeParse(values);
		if (!parsed.success) {
			const errors = Object.fromEntries(
				parsed.error.issues.map((issue) => [String(issue.path[0]), issue.message])
			);
			return fail(422, { values, errors, refused: false });
		}
		const answered = await answerCheckIn(locals.ctx, carer.value, parsed.data);
		if (!answered.ok) return fail(409, { values, errors: {}, refused: true });
		redirect(303, `/v/${params.token}/check-in/${answered.value.checkInId}${url.search}`);
	}
};
