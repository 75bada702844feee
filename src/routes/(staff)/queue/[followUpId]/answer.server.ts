import type { Result } from '$lib/domain/result';
import { placeOfWord, type Done } from '$lib/schemas/desk';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import type { AppError } from '$lib/server/errors';
import { refuseForm } from '$lib/server/http/form';
import { addressOf } from '$lib/ui/staff/desk/address';
import { error, fail, redirect } from '@sveltejs/kit';
import type { SuperValidated } from 'sveltekit-superforms';
import type { RequestEvent } from './$types';

/** The page again, with the queue's own choices kept and a word of what was done. */
async function goOn({ locals, params, url }: RequestEvent, done: Done): Promise<never> {
	const actor = requireActor(locals.actor);
	await recordAccess(locals.ctx.db, locals.ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'follow-up.changed',
		followUpId: params.followUpId,
		detail: done
	});
	const [clinic, show, rows] = ['clinic', 'show', 'rows'].map((name) => url.searchParams.get(name));
	redirect(303, addressOf(`/queue/${params.followUpId}`, { clinic, show, rows, done }));
}

/** The place that a form names by one word; the schema has checked the word. */
export function wantedPlace(data: { readonly place: string; readonly outsideWindowWhy?: string }) {
	const place = placeOfWord(data.place);
	if (!place) throw new Error('A place passed its schema and is none.');
	return { ...place, outsideWindowWhy: data.outsideWindowWhy || undefined };
}

/** The services speak of the start of a visit; the forms choose a place. */
const asField = (refusal: AppError): AppError =>
	refusal.code === 'invalid' && refusal.field === 'startsAt' ? { ...refusal, field: 'place' } : refusal;

/** The end of every form here: wrong input or a refusal back to the form, else on with a word of what was done. */
export async function answer<T extends Record<string, unknown>>(
	event: RequestEvent,
	form: SuperValidated<T, App.Superforms.Message>,
	done: Done,
	work: () => Promise<Result<unknown, AppError>>
) {
	if (!form.valid) return fail(422, { form });
	const result = await work();
	if (!result.ok) return refuseForm(form, asField(result.error));
	return goOn(event, done);
}

/** The end of a button without fields. */
export async function mark(event: RequestEvent, done: Done, work: Promise<Result<unknown, AppError>>) {
	const result = await work;
	if (result.ok) return goOn(event, done);
	switch (result.error.code) {
		case 'not_found':
			return error(404, 'There is no such record, or it is not one of yours.');
		case 'not_allowed':
			return fail(403, { refused: 'Your role does not allow this.' });
		case 'conflict':
		case 'invalid':
			return fail(409, { refused: result.error.message });
	}
}
