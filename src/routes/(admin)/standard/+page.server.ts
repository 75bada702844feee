import { error } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { DEFAULT_POLICY } from '$lib/domain/followup/policy';
import { formOfPolicy, policyOfForm, policySchema, standardSchema } from '$lib/schemas/policy';
import { requireCanEverywhere } from '$lib/server/auth/guard';
import { done, refuseForm } from '$lib/server/http/form';
import { getPolicyScreen, savePolicy, setStandard } from '$lib/server/services/policy';
import type { Actions, PageServerLoad } from './$types';

/** The site whose policy is shown: `?site=`, else the first. */
export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = requireCanEverywhere(locals.actor, 'policy.manage');
	const screen = await getPolicyScreen(locals.ctx, actor);
	const asked = url.searchParams.get('site');
	const site = asked === null ? screen.sites[0] : screen.sites.find(({ id }) => id === asked);
	if (site === undefined && asked !== null) error(404, 'There is no such site.');
	return {
		standards: screen.standards,
		sites: screen.sites.map(({ id, name }) => ({ id, name })),
		standardForm: await superValidate({ standard: screen.inForce }, zod4(standardSchema), { id: 'standard' }),
		chosen: site && { id: site.id, name: site.name, people: site.people },
		policyForm: await superValidate(formOfPolicy(site?.policy ?? DEFAULT_POLICY), zod4(policySchema), {
			id: `policy-${site?.id ?? ''}`
		}),
		defaults: formOfPolicy(DEFAULT_POLICY)
	};
};

export const actions: Actions = {
	standard: async ({ request, locals }) => {
		const actor = requireCanEverywhere(locals.actor, 'policy.manage');
		const form = await superValidate(request, zod4(standardSchema), { id: 'standard' });
		if (!form.valid) return fail(422, { form });
		await setStandard(locals.ctx, actor, form.data.standard);
		return done(form, 'In force for every new assessment. Those already made keep their guideline.');
	},
	policy: async ({ request, locals, url }) => {
		const actor = requireCanEverywhere(locals.actor, 'policy.manage');
		const siteId = url.searchParams.get('site') ?? '';
		const form = await superValidate(request, zod4(policySchema), { id: `policy-${siteId}` });
		if (!form.valid) return fail(422, { form });
		const saved = await savePolicy(locals.ctx, actor, { siteId, policy: policyOfForm(form.data) });
		return saved.ok
			? done(form, 'Saved. It holds for every due time set from now on.')
			: refuseForm(form, saved.error);
	}
};
