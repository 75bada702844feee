import type { Role, StaffActor } from '../../domain/access/roles';

/** Where a person's work begins; of several roles the one that families wait for most comes first. */
const FIRST_SCREENS: readonly (readonly [Role, string])[] = [
	['pediatrician', '/waiting'],
	['desk', '/queue'],
	['nurse', '/discharges'],
	['admin', '/people']
];

export function firstScreen(actor: StaffActor): string {
	const held = new Set(actor.roles.map(({ role }) => role));
	return FIRST_SCREENS.find(([role]) => held.has(role))?.[1] ?? '/account';
}
