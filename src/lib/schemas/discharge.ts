import { dischargeFields } from './discharge-fields';
import { readDischarge } from './discharge-read';

export type { DischargeForm } from './discharge-fields';

/** The discharge form with everything that is wrong with it beside its field. */
export const dischargeSchema = dischargeFields.superRefine((form, ctx) => {
	for (const issue of readDischarge(form).issues) {
		ctx.addIssue({ code: 'custom', path: [...issue.path], message: issue.message });
	}
});
