import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { callAims, ladderRows } from '../../domain/followup/call-script';
import { owedByDesk } from '../../domain/followup/desk-queue';
import type { PlaceTime } from '../../domain/followup/places';
import { err, ok, type Result } from '../../domain/result';
import type { CallPanel, FreePlace } from '../../schemas/desk-panel';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import { findFollowUp, type LoadedFollowUp } from '../repos/follow-ups';
import { findPlaces } from '../repos/places';
import {
	listAttempts,
	listClinics,
	listOpenAlertsOf,
	listSettledAlerts,
	loadDeskFacts,
	type DeskFacts
} from '../repos/queue';
import { resourceOf } from './change';
import { alertView, deskRows } from './desk-rows';
import { askedPlaceOf } from './outside-window';

const DAY = 86_400_000;
/** Without a window, and outside it, this many days are offered. */
const DAYS_AHEAD = 7;
const HISTORY = 12;

const freePlaces = (places: readonly PlaceTime[]): FreePlace[] =>
	places.flatMap(({ startsAt, endsAt, kind, freeNumbers, placesAtOnce }) =>
		freeNumbers.length > 0 ? [{ startsAt, endsAt, kind, free: freeNumbers.length, of: placesAtOnce }] : []
	);

/** The free places inside the window and, apart from them, those of the coming days outside it. */
async function listChoices(ctx: Ctx, { row, state }: LoadedFollowUp, now: Date) {
	const { window } = state;
	const ahead = now.getTime() + DAYS_AHEAD * DAY;
	const until = new Date(Math.max(ahead, window?.until.getTime() ?? 0));
	const from = new Date(now.getTime() + 1);
	const free = freePlaces((await findPlaces(ctx.db, { clinicId: row.clinicId, from, until })) ?? []);
	const isInside = ({ startsAt }: FreePlace) =>
		!window || (startsAt >= window.from && startsAt <= window.until);
	return {
		inside: free.filter(isInside),
		outside: free.filter((p) => !isInside(p) && p.startsAt.getTime() <= ahead)
	};
}

/** When the family was found missing: the start of the visit missed last in this round. */
function missingSince(facts: DeskFacts, round: number): Date | null {
	const missed = facts.visits.filter((visit) => visit.state === 'missed' && visit.round === round);
	return missed.length === 0 ? null : new Date(Math.max(...missed.map((v) => v.startsAt.getTime())));
}

function ladderOf(loaded: LoadedFollowUp, facts: DeskFacts, now: Date): CallPanel['ladder'] {
	const since = missingSince(facts, loaded.row.round);
	if (loaded.state.stage !== 'missed' || !since) return [];
	const { window } = loaded.state;
	return ladderRows({ since, now, policy: loaded.clinic.policy, window, attempts: facts.attempts });
}

function mayOf(actor: StaffActor, loaded: LoadedFollowUp): CallPanel['may'] {
	const on = resourceOf(loaded);
	return {
		log: can(actor, 'attempt.log', on),
		manage: can(actor, 'visit.manage', on),
		settle: can(actor, 'alert.settle', on),
		approve: can(actor, 'visit.approve-outside-window', on)
	};
}

/**
 * Everything that one call with a family needs, for whoever works the queue at this clinic; the look is recorded.
 * Answered as not found for every other clinic.
 */
export async function getCallPanel(
	ctx: Ctx,
	actor: StaffActor,
	followUpId: string
): Promise<Result<CallPanel, AppError>> {
	const loaded = await findFollowUp(ctx.db, followUpId);
	if (!loaded || !can(actor, 'queue.view', resourceOf(loaded))) return err(notFound);
	const now = ctx.clock.now();
	const ids = [followUpId];
	const [facts, alerts, [clinic]] = await Promise.all([
		loadDeskFacts(ctx.db, ids),
		listOpenAlertsOf(ctx.db, ids),
		listClinics(ctx.db, [loaded.row.clinicId])
	]);
	const [row] = facts ? deskRows(facts, { ids, alerts, now }) : [];
	if (!facts || !row || !clinic) return err(notFound);
	const [places, tries, settled] = await Promise.all([
		listChoices(ctx, loaded, now),
		listAttempts(ctx.db, followUpId, HISTORY),
		listSettledAlerts(ctx.db, followUpId, HISTORY)
	]);
	await recordAccess(ctx.db, ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'follow-up.viewed',
		followUpId,
		detail: 'call panel'
	});
	return ok({
		nowAt: now,
		row,
		clinic,
		aims: callAims({
			stage: row.stage,
			visitAt: row.visit?.startsAt ?? null,
			alertKinds: alerts.filter(owedByDesk).map(({ kind }) => kind),
			now
		}),
		laterCheckAsks: loaded.state.laterCheckAsks,
		ladder: ladderOf(loaded, facts, now),
		asked: alerts.flatMap((alert) => {
			const place = askedPlaceOf(alert.dedupeKey);
			return place ? [{ ...alertView(alert), startsAt: place.startsAt, visitKind: place.kind }] : [];
		}),
		places,
		attempts: tries,
		settled: settled.flatMap(({ settledAt, ...rest }) => (settledAt ? [{ ...rest, settledAt }] : [])),
		may: mayOf(actor, loaded)
	});
}
