import { and, asc, desc, eq } from 'drizzle-orm';
import type { CarerActor } from '../../domain/access/roles';
import type { Stage } from '../../domain/followup/states';
import type { VisitKind, VisitState } from '../../domain/followup/visit';
import type { CheckInReason, CheckInResult } from '../../domain/guideline/types';
import type { MessageKind } from '../../domain/messaging/kinds';
import type { Language } from '../../domain/messaging/language';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import { checkIns, followUps, visits } from '../db/schema/follow-up';
import { messages } from '../db/schema/messaging';
import { carers, newborns } from '../db/schema/newborn';
import { organisations, sites } from '../db/schema/organisation';
import { notFound, type AppError } from '../errors';
import { findByToken } from './parent-links';

export interface ParentClinic {
	readonly name: string;
	readonly address: string;
	readonly phone: string;
	readonly afterHoursPhone: string;
	readonly timeZone: string;
	readonly emergencyNumber: string;
}

/** What a carer's page shows; no value, no diagnosis, no family name. */
export interface ParentPage {
	readonly actor: CarerActor;
	readonly language: Language;
	readonly carerName: string;
	readonly givenName: string;
	readonly bornAt: Date;
	readonly now: Date;
	readonly stage: Stage;
	readonly clinic: ParentClinic;
	readonly visit: {
		readonly id: string;
		readonly startsAt: Date;
		readonly kind: VisitKind;
		readonly isConfirmed: boolean;
		readonly isOtherTimeAsked: boolean;
	} | null;
	readonly visits: readonly {
		readonly startsAt: Date;
		readonly kind: VisitKind;
		readonly state: VisitState;
	}[];
	readonly checkIns: readonly { readonly id: string; readonly at: Date; readonly result: CheckInResult }[];
	readonly messages: readonly {
		readonly id: string;
		readonly at: Date;
		readonly kind: MessageKind;
		readonly channel: 'sms' | 'mail';
	}[];
}

/** A link that cannot be used any more, or never could. */
export type ParentLinkState = Result<CarerActor, 'unknown' | 'ended'>;

/** Who the link belongs to. Reading a link changes nothing, so that a scanner's visit spends nothing. */
export async function carerOfLink(ctx: Ctx, token: string): Promise<ParentLinkState> {
	const link = await findByToken(ctx.db, ctx, token);
	if (link.state !== 'alive') return err(link.state);
	return ok({ kind: 'carer', carerId: link.carerId, followUpId: link.followUpId });
}

async function findHead(ctx: Ctx, { followUpId, carerId }: CarerActor) {
	const [head] = await ctx.db
		.select({
			stage: followUps.stage,
			givenName: newborns.givenName,
			bornAt: newborns.bornAt,
			carerName: carers.name,
			language: carers.language,
			name: sites.name,
			address: sites.address,
			phone: sites.phone,
			afterHoursPhone: sites.afterHoursPhone,
			timeZone: sites.timeZone,
			emergencyNumber: organisations.emergencyNumber
		})
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(carers, and(eq(carers.newbornId, newborns.id), eq(carers.id, carerId)))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.innerJoin(organisations, eq(organisations.id, sites.organisationId))
		.where(eq(followUps.id, followUpId));
	return head ?? null;
}

/** Loads the page of one carer. */
export async function getParentPage(ctx: Ctx, actor: CarerActor): Promise<Result<ParentPage, AppError>> {
	const head = await findHead(ctx, actor);
	if (!head) return err(notFound);
	const { followUpId, carerId } = actor;
	const visitRows = await ctx.db
		.select()
		.from(visits)
		.where(eq(visits.followUpId, followUpId))
		.orderBy(asc(visits.startsAt));
	const checkInRows = await ctx.db
		.select({ id: checkIns.id, at: checkIns.answeredAt, result: checkIns.result })
		.from(checkIns)
		.where(eq(checkIns.followUpId, followUpId))
		.orderBy(desc(checkIns.answeredAt))
		.limit(20);
	const sent = await ctx.db
		.select({ id: messages.id, at: messages.sentAt, kind: messages.kind, channel: messages.channel })
		.from(messages)
		.where(
			and(eq(messages.followUpId, followUpId), eq(messages.carerId, carerId), eq(messages.state, 'sent'))
		)
		.orderBy(desc(messages.sentAt))
		.limit(20);
	const open = visitRows.find((visit) => visit.isOpen);
	const { stage, givenName, bornAt, carerName, language, ...clinic } = head;
	return ok({
		actor,
		language,
		carerName,
		givenName,
		bornAt,
		now: ctx.clock.now(),
		stage,
		clinic,
		visit: open
			? {
					id: open.id,
					startsAt: open.startsAt,
					kind: open.kind,
					isConfirmed: open.state === 'confirmed',
					isOtherTimeAsked: open.otherTimeAskedAt !== null
				}
			: null,
		visits: visitRows
			.filter(({ state }) => state !== 'moved' && state !== 'cancelled')
			.map(({ startsAt, kind, state }) => ({ startsAt, kind, state })),
		checkIns: checkInRows,
		messages: sent.flatMap(({ at, ...message }) => (at ? [{ ...message, at }] : []))
	});
}

/** One answered check-in of the carer's follow-up, to show what it led to. */
export async function getCheckInResult(
	ctx: Ctx,
	actor: CarerActor,
	checkInId: string
): Promise<Result<{ readonly result: CheckInResult; readonly reasons: readonly CheckInReason[] }, AppError>> {
	const [found] = await ctx.db
		.select({ result: checkIns.result, reasons: checkIns.reasons })
		.from(checkIns)
		.where(and(eq(checkIns.id, checkInId), eq(checkIns.followUpId, actor.followUpId)));
	return found ? ok(found) : err(notFound);
}
