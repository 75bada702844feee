import { and, eq } from 'drizzle-orm';
import type { Actor, StaffActor } from '../../domain/access/roles';
import { isInsideWindow } from '../../domain/followup/places';
import type { VisitKind } from '../../domain/followup/visit';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { visits } from '../db/schema/follow-up';
import { isDuplicate } from '../db/tx';
import { conflict, invalid, notAllowed, type AppError } from '../errors';
import type { LoadedFollowUp, VisitRow } from '../repos/follow-ups';
import { findPlaces } from '../repos/places';
import { releaseVisit } from '../repos/visits';
import { advance } from './advance';
import { raiseAlert, settleAlertsOf } from './alerts';
import { changeFollowUp, mayOn } from './change';
import { replanMessages } from './message-plan';

export interface WantedPlace {
	readonly startsAt: Date;
	readonly kind: VisitKind;
	/** Why a time outside the window is right; only with the right to approve it. */
	readonly outsideWindowWhy?: string;
}

interface TakenPlace extends WantedPlace {
	readonly endsAt: Date;
	readonly placeNumber: number;
	readonly isOutsideWindow: boolean;
}

const PLACE_GONE = conflict('That place was just taken. Choose another one.');

async function choosePlace(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	{ actor, wanted }: { readonly actor: Actor; readonly wanted: WantedPlace }
): Promise<Result<TakenPlace, AppError>> {
	const { startsAt, kind } = wanted;
	if (startsAt <= ctx.clock.now()) return err(invalid('This time has already passed.', 'startsAt'));
	const isOutsideWindow = !isInsideWindow(startsAt, loaded.state.window);
	if (isOutsideWindow && !mayOn(actor, ['visit.approve-outside-window'], loaded)) {
		return err(invalid('This time is outside the window. Ask the pediatrician to approve it.', 'startsAt'));
	}
	if (isOutsideWindow && !wanted.outsideWindowWhy?.trim()) {
		return err(invalid('Say why a time outside the window is right.', 'outsideWindowWhy'));
	}
	const places = await findPlaces(tx, { clinicId: loaded.row.clinicId, from: startsAt, until: startsAt });
	const place = places?.find((p) => p.kind === kind);
	if (!place) return err(invalid('The clinic has no such place at this time.', 'startsAt'));
	const [placeNumber] = place.freeNumbers;
	if (placeNumber === undefined) return err(PLACE_GONE);
	return ok({ ...wanted, endsAt: place.endsAt, placeNumber, isOutsideWindow });
}

async function insertVisit(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	asked: { readonly actor: Actor; readonly place: TakenPlace; readonly after: VisitRow | null }
): Promise<Result<string, AppError>> {
	const { actor, place, after } = asked;
	const id = ctx.random.id();
	try {
		await tx.insert(visits).values({
			id,
			followUpId: loaded.row.id,
			clinicId: loaded.row.clinicId,
			round: loaded.row.round,
			kind: place.kind,
			startsAt: place.startsAt,
			endsAt: place.endsAt,
			placeNumber: place.placeNumber,
			holdsPlace: true,
			isOpen: true,
			state: 'booked',
			isOutsideWindow: place.isOutsideWindow,
			outsideWindowWhy: place.outsideWindowWhy ?? null,
			calendarUid: after?.calendarUid ?? `${id}@fadewell`,
			calendarSequence: after ? after.calendarSequence + 1 : 0,
			bookedBy: actor.kind === 'staff' ? actor.staffId : null,
			bookedAt: ctx.clock.now()
		});
		return ok(id);
	} catch (error) {
		if (isDuplicate(error)) return err(PLACE_GONE);
		throw error;
	}
}

/** Books inside a transaction that is already open: for the discharge, which books and hands over together. */
export async function bookWithin(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	{ actor, wanted }: { readonly actor: Actor; readonly wanted: WantedPlace }
): Promise<Result<LoadedFollowUp, AppError>> {
	if (loaded.openVisit) return err(conflict('This newborn already has a visit. Move it instead.'));
	const place = await choosePlace(tx, ctx, loaded, { actor, wanted });
	if (!place.ok) return place;
	const visitId = await insertVisit(tx, ctx, loaded, { actor, place: place.value, after: null });
	if (!visitId.ok) return visitId;
	const visit = { id: visitId.value, startsAt: wanted.startsAt, isConfirmed: false };
	return advance(
		tx,
		ctx,
		loaded,
		{ kind: 'booked', visit },
		{ actor, why: wanted.outsideWindowWhy, detail: { visitId: visit.id } }
	);
}

/** Books a visit at the newborn's clinic. Refused: outside the window without approval, place taken, no such place. */
export function bookVisit(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, ...wanted }: WantedPlace & { readonly followUpId: string }
): Promise<Result<{ visitId: string }, AppError>> {
	return changeFollowUp(
		ctx,
		{ actor, followUpId, actions: ['visit.book-first', 'visit.manage'] },
		async (tx, loaded) => {
			const isFirst = loaded.row.round === 1 && loaded.state.stage === 'to-book';
			if (!isFirst && !mayOn(actor, ['visit.manage'], loaded)) return err(notAllowed);
			const booked = await bookWithin(tx, ctx, loaded, { actor, wanted });
			return booked.ok ? ok({ visitId: booked.value.openVisit?.id ?? '' }) : booked;
		}
	);
}

