import { error, fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { superValidate, type SuperValidated } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { DischargeFacts } from '$lib/domain/followup/discharge';
import type { StaffActor } from '$lib/domain/access/roles';
import { dischargeSchema, type DischargeForm } from '$lib/schemas/discharge';
import { issueOfRefusal, liveResult } from '$lib/schemas/discharge-live';
import { readDischarge } from '$lib/schemas/discharge-read';
import type { FormIssue } from '$lib/schemas/discharge-values';
import { requireActor } from '$lib/server/auth/guard';
import type { AppError } from '$lib/server/errors';
import { refuseForm } from '$lib/server/http/form';
import {
	enterDischarge,
	handOver,
	reviseDischarge,
	type SavedDischarge
} from '$lib/server/services/discharges';
import { finishIssues } from './finish';
import { readPlace } from './place';
import type { getDischarge, startDischarge } from '$lib/server/services/discharge-view';

type Setting = Extract<Awaited<ReturnType<typeof startDischarge>>, { ok: true }>['value'];
type Existing = Extract<Awaited<ReturnType<typeof getDischarge>>, { ok: true }>['value'];
type Form = SuperValidated<DischargeForm, App.Superforms.Message>;

function show(form: Form, issues: readonly FormIssue[]): Form {
	for (const { path, message } of issues) {
		const [field, row] = path;
		const old: unknown = Reflect.get(form.errors, field);
		const known = typeof old === 'object' && old !== null ? old : {};
		Reflect.set(form.errors, field, row === undefined ? [message] : { ...known, [row]: [message] });
	}
	form.valid = false;
	return form;
}

/** Puts a refusal of a use case beside the field of the form that it is about. */
function refuse(form: Form, refusal: AppError) {
	if (refusal.code !== 'invalid' || refusal.field === undefined) return refuseForm(form, refusal);
	const rows = form.data.measurementTotal.flatMap((total, row) => (total.trim() === '' ? [] : [row]));
	const issue = issueOfRefusal({ code: refusal.code, field: refusal.field, message: refusal.message }, rows);
	return fail(422, { form: show(form, [issue]) });
}

function save(
	{ locals }: RequestEvent,
	asked: { actor: StaffActor; setting: Setting | Existing; facts: DischargeFacts }
): ReturnType<typeof enterDischarge> {
	const { actor, setting, facts } = asked;
	return 'followUpId' in setting
		? reviseDischarge(locals.ctx, actor, { followUpId: setting.followUpId, facts })
		: enterDischarge(locals.ctx, actor, { birthSiteId: setting.unit.id, facts });
}

async function finish(
	{ locals }: RequestEvent,
	asked: { actor: StaffActor; form: Form; saved: SavedDischarge; isNew: boolean }
) {
	const { actor, form, saved, isNew } = asked;
	const { followUpId } = saved;
	const why = form.data.againstAdviceWhy.trim();
	const done = await handOver(locals.ctx, actor, {
		followUpId,
		place: readPlace(form.data.place),
		...(why ? { againstAdviceWhy: why } : {})
	});
	if (done.ok) return redirect(303, `/discharges/${followUpId}/sheet?done=1`);
	// The newborn is entered by now: what is left to do goes on at its own address, or the next press enters it twice.
	if (isNew) return redirect(303, `/discharges/${followUpId}?unfinished=${done.error.code}`);
	return refuse(form, done.error);
}

/** Saves what was typed and, where asked, finishes the discharge; on refusal the form comes back as it was typed. */
export async function answerDischarge(
	event: RequestEvent,
	asked: { readonly setting: Setting | Existing; readonly isFinish: boolean; readonly data: FormData }
) {
	const { setting, isFinish, data } = asked;
	const actor = requireActor(event.locals.actor);
	data.set('timeZone', setting.unit.timeZone);
	const form: Form = await superValidate(data, zod4(dischargeSchema));
	if (!form.valid) return fail(422, { form });
	const { facts } = readDischarge(form.data);
	if (!facts) error(500, 'A form that the schema accepts must be readable.');
	const live = liveResult(form.data, { standard: setting.standard, now: event.locals.ctx.clock.now() });
	if (live.state === 'refused') return fail(422, { form: show(form, live.issues) });
	if (isFinish) {
		const clinic = setting.clinics.find(({ id }) => id === form.data.clinicId);
		const hasVisit = 'visits' in setting && setting.visits.some(({ isOpen }) => isOpen === true);
		const issues = finishIssues(form.data, { live, clinic, hasVisit });
		if (issues.length > 0) return fail(422, { form: show(form, issues) });
	}
	const saved = await save(event, { actor, setting, facts });
	if (!saved.ok) return refuse(form, saved.error);
	if (isFinish) return finish(event, { actor, form, saved: saved.value, isNew: !('followUpId' in setting) });
	return redirect(303, `/discharges/${saved.value.followUpId}?saved=1`);
}
