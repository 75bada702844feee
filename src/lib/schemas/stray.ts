import { z } from 'zod';
import type { StraySettledAs } from '../domain/messaging/stray';

const recordId = z.string().regex(/^[a-z0-9]{1,16}$/, 'This is not one of the choices.');

export const assignStraySchema = z.object({
	followUpId: z
		.union([recordId, z.literal('')], 'Choose a newborn.')
		.default('')
		.refine(Boolean, 'Choose a newborn.')
});

export const notOursSchema = z.object({
	/** The last text that the reader had seen: one that came later stays owed. */
	seenId: recordId,
	why: z.string().trim().min(1, 'Say why, in a few words.').max(200, 'At most 200 characters.')
});

export interface StrayText {
	readonly entryId: string;
	readonly at: Date;
	readonly words: string;
	readonly isAlarming: boolean;
	readonly dueAt: Date;
}

/** How far the automatic answer to a number has come. */
export type StrayAnswer = 'none' | 'on-its-way' | 'sent' | 'not-sent';

/** One number that belongs to no family, with its texts that are still owed. */
export interface StrayNumber {
	/** E.164. */
	readonly phone: string;
	/** Oldest first, never empty. */
	readonly texts: readonly StrayText[];
	readonly isAlarming: boolean;
	/** The first time by which one of them must have been read. */
	readonly dueAt: Date;
	readonly advice: StrayAnswer;
}

/** What the page about one number shows. */
export interface StrayPage {
	readonly nowAt: Date;
	readonly timeZone: string;
	readonly entryId: string;
	readonly phone: string;
	/** Null where the text of the address was settled. */
	readonly number: StrayNumber | null;
	readonly settled: {
		readonly by: string | null;
		readonly at: Date;
		readonly as: StraySettledAs;
		/** The newborn whose thread holds it, where it is one of the reader's. */
		readonly followUpId: string | null;
	} | null;
}