/** Moves the open visit to another place; calendars follow by the same UID and a higher SEQUENCE. */
export function moveVisit(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, why, ...wanted }: WantedPlace & { readonly followUpId: string; readonly why: string }
): Promise<Result<{ visitId: string }, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const old = loaded.openVisit;
		if (!old) return err(conflict('There is no visit to move.'));
		await releaseVisit(tx, old, { state: 'moved', at: ctx.clock.now() });
		const place = await choosePlace(tx, ctx, loaded, { actor, wanted });
		if (!place.ok) return place;
		const visitId = await insertVisit(tx, ctx, loaded, { actor, place: place.value, after: old });
		if (!visitId.ok) return visitId;
		const visit = { id: visitId.value, startsAt: wanted.startsAt, isConfirmed: false };
		const detail = { visitId: visit.id, movedFrom: old.startsAt.toISOString() };
		const moved = await advance(tx, ctx, loaded, { kind: 'moved', visit }, { actor, why, detail });
		if (!moved.ok) return moved;
		await settleAlertsOf(tx, ctx, { followUpId, kind: 'other-time-asked', how: 'The visit was moved.' });
		return ok({ visitId: visit.id });
	});
}

/** Cancels the open visit; the follow-up owes a new one. */
export function cancelVisit(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId, why }: { readonly followUpId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const visit = loaded.openVisit;
		if (!visit) return err(conflict('There is no visit to cancel.'));
		await releaseVisit(tx, visit, { state: 'cancelled', at: ctx.clock.now() });
		const cancelled = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'cancelled' },
			{ actor, why, detail: { visitId: visit.id } }
		);
		return cancelled.ok ? ok(null) : cancelled;
	});
}

/** The family says it will come: by link, by text, on the telephone or at the desk. Confirming twice changes nothing. */
export function confirmVisit(
	ctx: Ctx,
	actor: Actor,
	{ followUpId, via }: { readonly followUpId: string; readonly via: 'link' | 'sms' | 'call' | 'at-desk' }
): Promise<Result<{ visitId: string }, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const visit = loaded.openVisit;
		if (!visit) return err(conflict('There is no visit to confirm.'));
		if (visit.state === 'confirmed') return ok({ visitId: visit.id });
		const now = ctx.clock.now();
		await tx
			.update(visits)
			.set({ state: 'confirmed', confirmedAt: now, confirmedVia: via })
			.where(eq(visits.id, visit.id));
		const confirmed = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'confirmed' },
			{ actor, detail: { visitId: visit.id, via } }
		);
		return confirmed.ok ? ok({ visitId: visit.id }) : confirmed;
	});
}

/** The family asks for another time: the visit stands until the desk has moved it. */
export function askForAnotherTime(
	ctx: Ctx,
	actor: Actor,
	{ followUpId, wish }: { readonly followUpId: string; readonly wish: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const visit = loaded.openVisit;
		if (!visit) return err(conflict('There is no visit to move. Please call the clinic.'));
		const now = ctx.clock.now();
		await tx
			.update(visits)
			.set({ otherTimeAskedAt: now, otherTimeWish: wish || null })
			.where(eq(visits.id, visit.id));
		const halfWay = new Date(now.getTime() + Math.max(0, visit.startsAt.getTime() - now.getTime()) / 2);
		const usual = new Date(now.getTime() + 2 * 3_600_000);
		await raiseAlert(tx, ctx, {
			followUpId,
			kind: 'other-time-asked',
			role: 'desk',
			siteId: loaded.row.clinicId,
			dueAt: usual < halfWay ? usual : halfWay,
			detail: wish ? `Asks for another time: ${wish}`.slice(0, 500) : 'Asks for another time.',
			dedupeKey: `other-time ${visit.id} ${now.getTime()}`
		});
		await replanMessages(tx, ctx, followUpId);
		return ok(null);
	});
}

/** The newborn has come, on time or after being marked as missed. */
export function markArrived(
	ctx: Ctx,
	actor: StaffActor,
	{ followUpId }: { readonly followUpId: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const visit = loaded.openVisit ?? (await lastMissed(tx, loaded));
		if (!visit) return err(conflict('There is no visit to mark.'));
		const now = ctx.clock.now();
		await tx
			.update(visits)
			.set({ state: 'arrived', arrivedAt: now, endedAt: now, isOpen: null })
			.where(eq(visits.id, visit.id));
		const arrived = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'arrived' },
			{ actor, detail: { visitId: visit.id } }
		);
		return arrived.ok ? ok(null) : arrived;
	});
}

async function lastMissed(tx: Tx, loaded: LoadedFollowUp): Promise<VisitRow | undefined> {
	const rows = await tx
		.select()
		.from(visits)
		.where(
			and(
				eq(visits.followUpId, loaded.row.id),
				eq(visits.state, 'missed'),
				eq(visits.round, loaded.row.round)
			)
		);
	return rows.sort((a, b) => b.startsAt.getTime() - a.startsAt.getTime())[0];
}

/** The newborn did not come; only once the visit has begun. The family is owed a call by a time that the window sets. */
export function markMissed(
	ctx: Ctx,
	actor: Actor,
	{ followUpId }: { readonly followUpId: string }
): Promise<Result<null, AppError>> {
	return changeFollowUp(ctx, { actor, followUpId, actions: ['visit.manage'] }, async (tx, loaded) => {
		const visit = loaded.openVisit;
		if (!visit) return err(conflict('There is no visit to mark.'));
		const now = ctx.clock.now();
		if (visit.startsAt > now) return err(invalid('The visit has not begun yet.'));
		await tx
			.update(visits)
			.set({ state: 'missed', endedAt: now, isOpen: null })
			.where(eq(visits.id, visit.id));
		const missed = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'missed' },
			{ actor, detail: { visitId: visit.id } }
		);
		return missed.ok ? ok(null) : missed;
	});
}
