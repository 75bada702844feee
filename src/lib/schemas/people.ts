import { z } from 'zod';
import { ROLES, type RoleAtSite } from '../domain/access/roles';

/** A role as one word of a form: `admin`, or `role@siteId`. */
const roleWord = z
	.string()
	.regex(/^(admin|(nurse|desk|pediatrician)@[a-z0-9]{1,16})$/, 'This is not a role.');

/** The role that a checked word of a form stands for; null for any other word. */
export function roleOfWord(word: string): RoleAtSite | null {
	const [name, siteId] = word.split('@');
	const role = ROLES.find((known) => known === name);
	if (role === undefined || (role === 'admin') !== (siteId === undefined)) return null;
	return { role, siteId: siteId ?? null };
}

export const wordOfRole = ({ role, siteId }: RoleAtSite): string =>
	siteId === null ? role : `${role}@${siteId}`;

const roles = z.array(roleWord).min(1, 'Choose at least one role.');

export const inviteSchema = z.object({
	name: z.string().trim().min(2, 'Type the name.').max(120, 'At most 120 characters.'),
	email: z.email('Type an e-mail address, such as name@example.org.').trim().toLowerCase().max(200),
	roles
});

export const rolesSchema = z.object({ staffId: z.string().min(1).max(16), roles });

export const personSchema = z.object({ staffId: z.string().min(1).max(16) });
