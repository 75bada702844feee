import { and, desc, eq, gt, inArray, isNull } from 'drizzle-orm';
import type { Ctx } from '../context';
import type { Reader, Tx } from '../db/client';
import { invitations, staff } from '../db/schema/staff';
import { hashToken } from './sessions';

export interface NewInvitation {
	readonly staffId: string;
	readonly token: string;
	readonly expiresAt: Date;
	readonly createdBy: string;
}

/** Replaces the person's open invitations: the newest link is the only one that works. */
export async function insertInvitation(
	tx: Tx,
	{ clock, random }: Pick<Ctx, 'clock' | 'random'>,
	{ staffId, token, expiresAt, createdBy }: NewInvitation
): Promise<void> {
	await tx.delete(invitations).where(and(eq(invitations.staffId, staffId), isNull(invitations.usedAt)));
	await tx.insert(invitations).values({
		id: random.id(),
		staffId,
		tokenHash: hashToken(token),
		expiresAt,
		createdBy,
		createdAt: clock.now()
	});
}

export interface OpenInvitation {
	readonly id: string;
	readonly staffId: string;
	readonly organisationId: string;
	readonly email: string;
	readonly name: string;
}

/** The invitation behind a link, while it is unused, not expired and the account is not disabled. */
export async function findOpenInvitation(
	db: Reader,
	token: string,
	now: Date
): Promise<OpenInvitation | null> {
	const [row] = await db
		.select({
			id: invitations.id,
			staffId: staff.id,
			organisationId: staff.organisationId,
			email: staff.email,
			name: staff.name
		})
		.from(invitations)
		.innerJoin(staff, eq(staff.id, invitations.staffId))
		.where(
			and(
				eq(invitations.tokenHash, hashToken(token)),
				isNull(invitations.usedAt),
				gt(invitations.expiresAt, now),
				eq(staff.isDisabled, false)
			)
		)
		.limit(1);
	return row ?? null;
}

/** Spends an invitation; false where another press of the button was first. */
export async function spendInvitation(tx: Tx, id: string, now: Date): Promise<boolean> {
	const [result] = await tx
		.update(invitations)
		.set({ usedAt: now })
		.where(and(eq(invitations.id, id), isNull(invitations.usedAt)));
	return result.affectedRows === 1;
}

/** Withdraws every open link of a person. */
export async function deleteOpenInvitations(tx: Tx, staffId: string): Promise<void> {
	await tx.delete(invitations).where(and(eq(invitations.staffId, staffId), isNull(invitations.usedAt)));
}

/** Until when each of these people can still take up their newest open invitation. */
export async function openInvitationsOf(
	db: Reader,
	staffIds: readonly string[],
	now: Date
): Promise<Map<string, Date>> {
	if (staffIds.length === 0) return new Map();
	const rows = await db
		.select({ staffId: invitations.staffId, expiresAt: invitations.expiresAt })
		.from(invitations)
		.where(
			and(
				inArray(invitations.staffId, [...staffIds]),
				isNull(invitations.usedAt),
				gt(invitations.expiresAt, now)
			)
		)
		.orderBy(desc(invitations.expiresAt));
	return new Map(rows.map(({ staffId, expiresAt }) => [staffId, expiresAt]));
}
