import { and, asc, desc, eq, inArray, isNotNull, isNull, lte, or, type SQL } from 'drizzle-orm';
import type { Stage } from '../../domain/followup/states';
import type { Reader } from '../db/client';
import { alerts, attempts, checkIns, followUps, visits } from '../db/schema/follow-up';
import { messages, threadEntries } from '../db/schema/messaging';
import { carers, measurements, newborns, phototherapyCourses } from '../db/schema/newborn';
import { organisations, sites } from '../db/schema/organisation';
import { staff } from '../db/schema/staff';

export type AlertRow = typeof alerts.$inferSelect;

/** The stages that stand in the queue whatever their due time. */
const ALWAYS: readonly Stage[] = ['to-book', 'booked', 'missed'];

const candidate = {
	followUpId: followUps.id,
	stage: followUps.stage,
	handedOverAt: followUps.handedOverAt,
	nextStepDueAt: followUps.nextStepDueAt,
	windowUntilAt: followUps.windowUntilAt,
	visitAt: visits.startsAt
};

const openVisitOf = and(eq(visits.followUpId, followUps.id), eq(visits.isOpen, true));

/** Few columns of every follow-up that may stand in the queue of these clinics, in no order. */
export function listQueueCandidates(
	db: Reader,
	asked: { readonly clinicIds: readonly string[]; readonly now: Date; readonly laterChecksUntil: Date }
) {
	const inStage: SQL | undefined = or(
		inArray(followUps.stage, [...ALWAYS]),
		and(eq(followUps.stage, 'confirmed'), lte(followUps.nextStepDueAt, asked.now)),
		and(eq(followUps.stage, 'later-check'), lte(followUps.nextStepDueAt, asked.laterChecksUntil))
	);
	return db
		.select(candidate)
		.from(followUps)
		.leftJoin(visits, openVisitOf)
		.where(and(inArray(followUps.clinicId, [...asked.clinicIds]), inStage));
}

/** The same few columns of named follow-ups: those that only an alert brings into the queue. */
export function listCandidatesById(db: Reader, ids: readonly string[]) {
	return db
		.select(candidate)
		.from(followUps)
		.leftJoin(visits, openVisitOf)
		.where(inArray(followUps.id, [...ids]));
}

/** Unsettled alerts of these clinics, whoever owes them. */
export function listOpenAlerts(db: Reader, clinicIds: readonly string[]): Promise<AlertRow[]> {
	return db
		.select()
		.from(alerts)
		.where(
			and(
				inArray(alerts.siteId, [...clinicIds]),
				inArray(alerts.role, ['desk', 'pediatrician']),
				isNull(alerts.settledAt)
			)
		);
}

/** Unsettled alerts of named follow-ups. */
export function listOpenAlertsOf(db: Reader, followUpIds: readonly string[]): Promise<AlertRow[]> {
	return db
		.select()
		.from(alerts)
		.where(and(inArray(alerts.followUpId, [...followUpIds]), isNull(alerts.settledAt)));
}

/** The clinics among these sites, by name. */
export function listClinics(db: Reader, siteIds: readonly string[]) {
	return db
		.select({
			id: sites.id,
			name: sites.name,
			timeZone: sites.timeZone,
			phone: sites.phone,
			afterHoursPhone: sites.afterHoursPhone,
			emergencyNumber: organisations.emergencyNumber
		})
		.from(sites)
		.innerJoin(organisations, eq(organisations.id, sites.organisationId))
		.where(and(inArray(sites.id, [...siteIds]), eq(sites.kind, 'clinic')))
		.orderBy(asc(sites.name));
}

/** Follow-up and newborn of each id. */
function listFollowUps(db: Reader, ids: string[]) {
	return db
		.select({ followUp: followUps, newborn: newborns, timeZone: sites.timeZone })
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.where(inArray(followUps.id, ids));
}

