import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { isInsideWindow } from '../../domain/followup/places';
import { VISIT_KINDS, type VisitKind } from '../../domain/followup/visit';
import { err, ok, type Result } from '../../domain/result';
import { formatDayTime } from '../../format/time';
import { VISIT_KIND_WORDS } from '../../format/words';
import type { Ctx } from '../context';
import { conflict, invalid, notAllowed, notFound, type AppError } from '../errors';
import { findFollowUp } from '../repos/follow-ups';
import { findPlaces } from '../repos/places';
import { findAlert, listOpenAlertsOf } from '../repos/queue';
import { raiseAlert, settleAlert } from './alerts';
import { changeFollowUp, resourceOf } from './change';
import { bookVisit, moveVisit } from './visits';

/** A pediatrician answers within this, or sooner where the visit is near (common practice, no source). */
const ANSWER_MINUTES = 120;
const MINUTE = 60_000;

export interface AskedPlace {
	readonly startsAt: Date;
	readonly kind: VisitKind;
}

const keyOf = (followUpId: string, { startsAt, kind }: AskedPlace, askedAt: Date): string =>
	`outside-window ${followUpId} ${startsAt.toISOString()} ${kind} ${askedAt.getTime()}`;

/** The place that an alert of the kind `outside-window-asked` asks for; null where its key was written otherwise. */
export function askedPlaceOf(dedupeKey: string): AskedPlace | null {
	const [word, , instant, kindWord] = dedupeKey.split(' ');
	const kind = VISIT_KINDS.find((known) => known === kindWord);
	const startsAt = new Date(instant ?? '');
	if (word !== 'outside-window' || !kind || Number.isNaN(startsAt.getTime())) return null;
	return { startsAt, kind };
}

function answerDueAt(now: Date, startsAt: Date): Date {
	const halfWay = (startsAt.getTime() - now.getTime()) / 2;
	return new Date(now.getTime() + Math.min(ANSWER_MINUTES * MINUTE, halfWay));
}

/**
 * The desk asks the pediatrician to approve a visit outside the window: an alert with the place and the reason.
 * Nothing is booked by it. Refused: a time inside the window, a place that is not free, asked twice.
 */
export function askOutsideWindow(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, why, ...place }: AskedPlace & { readonly followUpId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	const { startsAt, kind } = place;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const now = ctx.clock.now();
		if (startsAt <= now) return err(invalid('This time has already passed.', 'place'));
		if (isInsideWindow(startsAt, loaded.state.window))
			return err(invalid('This time lies inside the window: book it without asking.', 'place'));
		const { clinicId } = loaded.row;
		const places = await findPlaces(tx, { clinicId, from: startsAt, until: startsAt });
		if (!places?.some((one) => one.kind === kind && one.freeNumbers.length > 0))
			return err(invalid('That place is not free. Choose another one.', 'place'));
		const open = await listOpenAlertsOf(tx, [followUpId]);
		const isAsked = open.some((alert) => {
			const asked = askedPlaceOf(alert.dedupeKey);
			return asked?.startsAt.getTime() === startsAt.getTime() && asked.kind === kind;
		});
		if (isAsked) return err(conflict('The pediatrician was already asked about this time.'));
		const when = formatDayTime(startsAt, { timeZone: loaded.clinic.timeZone });
		await raiseAlert(tx, ctx, {
			followUpId,
			kind: 'outside-window-asked',
			role: 'pediatrician',
			siteId: clinicId,
			dueAt: answerDueAt(now, startsAt),
			detail: `Asked for ${when}, ${VISIT_KIND_WORDS[kind]}. Why: ${why}`.slice(0, 500),
			dedupeKey: keyOf(followUpId, place, now)
		});
		return ok(null);
	});
}

/**
 * The pediatrician approves what was asked: the visit is booked, or the open one moved, with the pediatrician's own
 * reason, and the alert is settled. Refused where the place was taken meanwhile; the alert then stays open.
 */
export async function approveOutsideWindow(
	ctx: Ctx,
	actor: StaffActor,
	{ alertId, why }: { readonly alertId: string; readonly why: string }
): Promise<Result<{ readonly followUpId: string }, AppError>> {
	const alert = await findAlert(ctx.db, alertId);
	const place = alert && askedPlaceOf(alert.dedupeKey);
	const loaded = alert && (await findFollowUp(ctx.db, alert.followUpId));
	if (!alert || !place || !loaded || !can(actor, 'follow-up.view', resourceOf(loaded))) return err(notFound);
	if (!can(actor, 'visit.approve-outside-window', resourceOf(loaded))) return err(notAllowed);
	if (alert.settledAt) return err(conflict('Somebody answered this a moment ago.'));
	const wanted = { ...place, followUpId: alert.followUpId, outsideWindowWhy: why };
	const done = loaded.openVisit
		? await moveVisit(ctx, actor, { ...wanted, why })
		: await bookVisit(ctx, actor, wanted);
	if (!done.ok) return done;
	return settleAlert(ctx, actor, { alertId, how: `Approved: ${why}`.slice(0, 300) });
}
