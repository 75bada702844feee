import { and, eq, gte, lte } from 'drizzle-orm';
import { placesBetween, type PlaceTime } from '../../domain/followup/places';
import type { Reader } from '../db/client';
import { visits } from '../db/schema/follow-up';
import { closedDays, openings, sites } from '../db/schema/organisation';

/** The places of a clinic between two instants with what is free in each; null for an unknown clinic. */
export async function findPlaces(
	db: Reader,
	asked: { readonly clinicId: string; readonly from: Date; readonly until: Date }
): Promise<PlaceTime[] | null> {
	const { clinicId, from, until } = asked;
	const [site] = await db.select({ timeZone: sites.timeZone }).from(sites).where(eq(sites.id, clinicId));
	if (!site) return null;
	const open = await db
		.select()
		.from(openings)
		.where(and(eq(openings.siteId, clinicId), eq(openings.isActive, true)));
	const closed = await db
		.select({ on: closedDays.closedOn })
		.from(closedDays)
		.where(eq(closedDays.siteId, clinicId));
	const taken = await db
		.select({ startsAt: visits.startsAt, kind: visits.kind, placeNumber: visits.placeNumber })
		.from(visits)
		.where(
			and(
				eq(visits.clinicId, clinicId),
				eq(visits.holdsPlace, true),
				gte(visits.startsAt, from),
				lte(visits.startsAt, until)
			)
		);
	return placesBetween({
		openings: open,
		closedDays: closed.map((day) => day.on),
		timeZone: site.timeZone,
		taken,
		from,
		until
	});
}
