import { error, fail } from '@sveltejs/kit';
import { message, type SuperValidated } from 'sveltekit-superforms';
import type { AppError } from '../errors';

/** Of a form of any shape: only its fields and message matter here. */
type AnyForm<T extends Record<string, unknown>> = SuperValidated<T, App.Superforms.Message>;

/** What a refused use case answers to its form: beside the field it is about, else above the form. */
export function refuseForm<T extends Record<string, unknown>>(form: AnyForm<T>, refusal: AppError) {
	switch (refusal.code) {
		case 'not_found':
			return error(404, 'There is no such record, or it is not one of yours.');
		case 'not_allowed':
			return message(form, { tone: 'refused', text: 'Your role does not allow this.' }, { status: 403 });
		case 'conflict':
			return message(form, { tone: 'refused', text: refusal.message }, { status: 409 });
		case 'invalid': {
			const field = refusal.field;
			if (field === undefined || !(field in form.data)) {
				return message(form, { tone: 'refused', text: refusal.message }, { status: 422 });
			}
			// `setError` wants the path checked against the form's type, which is open here.
			Object.assign(form.errors, { [field]: [refusal.message] });
			form.valid = false;
			return fail(422, { form });
		}
	}
}

/** Says that something was done, above a form that stays on the page. */
export const done = <T extends Record<string, unknown>>(form: AnyForm<T>, text: string) =>
	message(form, { tone: 'done' as const, text });
