import { err, ok } from '$lib/domain/result';
import { fromFieldValues, toFieldValues } from '$lib/format/time';
import {
	acceptSchema,
	closeSchema,
	decisionSchema,
	endTreatmentSchema,
	mergeSchema,
	reopenSchema,
	settleSchema,
	strikeSchema,
	valueSchema
} from '$lib/schemas/clinician';
import { decisionOf, measurementOf } from '$lib/schemas/clinician-facts';
import { recordAccess } from '$lib/server/audit/record';
import { requireActor } from '$lib/server/auth/guard';
import { conflict, invalid } from '$lib/server/errors';
import { settleAlert } from '$lib/server/services/alerts';
import {
	closeFollowUp,
	decide,
	endTreatment,
	mergeFollowUp,
	reopenFollowUp
} from '$lib/server/services/decisions';
import { recordMeasurement, strikeMeasurement } from '$lib/server/services/measurements';
import { getNewbornView, type NewbornView } from '$lib/server/services/newborn-view';
import { shownResult } from '$lib/domain/followup/recommended';
import { error, type RequestEvent } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad } from './$types';
import { answer } from './answer.server';

type Asked = RequestEvent<{ followUpId: string }>;

async function viewOf({ locals, params }: Pick<Asked, 'locals' | 'params'>): Promise<NewbornView> {
	const view = await getNewbornView(locals.ctx, requireActor(locals.actor), params.followUpId);
	if (!view.ok) error(404, 'There is no such record, or it is not one of yours.');
	return view.value;
}

const pageOf = ({ params }: Pick<Asked, 'params'>, done: string): string =>
	`/follow-ups/${params.followUpId}?done=${done}`;

async function formsOf({ page, now, measurements, values }: NewbornView) {
	const { timeZone } = page.clinic;
	const today = toFieldValues(now, timeZone);
	const tomorrow = toFieldValues(new Date(now.getTime() + 24 * 3_600_000), timeZone);
	const unit = measurements.find((one) => one.status === 'final')?.unit ?? 'mg/dL';
	const asked = values?.assessment?.window;
	const window = asked && asked.until > now ? asked : null;
	const from = window ? toFieldValues(window.from, timeZone) : today;
	const until = window ? toFieldValues(window.until, timeZone) : tomorrow;
	return {
		value: await superValidate({ measuredOn: today.date, unit }, zod4(valueSchema), {
			id: 'value',
			errors: false
		}),
		accept: await superValidate(
			{ shown: values?.assessment ? shownResult(values.assessment) : '' },
			zod4(acceptSchema),
			{ id: 'accept', errors: false }
		),
		decision: await superValidate(
			{
				fromOn: from.date,
				fromTime: from.time,
				untilOn: until.date,
				untilTime: until.time,
				test: window?.test
			},
			zod4(decisionSchema),
			{ id: 'decision', errors: false }
		),
		strike: await superValidate(zod4(strikeSchema), { id: 'strike' }),
		endTreatment: await superValidate({ endedOn: today.date }, zod4(endTreatmentSchema), {
			id: 'end-treatment',
			errors: false
		}),
		close: await superValidate(zod4(closeSchema), { id: 'close' }),
		reopen: await superValidate(zod4(reopenSchema), { id: 'reopen' }),
		merge: await superValidate(zod4(mergeSchema), { id: 'merge' }),
		settle: await superValidate(zod4(settleSchema), { id: 'settle' })
	};
}

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const view = await viewOf({ locals, params });
	const actor = requireActor(locals.actor);
	await recordAccess(locals.ctx.db, locals.ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'follow-up.viewed',
		followUpId: params.followUpId
	});
	return { view, forms: await formsOf(view), done: url.searchParams.get('done') };
};

