import { and, eq, inArray } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { parentLinks } from '../db/schema/follow-up';

export type ParentLinkRow = typeof parentLinks.$inferSelect;

export async function listLinks(db: Reader, followUpIds: readonly string[]): Promise<ParentLinkRow[]> {
	if (followUpIds.length === 0) return [];
	return db
		.select()
		.from(parentLinks)
		.where(inArray(parentLinks.followUpId, [...followUpIds]));
}

export async function findLinkByHash(db: Reader, tokenHash: string): Promise<ParentLinkRow | null> {
	const [row] = await db.select().from(parentLinks).where(eq(parentLinks.tokenHash, tokenHash)).limit(1);
	return row ?? null;
}

/** Adds a link, or puts a new one in the place of the carer's old one. */
export async function putLink(tx: Tx, link: typeof parentLinks.$inferInsert): Promise<void> {
	const { id, tokenHash, expiresAt, createdAt } = link;
	await tx
		.insert(parentLinks)
		.values(link)
		.onDuplicateKeyUpdate({ set: { id, tokenHash, expiresAt, createdAt, revokedAt: null } });
}

export async function extendLink(tx: Tx, id: string, expiresAt: Date): Promise<void> {
	await tx.update(parentLinks).set({ expiresAt }).where(eq(parentLinks.id, id));
}

export async function revokeLink(tx: Tx, followUpId: string, carerId: string, now: Date): Promise<void> {
	await tx
		.update(parentLinks)
		.set({ revokedAt: now })
		.where(and(eq(parentLinks.followUpId, followUpId), eq(parentLinks.carerId, carerId)));
}
