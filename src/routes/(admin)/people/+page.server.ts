import { error } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { StaffActor } from '$lib/domain/access/roles';
import type { Result } from '$lib/domain/result';
import { inviteSchema, personSchema, roleOfWord, rolesSchema } from '$lib/schemas/people';
import { requireCanEverywhere } from '$lib/server/auth/guard';
import type { Ctx } from '$lib/server/context';
import type { AppError } from '$lib/server/errors';
import { done, refuseForm } from '$lib/server/http/form';
import {
	disable,
	enable,
	invite,
	inviteAgain,
	listPeople,
	resetFactor,
	setRoles,
	signPersonOut
} from '$lib/server/services/people';
import { listSites } from '$lib/server/services/sites';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const actor = requireCanEverywhere(locals.actor, 'people.manage');
	const [people, sites] = await Promise.all([listPeople(locals.ctx, actor), listSites(locals.ctx, actor)]);
	return {
		people,
		me: actor.staffId,
		sites: sites.map(({ id, name, kind }) => ({ id, name, kind })),
		inviteForm: await superValidate(zod4(inviteSchema), { id: 'invite' })
	};
};

const rolesOf = (words: readonly string[]) => words.flatMap((word) => roleOfWord(word) ?? []);

/** An action on one person that is only pressed, not filled in. */
const press =
	(
		change: (ctx: Ctx, actor: StaffActor, staffId: string) => Promise<Result<unknown, AppError>>,
		sentence: string
	) =>
	async ({ request, locals }: { request: Request; locals: App.Locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'people.manage');
		const form = await superValidate(request, zod4(personSchema));
		if (!form.valid) error(404, 'There is no such person.');
		const changed = await change(locals.ctx, actor, form.data.staffId);
		return changed.ok ? done(form, sentence) : refuseForm(form, changed.error);
	};

export const actions: Actions = {
	invite: async ({ request, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'people.manage');
		const form = await superValidate(request, zod4(inviteSchema), { id: 'invite' });
		if (!form.valid) return fail(422, { form });
		const { name, email, roles } = form.data;
		const invited = await invite(locals.ctx, actor, { name, email, roles: rolesOf(roles) });
		return invited.ok ? { form, invitation: invited.value } : refuseForm(form, invited.error);
	},
	inviteAgain: async ({ request, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'people.manage');
		const form = await superValidate(request, zod4(personSchema));
		if (!form.valid) error(404, 'There is no such person.');
		const invited = await inviteAgain(locals.ctx, actor, form.data.staffId);
		return invited.ok ? { form, invitation: invited.value } : refuseForm(form, invited.error);
	},
	roles: async ({ request, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'people.manage');
		const form = await superValidate(request, zod4(rolesSchema));
		const { staffId, roles } = form.data;
		if (!form.valid) {
			return refuseForm(form, {
				code: 'conflict',
				message: 'A person needs at least one role. Nothing was changed.'
			});
		}
		const set = await setRoles(locals.ctx, actor, { staffId, roles: rolesOf(roles) });
		return set.ok ? done(form, 'The roles are set, from the next click on.') : refuseForm(form, set.error);
	},
	disable: press(disable, 'The account is disabled and signed out everywhere.'),
	enable: press(enable, 'The account is enabled again.'),
	resetFactor: press(resetFactor, 'The second factor is removed. The password alone signs in now.'),
	signOutEverywhere: press(signPersonOut, 'Signed out everywhere.')
};
