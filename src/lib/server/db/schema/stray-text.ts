import { index, int, mysqlTable, varchar } from 'drizzle-orm/mysql-core';
import type { StraySettledAs } from '../../../domain/messaging/stray';
import { asciiWord, instant, recordId } from '../columns';
import { followUps } from './follow-up';
import { threadEntries } from './messaging';
import { organisations } from './organisation';
import { staff } from './staff';

/** Texts from numbers that belong to no family, each owed by every desk of the organisation until one settles it. */
export const strayTexts = mysqlTable(
	'stray_texts',
	{
		/** The entry is the key: a text that is delivered twice is owed once. Number and words stay there. */
		entryId: recordId()
			.primaryKey()
			.references(() => threadEntries.id),
		organisationId: recordId()
			.notNull()
			.references(() => organisations.id),
		/** As in the outbox: 0 alarming, 5 the others. Never changed. */
		priority: int().notNull(),
		/** By when a person must have read it. Never changed: putting it into a thread buys no time. */
		dueAt: instant().notNull(),
		/** Set once, with the three that follow. */
		settledAt: instant(),
		settledBy: recordId().references(() => staff.id),
		settledAs: asciiWord({ length: 10 }).$type<StraySettledAs>(),
		/** Why it is not one of ours. */
		reason: varchar({ length: 200 }),
		/** Whose thread it went into. */
		followUpId: recordId().references(() => followUps.id)
	},
	(t) => [
		// The queue's question: all equal, then in the order of the work.
		// An index on the settling alone would be taken instead, and its rows sorted.
		index('stray_texts_owed').on(t.organisationId, t.settledAt, t.priority, t.dueAt)
	]
);
