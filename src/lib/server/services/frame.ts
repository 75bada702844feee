import type { Role, StaffActor } from '../../domain/access/roles';
import type { Ctx } from '../context';
import { findOrganisation, listSites } from '../repos/sites';
import { findStaff } from '../repos/staff';

/** Who is signed in, where, and as what: for the frame around the staff's pages. */
export interface Frame {
	readonly staffId: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly {
		readonly role: Role;
		readonly siteId: string | null;
		readonly siteName: string | null;
	}[];
	readonly organisationName: string;
	/** In which times are written: the current site's, else that of the organisation's first site. */
	readonly timeZone: string;
	/** The site of the first role; null for an administrator without one. */
	readonly currentSite: { readonly id: string; readonly name: string; readonly timeZone: string } | null;
}

export async function getFrame(ctx: Ctx, actor: StaffActor): Promise<Frame> {
	const [person, organisation, sites] = await Promise.all([
		findStaff(ctx.db, actor.staffId),
		findOrganisation(ctx.db, actor.organisationId),
		listSites(ctx.db, actor.organisationId)
	]);
	const siteOf = new Map(sites.map((site) => [site.id, site]));
	const [current] = actor.roles.flatMap(({ siteId }) => siteOf.get(siteId ?? '') ?? []);
	return {
		staffId: actor.staffId,
		name: actor.name,
		email: person?.email ?? '',
		roles: actor.roles.map((held) => ({ ...held, siteName: siteOf.get(held.siteId ?? '')?.name ?? null })),
		organisationName: organisation?.name ?? '',
		timeZone: (current ?? sites[0])?.timeZone ?? 'UTC',
		currentSite: current ? { id: current.id, name: current.name, timeZone: current.timeZone } : null
	};
}
