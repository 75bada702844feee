import { and, asc, eq, isNull, lt, or } from 'drizzle-orm';
import type { RoleAtSite } from '../../domain/access/roles';
import type { Ctx } from '../context';
import type { Reader, Tx } from '../db/client';
import { staff, staffRoles } from '../db/schema/staff';

export type Staff = typeof staff.$inferSelect;

export async function findStaffByEmail(db: Reader, email: string): Promise<Staff | null> {
	const [row] = await db.select().from(staff).where(eq(staff.email, email)).limit(1);
	return row ?? null;
}

/** One person; with an organisation given, only where they belong to it. */
export async function findStaff(db: Reader, staffId: string, organisationId?: string): Promise<Staff | null> {
	const own = organisationId === undefined ? undefined : eq(staff.organisationId, organisationId);
	const [row] = await db
		.select()
		.from(staff)
		.where(and(eq(staff.id, staffId), own))
		.limit(1);
	return row ?? null;
}

export async function listStaff(db: Reader, organisationId: string): Promise<Staff[]> {
	return db
		.select()
		.from(staff)
		.where(eq(staff.organisationId, organisationId))
		.orderBy(asc(staff.name), asc(staff.id));
}

export interface StaffRole extends RoleAtSite {
	readonly staffId: string;
}

export async function listRoles(db: Reader, organisationId: string): Promise<StaffRole[]> {
	return db
		.select({ staffId: staffRoles.staffId, role: staffRoles.role, siteId: staffRoles.siteId })
		.from(staffRoles)
		.innerJoin(staff, eq(staff.id, staffRoles.staffId))
		.where(eq(staff.organisationId, organisationId));
}

export async function insertStaff(tx: Tx, row: typeof staff.$inferInsert): Promise<void> {
	await tx.insert(staff).values(row);
}

export async function updateStaff(
	tx: Reader,
	staffId: string,
	set: Partial<Pick<Staff, 'name' | 'passwordHash' | 'totpSecret' | 'totpLastStep' | 'isDisabled'>>
): Promise<void> {
	await tx.update(staff).set(set).where(eq(staff.id, staffId));
}

/** Replaces all roles of a person. */
export async function replaceRoles(
	tx: Tx,
	{ random }: Pick<Ctx, 'random'>,
	{ staffId, roles }: { staffId: string; roles: readonly RoleAtSite[] }
): Promise<void> {
	await tx.delete(staffRoles).where(eq(staffRoles.staffId, staffId));
	if (roles.length === 0) return;
	await tx
		.insert(staffRoles)
		.values(roles.map(({ role, siteId }) => ({ id: random.id(), staffId, role, siteId })));
}

/** Steps are compared as text of one length. */
const stepWord = (step: number): string => String(step).padStart(12, '0');

/** Spends a one-time code: false where the same or a later one was spent first. */
export async function spendCodeStep({ db }: Ctx, staffId: string, step: number): Promise<boolean> {
	const word = stepWord(step);
	const [result] = await db
		.update(staff)
		.set({ totpLastStep: word })
		.where(and(eq(staff.id, staffId), or(isNull(staff.totpLastStep), lt(staff.totpLastStep, word))));
	return result.affectedRows === 1;
}
