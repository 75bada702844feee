import { and, asc, eq, inArray, isNull, or } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { alerts, checkIns, followUps, visits } from '../db/schema/follow-up';
import { measurements, newborns, phototherapyCourses } from '../db/schema/newborn';
import { sites } from '../db/schema/organisation';

const CARD = {
	followUp: followUps,
	newborn: newborns,
	clinic: { name: sites.name, timeZone: sites.timeZone }
};

/** Whose work is listed: the pediatricians of these clinics, and one person by name after a climb. */
export interface Owing {
	readonly clinicIds: readonly string[];
	readonly staffId: string;
}

/** Follow-ups whose next step a pediatrician of these clinics owes, or this person by name. */
export function listOwedSteps(db: Reader, { clinicIds, staffId }: Owing) {
	return db
		.select(CARD)
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.where(
			and(
				inArray(followUps.clinicId, [...clinicIds]),
				or(eq(followUps.nextStepRole, 'pediatrician'), eq(followUps.nextStepStaffId, staffId))
			)
		)
		.orderBy(asc(followUps.nextStepDueAt));
}

/** Open alerts owed in the same way, each with its follow-up. */
export function listOwedAlerts(db: Reader, { clinicIds, staffId }: Owing) {
	return db
		.select({ ...CARD, alert: alerts })
		.from(alerts)
		.innerJoin(followUps, eq(followUps.id, alerts.followUpId))
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.where(
			and(
				inArray(followUps.clinicId, [...clinicIds]),
				isNull(alerts.settledAt),
				or(eq(alerts.role, 'pediatrician'), eq(alerts.staffId, staffId))
			)
		)
		.orderBy(asc(alerts.dueAt));
}

/** What lies on the hour lines of these newborns, each list oldest first. */
export async function listMarks(db: Reader, newbornIds: readonly string[], followUpIds: readonly string[]) {
	if (newbornIds.length === 0) return { measurements: [], phototherapy: [], visits: [], checkIns: [] };
	const newborn = [...newbornIds];
	const followUp = [...followUpIds];
	return {
		measurements: await db
			.select()
			.from(measurements)
			.where(and(inArray(measurements.newbornId, newborn), eq(measurements.status, 'final')))
			.orderBy(asc(measurements.measuredAt)),
		phototherapy: await db
			.select()
			.from(phototherapyCourses)
			.where(inArray(phototherapyCourses.newbornId, newborn))
			.orderBy(asc(phototherapyCourses.startedAt)),
		visits: await db
			.select()
			.from(visits)
			.where(inArray(visits.followUpId, followUp))
			.orderBy(asc(visits.startsAt)),
		checkIns: await db
			.select({ followUpId: checkIns.followUpId, at: checkIns.answeredAt, result: checkIns.result })
			.from(checkIns)
			.where(inArray(checkIns.followUpId, followUp))
			.orderBy(asc(checkIns.answeredAt))
	};
}

export type Marks = Awaited<ReturnType<typeof listMarks>>;
export type OwedStepRow = Awaited<ReturnType<typeof listOwedSteps>>[number];
export type OwedAlertRow = Awaited<ReturnType<typeof listOwedAlerts>>[number];
