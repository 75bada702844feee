import { DEFAULT_POLICY } from '../../../src/lib/domain/followup/policy';
import type { Db } from '../../../src/lib/server/db/client';
import { openings, organisations, sites } from '../../../src/lib/server/db/schema/organisation';
import { systemRandom } from '../../../src/lib/server/random';

type NewSite = typeof sites.$inferInsert;

export async function makeOrganisation(
	db: Db,
	set: Partial<typeof organisations.$inferInsert> = {}
): Promise<string> {
	const id = systemRandom.id();
	await db.insert(organisations).values({
		id,
		name: 'Test Organisation',
		standard: 'aap-2022',
		emergencyNumber: '911',
		createdAt: new Date(),
		...set
	});
	return id;
}

export async function makeSite(
	db: Db,
	set: Pick<NewSite, 'organisationId' | 'kind'> & Partial<NewSite>
): Promise<string> {
	const id = set.id ?? systemRandom.id();
	await db.insert(sites).values({
		name: set.kind === 'clinic' ? `Clinic ${id}` : `Birth unit ${id}`,
		address: '1 Test Street',
		phone: '+12025550110',
		afterHoursPhone: '+12025550111',
		dutyEmail: 'duty@example.org',
		timeZone: 'America/Chicago',
		policy: DEFAULT_POLICY,
		createdAt: new Date(),
		...set,
		id
	});
	return id;
}

/** Opens a clinic every day of the week from 08:00 to 18:00 for checks, 30 minutes each, two at once. */
export async function makeOpenings(
	db: Db,
	siteId: string,
	set: Partial<typeof openings.$inferInsert> = {}
): Promise<void> {
	await db.insert(openings).values(
		[1, 2, 3, 4, 5, 6, 7].map((weekday) => ({
			id: systemRandom.id(),
			siteId,
			weekday,
			from: '08:00',
			until: '18:00',
			visitKind: 'check' as const,
			placeMinutes: 30,
			placesAtOnce: 2,
			...set
		}))
	);
}
