import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import type { Channel, MessageKind } from '../../domain/messaging/kinds';
import type { Language } from '../../domain/messaging/language';
import type { Reader, Tx } from '../db/client';
import { messageTemplates } from '../db/schema/messaging';

export type TemplateRow = typeof messageTemplates.$inferSelect;
export type NewTemplate = typeof messageTemplates.$inferInsert;

export interface TemplatePlace {
	readonly organisationId: string;
	readonly kind: MessageKind;
	readonly channel: Channel;
	readonly language: Language;
}

const at = ({ organisationId, kind, channel, language }: TemplatePlace) =>
	and(
		eq(messageTemplates.organisationId, organisationId),
		eq(messageTemplates.kind, kind),
		eq(messageTemplates.channel, channel),
		eq(messageTemplates.language, language)
	);

/** The wording in use of some kinds, in every language, for many messages at once. */
export async function listCurrentTemplates(
	db: Reader,
	organisationIds: readonly string[],
	kinds: readonly MessageKind[]
): Promise<TemplateRow[]> {
	if (organisationIds.length === 0 || kinds.length === 0) return [];
	return db
		.select()
		.from(messageTemplates)
		.where(
			and(
				inArray(messageTemplates.organisationId, [...organisationIds]),
				inArray(messageTemplates.kind, [...kinds]),
				eq(messageTemplates.isCurrent, true)
			)
		);
}

/** Everything in use, without the words: for the overview. */
export async function listTemplateHeads(db: Reader, organisationId: string) {
	const { kind, channel, language, version, standing } = messageTemplates;
	return db
		.select({ kind, channel, language, version, standing })
		.from(messageTemplates)
		.where(and(eq(messageTemplates.organisationId, organisationId), eq(messageTemplates.isCurrent, true)))
		.orderBy(asc(kind), asc(channel), asc(language));
}

/** All versions at one place, newest first. */
export async function listTemplateVersions(db: Reader, place: TemplatePlace): Promise<TemplateRow[]> {
	return db.select().from(messageTemplates).where(at(place)).orderBy(desc(messageTemplates.version));
}

/** Holds the versions at one place until the transaction ends, so that two editors do not make the same next one. */
export async function lockTemplateVersions(tx: Tx, place: TemplatePlace): Promise<TemplateRow[]> {
	return tx
		.select()
		.from(messageTemplates)
		.where(at(place))
		.orderBy(desc(messageTemplates.version))
		.for('update');
}

export async function retireTemplates(tx: Tx, place: TemplatePlace): Promise<void> {
	await tx.update(messageTemplates).set({ isCurrent: null }).where(at(place));
}

export async function insertTemplates(tx: Tx, rows: readonly NewTemplate[]): Promise<void> {
	if (rows.length > 0) await tx.insert(messageTemplates).values([...rows]);
}

/** Adds what an organisation lacks; a version that exists is left as it is. */
export async function insertMissingTemplates(tx: Tx, rows: readonly NewTemplate[]): Promise<void> {
	if (rows.length === 0) return;
	await tx
		.insert(messageTemplates)
		.values([...rows])
		.onDuplicateKeyUpdate({ set: { id: sql`${messageTemplates.id}` } });
}

export async function markTemplate(
	tx: Tx,
	id: string,
	mark: Pick<TemplateRow, 'standing' | 'reviewedBy'>
): Promise<void> {
	await tx.update(messageTemplates).set(mark).where(eq(messageTemplates.id, id));
}

export async function listTemplatesByIds(db: Reader, ids: readonly string[]): Promise<TemplateRow[]> {
	if (ids.length === 0) return [];
	return db
		.select()
		.from(messageTemplates)
		.where(inArray(messageTemplates.id, [...ids]));
}
