import { error, redirect } from '@sveltejs/kit';
import type { Result } from '$lib/domain/result';
import type { AppError } from '$lib/server/errors';
import { fail, setError, type SuperValidated } from 'sveltekit-superforms';
import type { FormPathLeavesWithErrors } from 'sveltekit-superforms';

type Fields<T extends Record<string, unknown>> = Readonly<
	Partial<Record<string, FormPathLeavesWithErrors<T>>>
>;

/** A refusal as the form shows it: beside its field where the use case names one, else above the form. */
export function refuse<T extends Record<string, unknown>>(
	form: SuperValidated<T>,
	refusal: AppError,
	fields: Fields<T> = {}
) {
	switch (refusal.code) {
		case 'not_found':
			error(404, 'There is no such record, or it is not one of yours.');
			break;
		case 'not_allowed':
			return setError(form, '', 'This belongs to another role at this site.', { status: 403 });
		case 'conflict':
			return setError(form, '', refusal.message, { status: 409 });
		case 'invalid': {
			const field = refusal.field === undefined ? undefined : fields[refusal.field];
			return setError(form, field ?? '', refusal.message, { status: 422 });
		}
	}
}

/** The end of every action here: wrong input back to the form, a refusal likewise, else on to the page with a word of what was done. */
export async function answer<T extends Record<string, unknown>>(
	form: SuperValidated<T>,
	asked: {
		readonly to: string;
		readonly fields?: Fields<T>;
		readonly work: () => Promise<Result<unknown, AppError>>;
	}
) {
	if (!form.valid) return fail(422, { form });
	const result = await asked.work();
	if (!result.ok) return refuse(form, result.error, asked.fields);
	redirect(303, asked.to);
}