function listFamilies(db: Reader, newbornIds: string[]) {
	return Promise.all([
		db.select().from(carers).where(inArray(carers.newbornId, newbornIds)),
		db
			.select()
			.from(measurements)
			.where(and(inArray(measurements.newbornId, newbornIds), eq(measurements.status, 'final'))),
		db.select().from(phototherapyCourses).where(inArray(phototherapyCourses.newbornId, newbornIds))
	]);
}

function listHappenings(db: Reader, ids: string[]) {
	return Promise.all([
		db.select().from(visits).where(inArray(visits.followUpId, ids)),
		db
			.select({
				followUpId: attempts.followUpId,
				channel: attempts.channel,
				outcome: attempts.outcome,
				at: attempts.at
			})
			.from(attempts)
			.where(inArray(attempts.followUpId, ids)),
		db
			.select({ followUpId: checkIns.followUpId, result: checkIns.result, at: checkIns.answeredAt })
			.from(checkIns)
			.where(inArray(checkIns.followUpId, ids)),
		db
			.select({
				followUpId: messages.followUpId,
				channel: messages.channel,
				delivery: messages.delivery,
				at: messages.sentAt
			})
			.from(messages)
			.where(and(inArray(messages.followUpId, ids), isNotNull(messages.sentAt))),
		db
			.select({ followUpId: threadEntries.followUpId, at: threadEntries.at })
			.from(threadEntries)
			.where(and(inArray(threadEntries.followUpId, ids), eq(threadEntries.direction, 'in')))
	]);
}

/**
 * Everything that the rows of the desk show of these follow-ups, in nine statements however many they are.
 * Lists are unsorted; put each under its follow-up or newborn yourself.
 */
export async function loadDeskFacts(db: Reader, followUpIds: readonly string[]) {
	const ids = [...followUpIds];
	const found = ids.length === 0 ? [] : await listFollowUps(db, ids);
	if (found.length === 0) return null;
	const newbornIds = found.map(({ newborn }) => newborn.id);
	const [[family, values, courses], [visitRows, attemptRows, checkInRows, messageRows, wordRows]] =
		await Promise.all([listFamilies(db, newbornIds), listHappenings(db, ids)]);
	return {
		found,
		carers: family,
		measurements: values,
		phototherapy: courses,
		visits: visitRows,
		attempts: attemptRows,
		checkIns: checkInRows,
		messages: messageRows,
		words: wordRows
	};
}

export type DeskFacts = NonNullable<Awaited<ReturnType<typeof loadDeskFacts>>>;

export async function findAlert(db: Reader, alertId: string): Promise<AlertRow | null> {
	const [row] = await db.select().from(alerts).where(eq(alerts.id, alertId));
	return row ?? null;
}

/** The tries to reach a family, newest first, with who made them. */
export function listAttempts(db: Reader, followUpId: string, limit: number) {
	return db
		.select({
			id: attempts.id,
			at: attempts.at,
			channel: attempts.channel,
			outcome: attempts.outcome,
			note: attempts.note,
			carerName: carers.name,
			staffName: staff.name
		})
		.from(attempts)
		.leftJoin(carers, eq(carers.id, attempts.carerId))
		.leftJoin(staff, eq(staff.id, attempts.staffId))
		.where(eq(attempts.followUpId, followUpId))
		.orderBy(desc(attempts.at))
		.limit(limit);
}

/** What was settled last, with who did it and how. */
export function listSettledAlerts(db: Reader, followUpId: string, limit: number) {
	return db
		.select({
			id: alerts.id,
			kind: alerts.kind,
			settledAt: alerts.settledAt,
			settledHow: alerts.settledHow,
			staffName: staff.name
		})
		.from(alerts)
		.leftJoin(staff, eq(staff.id, alerts.settledBy))
		.where(and(eq(alerts.followUpId, followUpId), isNotNull(alerts.settledAt)))
		.orderBy(desc(alerts.settledAt))
		.limit(limit);
}
