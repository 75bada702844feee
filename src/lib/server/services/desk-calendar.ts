import { DateTime } from 'luxon';
import { can, sitesWhere, type Action } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { windowCounts } from '../../domain/followup/desk-queue';
import { err, ok, type Result } from '../../domain/result';
import type { CalendarView, ChoosingFor } from '../../schemas/desk-calendar';
import type { ClinicChoice } from '../../schemas/desk-view';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import { listClosedBetween, listTakenPlaces } from '../repos/calendar';
import { findFollowUp } from '../repos/follow-ups';
import { listClinics, loadDeskFacts } from '../repos/queue';
import { listOpenings } from '../repos/sites';
import { calendarDays } from './calendar-days';
import { resourceOf } from './change';
import { deskRows } from './desk-rows';

export interface DayAsked {
	readonly clinicId?: string | undefined;
	/** Local date; absent: today. */
	readonly on?: string | undefined;
}

export interface ChosenClinic {
	readonly clinics: readonly ClinicChoice[];
	readonly clinic: ClinicChoice;
	readonly on: string;
	readonly todayOn: string;
	readonly day: DateTime;
}

/** The clinic and the day that somebody looks at: the one asked for where it is theirs, else their first. */
export async function chooseClinicDay(
	ctx: Ctx,
	actor: StaffActor,
	{ action, clinicId, on }: DayAsked & { readonly action: Action }
): Promise<ChosenClinic | null> {
	const own = sitesWhere(actor, action);
	const found = own.length === 0 ? [] : await listClinics(ctx.db, own);
	const clinics = found.map(({ id, name, timeZone }) => ({ id, name, timeZone }));
	const clinic = clinics.find(({ id }) => id === clinicId) ?? clinics[0];
	if (!clinic) return null;
	const today = DateTime.fromJSDate(ctx.clock.now(), { zone: clinic.timeZone }).startOf('day');
	const asked = on ? DateTime.fromISO(on, { zone: clinic.timeZone }).startOf('day') : today;
	const day = asked.isValid ? asked : today;
	return { clinics, clinic, day, on: day.toISODate() ?? '', todayOn: today.toISODate() ?? '' };
}

async function findChoosingFor(
	ctx: Ctx,
	actor: StaffActor,
	followUpId: string
): Promise<(ChoosingFor & { readonly clinicId: string; readonly timeZone: string }) | null> {
	const loaded = await findFollowUp(ctx.db, followUpId);
	if (!loaded || !can(actor, 'visit.manage', resourceOf(loaded))) return null;
	const ids = [followUpId];
	const facts = await loadDeskFacts(ctx.db, ids);
	const [row] = facts ? deskRows(facts, { ids, alerts: [], now: ctx.clock.now() }) : [];
	if (!row) return null;
	const { familyName, givenName, recordNumber, stage, visit, clinicId, timeZone } = row;
	const window = windowCounts(stage) ? loaded.state.window : null;
	const mayApprove = can(actor, 'visit.approve-outside-window', resourceOf(loaded));
	const who = { followUpId, familyName, givenName, recordNumber, stage, visit, window, mayApprove };
	return { ...who, clinicId, timeZone };
}

/** The first local day on which a newborn's window can still be met; undefined where none is left. */
function firstDayOf({ window, timeZone }: ChoosingFor & { timeZone: string }, now: Date): string | undefined {
	if (!window || window.until < now) return undefined;
	const first = window.from > now ? window.from : now;
	return DateTime.fromJSDate(first, { zone: timeZone }).toISODate() ?? undefined;
}

/** The local dates of the week that holds a day, from Monday. */
const weekOf = (day: DateTime): string[] =>
	Array.from({ length: 7 }, (_, i) => day.startOf('week').plus({ days: i }).toISODate() ?? '');

/**
 * A week of one clinic. With a newborn to choose for, its own clinic is shown, and each time says whether it lies in
 * the newborn's window. Not found: no clinic is the actor's, or the newborn is not.
 */
export async function getCalendar(
	ctx: Ctx,
	actor: StaffActor,
	asked: DayAsked & { readonly forId?: string | undefined }
): Promise<Result<CalendarView, AppError>> {
	const choosing = asked.forId ? await findChoosingFor(ctx, actor, asked.forId) : null;
	if (asked.forId && !choosing) return err(notFound);
	const clinicId = choosing?.clinicId ?? asked.clinicId;
	const on = asked.on ?? (choosing ? firstDayOf(choosing, ctx.clock.now()) : undefined);
	const chosen = await chooseClinicDay(ctx, actor, { on, clinicId, action: 'calendar.view' });
	if (!chosen) return err(notFound);
	const { clinic, day } = chosen;
	const days = weekOf(day);
	const [first = '', last = ''] = [days[0], days[6]];
	const from = day.startOf('week').toJSDate();
	const until = day.startOf('week').plus({ weeks: 1 }).toJSDate();
	const [openings, closed, taken] = await Promise.all([
		listOpenings(ctx.db, clinic.id),
		listClosedBetween(ctx.db, { clinicId: clinic.id, from: first, until: last }),
		listTakenPlaces(ctx.db, { clinicId: clinic.id, from, until })
	]);
	const now = ctx.clock.now();
	const window = choosing ? choosing.window : undefined;
	return ok({
		nowAt: now,
		clinics: chosen.clinics,
		clinic,
		on: chosen.on,
		todayOn: chosen.todayOn,
		previousOn: day.minus({ weeks: 1 }).toISODate() ?? '',
		nextOn: day.plus({ weeks: 1 }).toISODate() ?? '',
		days: calendarDays({ timeZone: clinic.timeZone, days, openings, closed, taken, now, window }),
		choosingFor: choosing
	});
}