export const actions: Actions = {
	value: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(valueSchema));
		return answer(form, {
			to: pageOf(event, 'value'),
			fields: { method: 'method', measuredTime: 'measuredTime', total: 'total' },
			work: async () => {
				const { page } = await viewOf(event);
				const measurement = measurementOf(form.data, page.clinic.timeZone);
				if (!measurement.ok) return err(invalid(measurement.error.message, measurement.error.field));
				return recordMeasurement(ctx, requireActor(actor), {
					followUpId: event.params.followUpId,
					measurement: measurement.value,
					weightGrams: form.data.weightGrams
				});
			}
		});
	},

	strike: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(strikeSchema));
		return answer(form, {
			to: pageOf(event, 'strike'),
			fields: { why: 'why' },
			work: () =>
				strikeMeasurement(ctx, requireActor(actor), { followUpId: event.params.followUpId, ...form.data })
		});
	},

	accept: async (event) => {
		const { ctx, actor } = event.locals;
		const { followUpId } = event.params;
		const form = await superValidate(event.request, zod4(acceptSchema));
		return answer(form, {
			to: pageOf(event, 'decided'),
			work: async () => {
				const { values } = await viewOf(event);
				const decision = values?.recommended?.decision;
				if (!values?.assessment || !decision)
					return err(conflict('There is no result to accept: decide below.'));
				if (shownResult(values.assessment) !== form.data.shown) {
					return err(
						conflict(
							'The result has changed while this page was open. Load the page again and look at it once more.'
						)
					);
				}
				const { setting, note } = form.data;
				return decide(ctx, requireActor(actor), { followUpId, decision, reason: note, setting });
			}
		});
	},

	decide: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(decisionSchema));
		return answer(form, {
			to: pageOf(event, 'decided'),
			fields: {
				then: 'then',
				fromTime: 'fromTime',
				untilTime: 'untilTime',
				laterTime: 'laterTime',
				reason: 'reason'
			},
			work: async () => {
				const { page, now } = await viewOf(event);
				const decision = decisionOf(form.data, { timeZone: page.clinic.timeZone, now });
				if (!decision.ok) return err(invalid(decision.error.message, decision.error.field));
				const { reason, setting } = form.data;
				const { followUpId } = event.params;
				return decide(ctx, requireActor(actor), { followUpId, decision: decision.value, reason, setting });
			}
		});
	},

	endTreatment: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(endTreatmentSchema));
		return answer(form, {
			to: pageOf(event, 'treatment-ended'),
			fields: { endedAt: 'endedTime' },
			work: async () => {
				const { page } = await viewOf(event);
				const ended = fromFieldValues(form.data.endedOn, form.data.endedTime, page.clinic.timeZone);
				if (!ended.ok) return err(invalid('This date and time do not exist.', 'endedAt'));
				const { followUpId } = event.params;
				return endTreatment(ctx, requireActor(actor), { followUpId, endedAt: ended.at });
			}
		});
	},

	close: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(closeSchema));
		const { outcome, why } = form.data;
		return answer(form, {
			to: pageOf(event, 'closed'),
			fields: { why: 'why', outcome: 'outcome' },
			work: async () => {
				if (outcome === null) return err(invalid('Choose an outcome.', 'outcome'));
				const { followUpId } = event.params;
				return closeFollowUp(ctx, requireActor(actor), { followUpId, outcome, why });
			}
		});
	},

	reopen: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(reopenSchema));
		return answer(form, {
			to: pageOf(event, 'reopened'),
			fields: { why: 'why' },
			work: () =>
				reopenFollowUp(ctx, requireActor(actor), { followUpId: event.params.followUpId, ...form.data })
		});
	},

	merge: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(mergeSchema));
		return answer(form, {
			to: pageOf(event, 'merged'),
			fields: { intoId: 'intoId', why: 'why' },
			work: () =>
				mergeFollowUp(ctx, requireActor(actor), { followUpId: event.params.followUpId, ...form.data })
		});
	},

	settle: async (event) => {
		const { ctx, actor } = event.locals;
		const form = await superValidate(event.request, zod4(settleSchema));
		return answer(form, {
			to: pageOf(event, 'settled'),
			fields: { how: 'how' },
			work: async () => {
				const { alerts } = await viewOf(event);
				if (!alerts.some(({ id }) => id === form.data.alertId)) return err({ code: 'not_found' });
				const settled = await settleAlert(ctx, requireActor(actor), form.data);
				return settled.ok ? ok(null) : settled;
			}
		});
	}
};
