import { and, asc, eq, gte, inArray, isNull, lte, ne, sql } from 'drizzle-orm';
import type { StraySettledAs } from '../../domain/messaging/stray';
import type { Reader, Tx } from '../db/client';
import { messages, threadEntries } from '../db/schema/messaging';
import { organisations, sites } from '../db/schema/organisation';
import { staff } from '../db/schema/staff';
import { strayTexts } from '../db/schema/stray-text';
import type { ThreadEntryRow } from './thread';

export type StrayRow = typeof strayTexts.$inferSelect;
export interface Stray {
	readonly stray: StrayRow;
	readonly entry: ThreadEntryRow;
}

/** Owes a text; one that is owed or settled already is left as it is. */
export async function insertStray(tx: Tx, row: typeof strayTexts.$inferInsert): Promise<void> {
	await tx
		.insert(strayTexts)
		.values(row)
		.onDuplicateKeyUpdate({ set: { entryId: sql`${strayTexts.entryId}` } });
}

/**
 * Whose the one number of this installation is: the organisation founded first, with the clinic that it set up first,
 * which lends automatic answers its telephones. Null before there is an organisation.
 */
export async function findHomeOfNumber(db: Reader) {
	const [home] = await db
		.select({ organisationId: organisations.id, clinicId: sites.id })
		.from(organisations)
		.leftJoin(sites, and(eq(sites.organisationId, organisations.id), eq(sites.kind, 'clinic')))
		.orderBy(asc(organisations.createdAt), asc(organisations.id), asc(sites.createdAt), asc(sites.name))
		.limit(1);
	return home ?? null;
}

/** What is still owed by the desks of an organisation, in the order of the work. */
export function listOpenStrays(db: Reader, organisationId: string, limit: number): Promise<Stray[]> {
	return db
		.select({ stray: strayTexts, entry: threadEntries })
		.from(strayTexts)
		.innerJoin(threadEntries, eq(threadEntries.id, strayTexts.entryId))
		.where(and(eq(strayTexts.organisationId, organisationId), isNull(strayTexts.settledAt)))
		.orderBy(asc(strayTexts.priority), asc(strayTexts.dueAt))
		.limit(limit);
}

/** One stray text with the name of whoever settled it. */
export async function findStray(db: Reader, entryId: string) {
	const [found] = await db
		.select({ stray: strayTexts, entry: threadEntries, settledByName: staff.name })
		.from(strayTexts)
		.innerJoin(threadEntries, eq(threadEntries.id, strayTexts.entryId))
		.leftJoin(staff, eq(staff.id, strayTexts.settledBy))
		.where(eq(strayTexts.entryId, entryId));
	return found ?? null;
}

const ofPhone = (organisationId: string, phone: string) =>
	and(eq(strayTexts.organisationId, organisationId), eq(threadEntries.phone, phone));

/** Texts of a number that are still owed, oldest first. */
export function listOpenStraysOfPhone(db: Reader, organisationId: string, phone: string): Promise<Stray[]> {
	return db
		.select({ stray: strayTexts, entry: threadEntries })
		.from(strayTexts)
		.innerJoin(threadEntries, eq(threadEntries.id, strayTexts.entryId))
		.where(and(ofPhone(organisationId, phone), isNull(strayTexts.settledAt)))
		.orderBy(asc(threadEntries.at), asc(threadEntries.id));
}

/** Holds every stray text of a number, settled ones too, so that of two people at once the second sees the first. */
export function lockStraysOfPhone(tx: Tx, organisationId: string, phone: string): Promise<Stray[]> {
	return tx
		.select({ stray: strayTexts, entry: threadEntries })
		.from(strayTexts)
		.innerJoin(threadEntries, eq(threadEntries.id, strayTexts.entryId))
		.where(ofPhone(organisationId, phone))
		.orderBy(asc(threadEntries.at), asc(threadEntries.id))
		.for('update');
}

export interface Settling {
	readonly at: Date;
	readonly by: string;
	readonly as: StraySettledAs;
	readonly reason?: string;
	readonly followUpId?: string;
}

/** Settles those of these texts that are still owed. */
export async function settleStrays(tx: Tx, entryIds: readonly string[], settling: Settling): Promise<void> {
	if (entryIds.length === 0) return;
	const { at, by, as, reason = null, followUpId = null } = settling;
	await tx
		.update(strayTexts)
		.set({ settledAt: at, settledBy: by, settledAs: as, reason, followUpId })
		.where(and(inArray(strayTexts.entryId, [...entryIds]), isNull(strayTexts.settledAt)));
}

/** Texts of a number that are in nobody's thread, whether or not anybody owes them. */
export async function listUnassignedIds(tx: Tx, phone: string): Promise<string[]> {
	const rows = await tx
		.select({ id: threadEntries.id })
		.from(threadEntries)
		.where(
			and(eq(threadEntries.phone, phone), isNull(threadEntries.followUpId), eq(threadEntries.direction, 'in'))
		);
	return rows.map(({ id }) => id);
}

/** Texts whose due time has passed by then, by way of the few organisations, whose index this is. */
export function listStraysDueBy(db: Reader, by: Date, limit: number) {
	return db
		.select({ entryId: strayTexts.entryId, priority: strayTexts.priority, dueAt: strayTexts.dueAt })
		.from(organisations)
		.innerJoin(strayTexts, eq(strayTexts.organisationId, organisations.id))
		.where(and(isNull(strayTexts.settledAt), lte(strayTexts.dueAt, by)))
		.orderBy(asc(strayTexts.dueAt))
		.limit(limit);
}

/** Other texts of the number between two instants. */
export async function listEntryIdsBetween(
	db: Reader,
	{ id, phone }: Pick<ThreadEntryRow, 'id' | 'phone'>,
	{ from, until }: { readonly from: Date; readonly until: Date }
): Promise<string[]> {
	if (phone === null) return [];
	const rows = await db
		.select({ id: threadEntries.id })
		.from(threadEntries)
		.where(
			and(
				eq(threadEntries.phone, phone),
				gte(threadEntries.at, from),
				lte(threadEntries.at, until),
				ne(threadEntries.id, id)
			)
		);
	return rows.map((row) => row.id);
}

/** How far answers with these keys have come. */
export async function listAnswers(db: Reader, dedupeKeys: readonly string[]) {
	if (dedupeKeys.length === 0) return [];
	return db
		.select({ occasion: messages.occasion, state: messages.state, delivery: messages.delivery })
		.from(messages)
		.where(inArray(messages.dedupeKey, [...dedupeKeys]));
}

/** Answers that went to a number stand in the thread of the newborn that its texts were about. */
export async function moveAnswers(tx: Tx, dedupeKeys: readonly string[], followUpId: string): Promise<void> {
	if (dedupeKeys.length === 0) return;
	await tx
		.update(messages)
		.set({ followUpId })
		.where(and(inArray(messages.dedupeKey, [...dedupeKeys]), isNull(messages.followUpId)));
}
