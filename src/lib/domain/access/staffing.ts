import type { Role, RoleAtSite } from './roles';

/** The kind of site at which a role is held; an administrator's role has none. */
export const SITE_KIND_OF_ROLE: Readonly<Record<Exclude<Role, 'admin'>, 'birth-unit' | 'clinic'>> = {
	nurse: 'birth-unit',
	desk: 'clinic',
	pediatrician: 'clinic'
};

export interface StaffedSite {
	readonly id: string;
	readonly kind: 'birth-unit' | 'clinic';
}

/** True where every role is held at a site of the organisation and of the right kind, and none twice. */
export function areRolesSound(roles: readonly RoleAtSite[], sites: readonly StaffedSite[]): boolean {
	const words = new Set(roles.map(({ role, siteId }) => `${role}@${siteId}`));
	return (
		words.size === roles.length &&
		roles.every(({ role, siteId }) => {
			if (role === 'admin') return siteId === null;
			return sites.some((site) => site.id === siteId && site.kind === SITE_KIND_OF_ROLE[role]);
		})
	);
}

export interface Administrator {
	readonly staffId: string;
	/** Has taken up the invitation and is not disabled. */
	readonly canSignIn: boolean;
}

/** True where somebody else could still manage people if this person no longer did. */
export const leavesAnAdministrator = (administrators: readonly Administrator[], without: string): boolean =>
	administrators.some(({ staffId, canSignIn }) => canSignIn && staffId !== without);
