import type { Db } from '../../../src/lib/server/db/client';
import { makeFollowUp, type MadeFollowUp } from './follow-up';
import { makeOpenings, makeOrganisation, makeSite } from './organisation';
import { makeStaff, type MadeStaff } from './staff';

/** One birth unit with its clinic, their people, and a follow-up that belongs to both. */
export interface Side {
	readonly birthSiteId: string;
	readonly clinicId: string;
	readonly nurse: MadeStaff;
	readonly desk: MadeStaff;
	readonly pediatrician: MadeStaff;
	readonly followUp: MadeFollowUp;
}

export interface Hospital {
	readonly organisationId: string;
	readonly admin: MadeStaff;
	/** Two sides of one organisation that must not see each other's newborns. */
	readonly east: Side;
	readonly west: Side;
}

async function makeSide(db: Db, organisationId: string, name: string): Promise<Side> {
	const birthSiteId = await makeSite(db, { organisationId, kind: 'birth-unit', name: `${name} birth unit` });
	const clinicId = await makeSite(db, { organisationId, kind: 'clinic', name: `${name} clinic` });
	await makeOpenings(db, clinicId);
	const staffOf = (role: 'nurse' | 'desk' | 'pediatrician', siteId: string) =>
		makeStaff(db, { organisationId, roles: [{ role, siteId }], name: `${name} ${role}` });
	return {
		birthSiteId,
		clinicId,
		nurse: await staffOf('nurse', birthSiteId),
		desk: await staffOf('desk', clinicId),
		pediatrician: await staffOf('pediatrician', clinicId),
		followUp: await makeFollowUp(db, { organisationId, birthSiteId, clinicId })
	};
}

/** A whole small organisation: an administrator, two birth units, two clinics, each with people and a follow-up. */
export async function makeHospital(db: Db): Promise<Hospital> {
	const organisationId = await makeOrganisation(db);
	return {
		organisationId,
		admin: await makeStaff(db, { organisationId, roles: [{ role: 'admin', siteId: null }], name: 'Admin' }),
		east: await makeSide(db, organisationId, 'East'),
		west: await makeSide(db, organisationId, 'West')
	};
}
