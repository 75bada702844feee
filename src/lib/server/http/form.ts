import { error, fail } from '@sveltejs/kit';
import { message, type SuperValidated } from 'sveltekit-superforms';
import type { AppError } from '../errors';

/** Of a form of any shape: only its fields and message matter here. */
type AnyForm<T extends Record<string, unknown>> = SuperValidated<T, App.Superforms.Message>;

const refused = (text: string): App.Superforms.Message => ({ tone: 'refused', text });

/** What a refused use case answers to its form: beside the field it is about, else above the form. */
export function refuseForm<T extends Record<string, unknown>>(form: AnyForm<T>, refusal: AppError) {
	switch (refusal.code) {
		case 'not_found':
			return error(404, 'There is no such record, or it is not one of yours.');
		case 'not_allowed':
			return message(form, refused('Your role does not allow this.'), { status: 403 });
		case 'conflict':
			return message(form, refused(refusal.message), { status: 409 });
		case 'invalid': {
			const field = refusal.field;
			if (field === undefined || !(field in form.data)) {
				return message(form, refused(refusal.message), { status: 422 });
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
	message<App.Superforms.Message, T, T>(form, { tone: 'done', text });
