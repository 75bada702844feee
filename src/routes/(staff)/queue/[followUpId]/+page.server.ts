import { err, ok, type Result } from '$lib/domain/result';
import {
	approveOutsideSchema,
	askOutsideSchema,
	bookSchema,
	cancelSchema,
	logSchema,
	moveSchema,
	settleSchema
} from '$lib/schemas/desk';
import { requireActor } from '$lib/server/auth/guard';
import { type AppError, invalid } from '$lib/server/errors';
import { settleAlert } from '$lib/server/services/alerts';
import { logAttempt } from '$lib/server/services/attempts';
import { getCallPanel } from '$lib/server/services/call-panel';
import { approveOutsideWindow, askOutsideWindow } from '$lib/server/services/outside-window';
import {
	bookVisit,
	cancelVisit,
	confirmVisit,
	markArrived,
	markMissed,
	moveVisit
} from '$lib/server/services/visits';
import { error } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { Actions, PageServerLoad, RequestEvent } from './$types';
import { answer, mark, wantedPlace } from './answer.server';

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const panel = await getCallPanel(locals.ctx, requireActor(locals.actor), params.followUpId);
	if (!panel.ok) error(404, 'There is no such record, or it is not one of yours.');
	const first = panel.value.row.carers[0]?.id ?? '';
	return {
		panel: panel.value,
		done: url.searchParams.get('done'),
		forms: {
			log: await superValidate({ carerId: first }, zod4(logSchema), { id: 'log', errors: false }),
			book: await superValidate(zod4(bookSchema), { id: 'book' }),
			move: await superValidate(zod4(moveSchema), { id: 'move' }),
			cancel: await superValidate(zod4(cancelSchema), { id: 'cancel' }),
			settle: await superValidate(zod4(settleSchema), { id: 'settle' }),
			askOutside: await superValidate(zod4(askOutsideSchema), { id: 'ask-outside' }),
			approve: await superValidate(zod4(approveOutsideSchema), { id: 'approve' })
		}
	};
};

const whoOn = ({ locals, params }: RequestEvent) =>
	[locals.ctx, requireActor(locals.actor), params.followUpId] as const;

/** An alert of another newborn must not be settled from this one's page. */
async function ownAlert(event: RequestEvent, alertId: string): Promise<Result<null, AppError>> {
	const panel = await getCallPanel(...whoOn(event));
	if (!panel.ok) return panel;
	const isOwn = panel.value.row.alerts.some(({ id }) => id === alertId);
	return isOwn ? ok(null) : err(invalid('This was settled already.'));
}

export const actions: Actions = {
	confirm: (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		return mark(event, 'confirmed', confirmVisit(ctx, actor, { followUpId, via: 'call' }));
	},
	arrive: (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		return mark(event, 'arrived', markArrived(ctx, actor, { followUpId }));
	},
	miss: (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		return mark(event, 'missed', markMissed(ctx, actor, { followUpId }));
	},
	log: async (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		const form = await superValidate(event.request, zod4(logSchema), { id: 'log' });
		const { carerId, outcome, channel, note } = form.data;
		return answer(event, form, 'logged', async () => {
			if (outcome === null) return err(invalid('Say what came of it.', 'outcome'));
			return logAttempt(ctx, actor, { followUpId, carerId: carerId || null, channel, outcome, note });
		});
	},
	book: async (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		const form = await superValidate(event.request, zod4(bookSchema), { id: 'book' });
		return answer(event, form, 'booked', () =>
			bookVisit(ctx, actor, { followUpId, ...wantedPlace(form.data) })
		);
	},
	move: async (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		const form = await superValidate(event.request, zod4(moveSchema), { id: 'move' });
		const { why } = form.data;
		return answer(event, form, 'moved', () =>
			moveVisit(ctx, actor, { followUpId, why, ...wantedPlace(form.data) })
		);
	},
	cancel: async (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		const form = await superValidate(event.request, zod4(cancelSchema), { id: 'cancel' });
		return answer(event, form, 'cancelled', () => cancelVisit(ctx, actor, { followUpId, ...form.data }));
	},
	settle: async (event) => {
		const [ctx, actor] = whoOn(event);
		const form = await superValidate(event.request, zod4(settleSchema));
		return answer(event, form, 'settled', async () => {
			const own = await ownAlert(event, form.data.alertId);
			return own.ok ? settleAlert(ctx, actor, form.data) : own;
		});
	},
	askOutside: async (event) => {
		const [ctx, actor, followUpId] = whoOn(event);
		const form = await superValidate(event.request, zod4(askOutsideSchema), { id: 'ask-outside' });
		const { why } = form.data;
		return answer(event, form, 'asked', () =>
			askOutsideWindow(ctx, actor, { ...wantedPlace(form.data), followUpId, why })
		);
	},
	approve: async (event) => {
		const [ctx, actor] = whoOn(event);
		const form = await superValidate(event.request, zod4(approveOutsideSchema));
		return answer(event, form, 'approved', async () => {
			const own = await ownAlert(event, form.data.alertId);
			return own.ok ? approveOutsideWindow(ctx, actor, form.data) : own;
		});
	}
};
