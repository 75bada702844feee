import { aliasedTable, and, asc, between, eq, inArray, ne, or } from 'drizzle-orm';
import type { Reader } from '../db/client';
import {
	alerts,
	attempts,
	checkIns,
	decisions,
	followUps,
	transitions,
	visits
} from '../db/schema/follow-up';
import { messages, threadEntries } from '../db/schema/messaging';
import { measurements, newborns } from '../db/schema/newborn';
import { organisations, sites } from '../db/schema/organisation';
import { staff } from '../db/schema/staff';

const units = aliasedTable(sites, 'units');

/** A follow-up with its newborn, both sites and the organisation; null where there is none. */
export async function findFollowUpPage(db: Reader, followUpId: string) {
	const [row] = await db
		.select({
			followUp: followUps,
			newborn: newborns,
			clinic: sites,
			birthSite: { id: units.id, name: units.name, phone: units.phone },
			organisation: {
				id: organisations.id,
				name: organisations.name,
				emergencyNumber: organisations.emergencyNumber
			}
		})
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.innerJoin(units, eq(units.id, followUps.birthSiteId))
		.innerJoin(organisations, eq(organisations.id, newborns.organisationId))
		.where(eq(followUps.id, followUpId));
	return row ?? null;
}

export type FollowUpPageRow = NonNullable<Awaited<ReturnType<typeof findFollowUpPage>>>;

/** Every value ever entered, struck ones too, in order of the time they were true. */
export const listAllMeasurements = (db: Reader, newbornId: string) =>
	db
		.select()
		.from(measurements)
		.where(eq(measurements.newbornId, newbornId))
		.orderBy(asc(measurements.measuredAt));

/** What happened around one follow-up, each list oldest first; alerts still open come by their due time. */
export async function listHappenings(db: Reader, followUpId: string) {
	return {
		visits: await db
			.select()
			.from(visits)
			.where(eq(visits.followUpId, followUpId))
			.orderBy(asc(visits.startsAt)),
		alerts: await db
			.select()
			.from(alerts)
			.where(eq(alerts.followUpId, followUpId))
			.orderBy(asc(alerts.dueAt)),
		attempts: await db
			.select()
			.from(attempts)
			.where(eq(attempts.followUpId, followUpId))
			.orderBy(asc(attempts.at)),
		checkIns: await db
			.select()
			.from(checkIns)
			.where(eq(checkIns.followUpId, followUpId))
			.orderBy(asc(checkIns.answeredAt)),
		messages: await db
			.select()
			.from(messages)
			.where(eq(messages.followUpId, followUpId))
			.orderBy(asc(messages.runAt), asc(messages.id)),
		words: await db
			.select()
			.from(threadEntries)
			.where(eq(threadEntries.followUpId, followUpId))
			.orderBy(asc(threadEntries.at)),
		decisions: await db
			.select()
			.from(decisions)
			.where(eq(decisions.followUpId, followUpId))
			.orderBy(asc(decisions.decidedAt)),
		transitions: await db
			.select()
			.from(transitions)
			.where(eq(transitions.followUpId, followUpId))
			.orderBy(asc(transitions.sequence))
	};
}

export type Happenings = Awaited<ReturnType<typeof listHappenings>>;

/** Open follow-ups of the same clinic that may be the same newborn: born within a day, or of the same family name. */
export function listMergeTargets(
	db: Reader,
	like: {
		readonly followUpId: string;
		readonly clinicId: string;
		readonly bornAt: Date;
		readonly familyName: string;
	}
) {
	const day = 86_400_000;
	return db
		.select({
			id: followUps.id,
			familyName: newborns.familyName,
			givenName: newborns.givenName,
			bornOn: newborns.bornOn,
			recordNumber: newborns.recordNumber
		})
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(
			and(
				eq(followUps.clinicId, like.clinicId),
				ne(followUps.stage, 'closed'),
				ne(followUps.id, like.followUpId),
				or(
					between(
						newborns.bornAt,
						new Date(like.bornAt.getTime() - day),
						new Date(like.bornAt.getTime() + day)
					),
					eq(newborns.familyName, like.familyName)
				)
			)
		)
		.orderBy(asc(newborns.familyName), asc(newborns.givenName))
		.limit(50);
}

/** Names of people by id. */
export async function staffNames(db: Reader, ids: readonly string[]): Promise<Map<string, string>> {
	if (ids.length === 0) return new Map();
	const rows = await db
		.select({ id: staff.id, name: staff.name })
		.from(staff)
		.where(inArray(staff.id, [...new Set(ids)]));
	return new Map(rows.map(({ id, name }) => [id, name]));
}
