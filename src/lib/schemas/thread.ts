import { z } from 'zod';
import type { CheckInResult } from '../domain/guideline/types';
import type { Channel, MessageKind, MessageState } from '../domain/messaging/kinds';
import type { Language } from '../domain/messaging/language';

/** Words of staff to one carer over one channel. `key` makes a second press of the button the same words. */
export const wordsSchema = z.object({
	/** Carer's id and channel, joined, since only some pairs are open. */
	to: z.string().regex(/^[a-z2-7]{16} (sms|mail)$/, 'Choose whom to write to.'),
	words: z
		.string()
		.trim()
		.min(1, 'Write something first.')
		.max(900, 'Keep it under 900 characters, or call.'),
	key: z.string().regex(/^[a-z2-7]{16}$/)
});

/** A text whose number belongs to several newborns, now said to be about this one. */
export const assignSchema = z.object({ entryId: z.string().regex(/^[a-z2-7]{16}$/) });

export interface ThreadCarer {
	readonly id: string;
	readonly name: string;
	readonly relation: string;
	readonly phone: string | null;
	readonly email: string | null;
	readonly language: Language;
	/** Channels open to us now. */
	readonly channels: readonly Channel[];
	readonly smsStoppedAt: Date | null;
}

interface LineBase {
	readonly id: string;
	readonly at: Date;
}

/** One line of a thread, in the order of time. */
export type ThreadLine =
	| (LineBase & {
			readonly from: 'family';
			readonly who: string | null;
			readonly words: string;
			readonly language: Language | null;
			readonly understoodAs: string | null;
			readonly isAlarming: boolean;
			readonly isUnread: boolean;
			/** The number belongs to several newborns and nobody has said which. */
			readonly isUnassigned: boolean;
	  })
	| (LineBase & {
			readonly from: 'clinic';
			/** Null for what the program sent by itself. */
			readonly by: string | null;
			readonly to: string | null;
			readonly kind: MessageKind;
			readonly channel: Channel;
			readonly language: Language;
			readonly state: MessageState;
			readonly delivery: string | null;
			readonly result: CheckInResult | null;
			/** The words as they went out, or would go out now; null where they cannot be written. */
			readonly words: string | null;
			readonly isDraftWording: boolean;
	  });

export interface ThreadView {
	readonly followUpId: string;
	readonly newbornName: string;
	readonly recordNumber: string;
	readonly clinicName: string;
	readonly timeZone: string;
	readonly isClosed: boolean;
	readonly now: Date;
	readonly carers: readonly ThreadCarer[];
	readonly lines: readonly ThreadLine[];
	/** Messages that wait for their time, soonest first. */
	readonly planned: readonly ThreadLine[];
	readonly unread: number;
	readonly mayWrite: boolean;
}
