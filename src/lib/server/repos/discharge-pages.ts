import { aliasedTable, and, asc, eq, gte, inArray, isNull, or } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { followUps, visits } from '../db/schema/follow-up';
import { carers, measurements, newborns, phototherapyCourses } from '../db/schema/newborn';
import { organisations, sites } from '../db/schema/organisation';

const units = aliasedTable(sites, 'units');

/** Columns that every page about a discharge needs. */
const page = {
	followUp: followUps,
	newborn: newborns,
	unit: { id: units.id, name: units.name, phone: units.phone, timeZone: units.timeZone },
	clinic: {
		id: sites.id,
		name: sites.name,
		address: sites.address,
		phone: sites.phone,
		afterHoursPhone: sites.afterHoursPhone,
		timeZone: sites.timeZone
	}
};

const pages = (db: Reader) =>
	db
		.select(page)
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.innerJoin(units, eq(units.id, followUps.birthSiteId));

export type DischargePageRow = Awaited<ReturnType<typeof pages>>[number];

/** First rounds of these sites that were not handed over yet, or handed over since `handedOverFrom`; at most 200. */
export function listDischargePages(
	db: Reader,
	asked: {
		readonly organisationId: string;
		readonly siteIds: readonly string[];
		readonly handedOverFrom: Date;
	}
): Promise<DischargePageRow[]> {
	const siteIds = [...asked.siteIds];
	return pages(db)
		.where(
			and(
				eq(newborns.organisationId, asked.organisationId),
				or(inArray(followUps.birthSiteId, siteIds), inArray(followUps.clinicId, siteIds)),
				or(
					and(isNull(followUps.handedOverAt), isNull(followUps.closedAt)),
					gte(followUps.handedOverAt, asked.handedOverFrom)
				)
			)
		)
		.orderBy(asc(followUps.plannedDischargeAt), asc(followUps.id))
		.limit(200);
}

export async function findDischargePage(db: Reader, followUpId: string): Promise<DischargePageRow | null> {
	const [row] = await pages(db).where(eq(followUps.id, followUpId));
	return row ?? null;
}

/** What hangs on several newborns and follow-ups at once, for a list: four queries however long it is. */
export async function listDischargeParts(db: Reader, rows: readonly DischargePageRow[]) {
	const newbornIds = rows.map(({ newborn }) => newborn.id);
	const followUpIds = rows.map(({ followUp }) => followUp.id);
	if (rows.length === 0) return { measurements: [], carers: [], courses: [], visits: [] };
	return {
		measurements: await db
			.select()
			.from(measurements)
			.where(and(inArray(measurements.newbornId, newbornIds), eq(measurements.status, 'final')))
			.orderBy(asc(measurements.measuredAt)),
		carers: await db
			.select()
			.from(carers)
			.where(inArray(carers.newbornId, newbornIds))
			.orderBy(asc(carers.callOrder)),
		courses: await db
			.select()
			.from(phototherapyCourses)
			.where(inArray(phototherapyCourses.newbornId, newbornIds))
			.orderBy(asc(phototherapyCourses.startedAt)),
		visits: await db
			.select()
			.from(visits)
			.where(inArray(visits.followUpId, followUpIds))
			.orderBy(asc(visits.startsAt))
	};
}

export async function findOrganisationRules(db: Reader, organisationId: string) {
	const [row] = await db
		.select({
			name: organisations.name,
			standard: organisations.standard,
			emergencyNumber: organisations.emergencyNumber
		})
		.from(organisations)
		.where(eq(organisations.id, organisationId));
	return row ?? null;
}
