import type { RoleAtSite, StaffActor } from '../../../src/lib/domain/access/roles';
import { hashPassword } from '../../../src/lib/server/auth/password';
import type { Db } from '../../../src/lib/server/db/client';
import { staff, staffRoles } from '../../../src/lib/server/db/schema/staff';
import { systemRandom } from '../../../src/lib/server/random';

export const TEST_PASSWORD = 'correct horse battery';

/** Hashing is slow on purpose; every test account shares one hash. */
let hash: Promise<string> | undefined;

export interface MadeStaff {
	readonly actor: StaffActor;
	readonly email: string;
	readonly password: string;
}

/** An active member of staff with these roles, who signs in with `TEST_PASSWORD`. */
export async function makeStaff(
	db: Db,
	{
		organisationId,
		roles,
		...set
	}: { organisationId: string; roles: readonly RoleAtSite[] } & Partial<typeof staff.$inferInsert>
): Promise<MadeStaff> {
	hash ??= hashPassword(TEST_PASSWORD);
	const id = systemRandom.id();
	const email = set.email ?? `${id}@example.org`;
	const name = set.name ?? `Staff ${id}`;
	await db.insert(staff).values({
		passwordHash: await hash,
		createdAt: new Date(),
		...set,
		id,
		organisationId,
		email,
		name
	});
	if (roles.length > 0) {
		await db
			.insert(staffRoles)
			.values(roles.map(({ role, siteId }) => ({ id: systemRandom.id(), staffId: id, role, siteId })));
	}
	const actor: StaffActor = { kind: 'staff', staffId: id, organisationId, name, roles };
	return { actor, email, password: TEST_PASSWORD };
}
