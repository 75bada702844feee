import type { Role } from '../../domain/access/roles';

export interface NavigationItem {
	readonly href: string;
	readonly label: string;
	/** Who sees it; what a role may do is decided elsewhere. */
	readonly roles: readonly Role[];
}

/** The staff's pages in the order of the work. */
export const NAVIGATION: readonly NavigationItem[] = [
	{ href: '/discharges', label: 'Discharges', roles: ['nurse'] },
	{ href: '/queue', label: 'Queue', roles: ['desk'] },
	{ href: '/calendar', label: 'Calendar', roles: ['desk'] },
	{ href: '/morning', label: 'Morning list', roles: ['desk'] },
	{ href: '/waiting', label: 'Waiting for me', roles: ['pediatrician'] },
	{ href: '/measures', label: 'Measures', roles: ['nurse', 'desk', 'pediatrician', 'admin'] },
	{ href: '/people', label: 'People', roles: ['admin'] },
	{ href: '/sites', label: 'Sites and openings', roles: ['desk', 'admin'] },
	{ href: '/wording', label: 'Wording', roles: ['admin'] },
	{ href: '/standard', label: 'Standard and policy', roles: ['admin'] },
	{ href: '/operations', label: 'Operations', roles: ['admin'] },
	{ href: '/access-record', label: 'Record of access', roles: ['pediatrician', 'admin'] }
];

/** Who looks for newborns; an administrator sees nobody's record. */
const SEARCH_ROLES: readonly Role[] = ['nurse', 'desk', 'pediatrician'];

export const hasSearch = (roles: readonly Role[]): boolean =>
	roles.some((role) => SEARCH_ROLES.includes(role));

export const ROLE_LABELS: Record<Role, string> = {
	nurse: 'nurse',
	desk: 'front desk',
	pediatrician: 'pediatrician',
	admin: 'administrator'
};

/** The pages of somebody who holds these roles. */
export function navigationFor(roles: readonly Role[]): NavigationItem[] {
	return NAVIGATION.filter((item) => item.roles.some((role) => roles.includes(role)));
}

/** True on the page itself and on every page under it. */
export function isCurrent(href: string, pathname: string): boolean {
	return pathname === href || pathname.startsWith(`${href}/`);
}
