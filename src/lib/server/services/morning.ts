import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { owedByDesk } from '../../domain/followup/desk-queue';
import { LEGAL_FROM } from '../../domain/followup/transition';
import { err, ok, type Result } from '../../domain/result';
import type { MorningRow, MorningView } from '../../schemas/desk-calendar';
import type { DeskRow } from '../../schemas/desk-view';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import { listClosedBetween, listTakenPlaces, type TakenPlaceRow } from '../repos/calendar';
import { listOpenAlertsOf, loadDeskFacts } from '../repos/queue';
import { chooseClinicDay, type DayAsked } from './desk-calendar';
import { deskRows } from './desk-rows';

function morningRow(
	visit: TakenPlaceRow,
	row: DeskRow,
	asked: { mayManage: boolean; now: Date }
): MorningRow {
	const { mayManage, now } = asked;
	const isOpen = row.visit?.id === visit.visitId;
	const legal = (kind: 'confirmed' | 'arrived' | 'missed') =>
		mayManage && LEGAL_FROM[kind].includes(row.stage);
	return {
		...row,
		alerts: row.alerts.filter(owedByDesk),
		visitId: visit.visitId,
		startsAt: visit.startsAt,
		kind: visit.kind,
		state: visit.state,
		isOutsideWindow: visit.isOutsideWindow,
		mayConfirm: isOpen && visit.state === 'booked' && visit.startsAt > now && legal('confirmed'),
		mayArrive: legal('arrived') && (isOpen || (visit.state === 'missed' && row.stage === 'missed')),
		mayMiss: isOpen && visit.startsAt <= now && legal('missed')
	};
}

/** The visits of one day at one clinic in their order, with what is known of each and what may be marked. */
export async function getMorning(
	ctx: Ctx,
	actor: StaffActor,
	asked: DayAsked
): Promise<Result<MorningView, AppError>> {
	const chosen = await chooseClinicDay(ctx, actor, { ...asked, action: 'queue.view' });
	if (!chosen) return err(notFound);
	const { clinic, on, todayOn, day } = chosen;
	const from = day.toJSDate();
	const until = day.plus({ days: 1 }).toJSDate();
	const [taken, closed] = await Promise.all([
		listTakenPlaces(ctx.db, { clinicId: clinic.id, from, until }),
		listClosedBetween(ctx.db, { clinicId: clinic.id, from: on, until: on })
	]);
	taken.sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime() || a.placeNumber - b.placeNumber);
	const ids = [...new Set(taken.map(({ followUpId }) => followUpId))];
	const now = ctx.clock.now();
	const [facts, alerts] = await Promise.all([
		loadDeskFacts(ctx.db, ids),
		ids.length === 0 ? [] : listOpenAlertsOf(ctx.db, ids)
	]);
	const rows = new Map(
		(facts ? deskRows(facts, { ids, alerts, now }) : []).map((row) => [row.followUpId, row])
	);
	const mayManage = can(actor, 'visit.manage', {
		organisationId: actor.organisationId,
		clinicId: clinic.id
	});
	return ok({
		nowAt: now,
		clinics: chosen.clinics,
		clinic,
		on,
		todayOn,
		previousOn: day.minus({ days: 1 }).toISODate() ?? '',
		nextOn: day.plus({ days: 1 }).toISODate() ?? '',
		startsAt: from,
		closedBecause: closed[0]?.reason ?? null,
		rows: taken.flatMap((visit) => {
			const row = rows.get(visit.followUpId);
			return row ? [morningRow(visit, row, { mayManage, now })] : [];
		})
	});
}
