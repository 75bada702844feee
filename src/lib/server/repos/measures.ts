import { and, asc, count, eq, gte, inArray, lt, ne, type SQL } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { attempts, followUps, visits } from '../db/schema/follow-up';
import { measurements, newborns } from '../db/schema/newborn';
import type { Site } from './sites';

/** Whether a site is a follow-up's birth unit or its clinic. */
function ofSite(site: Pick<Site, 'id' | 'kind'>): SQL {
	return site.kind === 'birth-unit' ? eq(followUps.birthSiteId, site.id) : eq(followUps.clinicId, site.id);
}

/** Follow-ups of one site handed over in a period, with what lies under the measures. */
export async function listMeasured(
	db: Reader,
	asked: { readonly site: Pick<Site, 'id' | 'kind'>; readonly from: Date; readonly until: Date }
) {
	const { site, from, until } = asked;
	const rows = await db
		.select({ followUp: followUps, newborn: newborns })
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(and(ofSite(site), gte(followUps.handedOverAt, from), lt(followUps.handedOverAt, until)));
	if (rows.length === 0) return { rows, visits: [], attempts: [], measurements: [] };
	const ids = rows.map(({ followUp }) => followUp.id);
	const newbornIds = rows.map(({ newborn }) => newborn.id);
	return {
		rows,
		visits: await db
			.select()
			.from(visits)
			.where(inArray(visits.followUpId, ids))
			.orderBy(asc(visits.startsAt)),
		attempts: await db
			.select({ followUpId: attempts.followUpId, at: attempts.at })
			.from(attempts)
			.where(and(inArray(attempts.followUpId, ids), eq(attempts.outcome, 'reached'))),
		measurements: await db
			.select()
			.from(measurements)
			.where(and(inArray(measurements.newbornId, newbornIds), eq(measurements.status, 'final')))
			.orderBy(asc(measurements.measuredAt))
	};
}

/** Open follow-ups of a site, and how many of them owe a next step whose time has passed. */
export async function countOverdue(
	db: Reader,
	{ site, now }: { readonly site: Pick<Site, 'id' | 'kind'>; readonly now: Date }
): Promise<{ open: number; overdue: number }> {
	const isOpen = and(ofSite(site), ne(followUps.stage, 'closed'));
	const [all] = await db.select({ n: count() }).from(followUps).where(isOpen);
	const [late] = await db
		.select({ n: count() })
		.from(followUps)
		.where(and(isOpen, lt(followUps.nextStepDueAt, now)));
	return { open: all?.n ?? 0, overdue: late?.n ?? 0 };
}
