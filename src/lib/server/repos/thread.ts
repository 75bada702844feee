import { and, asc, desc, eq, gt, inArray, isNull, ne, or } from 'drizzle-orm';
import type { Reader, Tx } from '../db/client';
import { alerts, followUps, visits } from '../db/schema/follow-up';
import { messages, threadEntries } from '../db/schema/messaging';
import { carers, newborns } from '../db/schema/newborn';
import { staff } from '../db/schema/staff';
import { strayTexts } from '../db/schema/stray-text';

export type ThreadEntryRow = typeof threadEntries.$inferSelect;

/** One follow-up that a telephone number belongs to, with the carer whose number it is. */
export async function listFollowUpsOfPhone(db: Reader, phone: string) {
	return db
		.select({
			carer: carers,
			followUpId: followUps.id,
			clinicId: followUps.clinicId,
			stage: followUps.stage,
			updatedAt: followUps.updatedAt,
			visitId: visits.id,
			visitState: visits.state,
			visitAt: visits.startsAt
		})
		.from(carers)
		.innerJoin(followUps, eq(followUps.newbornId, carers.newbornId))
		.leftJoin(visits, and(eq(visits.followUpId, followUps.id), eq(visits.isOpen, true)))
		.where(and(eq(carers.phone, phone), isNull(followUps.mergedIntoId)))
		.orderBy(asc(followUps.createdAt), asc(followUps.id));
}

export type PhoneFollowUp = Awaited<ReturnType<typeof listFollowUpsOfPhone>>[number];

export async function findEntryOfProvider(db: Reader, providerId: string): Promise<ThreadEntryRow | null> {
	const [row] = await db.select().from(threadEntries).where(eq(threadEntries.providerId, providerId));
	return row ?? null;
}

export async function insertEntry(tx: Reader, row: typeof threadEntries.$inferInsert): Promise<void> {
	await tx.insert(threadEntries).values(row);
}

/**
 * Texts of a number that wait for the answer which newborn they are about, newest first. Not those that came while the
 * number was nobody's: nobody was asked about them, and a desk owes them.
 */
export async function listUnassigned(db: Reader, phone: string, since: Date): Promise<ThreadEntryRow[]> {
	const rows = await db
		.select({ entry: threadEntries })
		.from(threadEntries)
		.leftJoin(strayTexts, eq(strayTexts.entryId, threadEntries.id))
		.where(
			and(
				eq(threadEntries.phone, phone),
				isNull(threadEntries.followUpId),
				gt(threadEntries.at, since),
				isNull(strayTexts.entryId)
			)
		)
		.orderBy(desc(threadEntries.at), desc(threadEntries.id));
	return rows.map(({ entry }) => entry);
}

export async function assignEntries(
	tx: Reader,
	ids: readonly string[],
	{ followUpId, carerId }: { readonly followUpId: string; readonly carerId: string | null }
): Promise<void> {
	if (ids.length === 0) return;
	await tx
		.update(threadEntries)
		.set({ followUpId, carerId })
		.where(inArray(threadEntries.id, [...ids]));
}

/** The last question which newborn is meant that went to a number. */
export async function findQuestionAbout(db: Reader, entryIds: readonly string[]) {
	if (entryIds.length === 0) return null;
	const [row] = await db
		.select({ facts: messages.facts, occasion: messages.occasion })
		.from(messages)
		.where(and(eq(messages.kind, 'which-newborn'), inArray(messages.occasion, [...entryIds])))
		.orderBy(desc(messages.createdAt))
		.limit(1);
	return row ?? null;
}

export async function setSmsStopped(tx: Tx, phone: string, stoppedAt: Date | null): Promise<void> {
	await tx.update(carers).set({ smsStoppedAt: stoppedAt }).where(eq(carers.phone, phone));
}

/** Every line of the thread with a family, and lines of its numbers that are not yet anybody's; oldest first. */
export async function listThread(db: Reader, followUpId: string, phones: readonly string[]) {
	const own = eq(threadEntries.followUpId, followUpId);
	const nobodys = and(isNull(threadEntries.followUpId), inArray(threadEntries.phone, [...phones]));
	return db
		.select({ entry: threadEntries, carerName: carers.name, staffName: staff.name })
		.from(threadEntries)
		.leftJoin(carers, eq(carers.id, threadEntries.carerId))
		.leftJoin(staff, eq(staff.id, threadEntries.staffId))
		.where(phones.length > 0 ? or(own, nobodys) : own)
		.orderBy(asc(threadEntries.at), asc(threadEntries.id));
}

export async function markRead(
	tx: Tx,
	ids: readonly string[],
	by: { readonly staffId: string; readonly at: Date }
) {
	if (ids.length === 0) return;
	await tx
		.update(threadEntries)
		.set({ readAt: by.at, readBy: by.staffId })
		.where(and(inArray(threadEntries.id, [...ids]), isNull(threadEntries.readAt)));
}

/** The newborn and carers of a follow-up, for the head of its thread. */
export async function findThreadHead(db: Reader, followUpId: string) {
	const [head] = await db
		.select({ followUp: followUps, newborn: newborns })
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(eq(followUps.id, followUpId));
	if (head === undefined) return null;
	const family = await db
		.select()
		.from(carers)
		.where(eq(carers.newbornId, head.newborn.id))
		.orderBy(asc(carers.callOrder));
	return { ...head, carers: family };
}

/** Messages of a follow-up that a family has, or will have, in its hands. */
export async function listThreadMessages(db: Reader, followUpId: string) {
	return db
		.select()
		.from(messages)
		.where(and(eq(messages.followUpId, followUpId), ne(messages.state, 'withdrawn')))
		.orderBy(asc(messages.runAt), asc(messages.id));
}

/** Settles alerts by what raised them; those that are settled already stay as they are. Alarming words are never settled so. */
export async function settleAlertsByKey(
	tx: Tx,
	keys: readonly string[],
	{ at, how }: { readonly at: Date; readonly how: string }
): Promise<void> {
	if (keys.length === 0) return;
	await tx
		.update(alerts)
		.set({ settledAt: at, settledHow: how, climbAt: null })
		.where(
			and(
				inArray(alerts.dedupeKey, [...keys]),
				eq(alerts.kind, 'words-from-family'),
				isNull(alerts.settledAt)
			)
		);
}
