import type { CheckInResult } from '../../domain/guideline/types';
import type { Channel, MessageKind } from '../../domain/messaging/kinds';

export interface MailWording {
	readonly subject: string;
	readonly body: string;
}

/** Text messages and mails of one kind; a channel that the kind does not use is absent. */
export interface KindTexts {
	readonly sms?: string;
	readonly mail?: MailWording;
}

/** Sentences that stand in a field of a wording and must agree with what the program does. */
export interface Sentences {
	/** How to answer: before and after the visit is confirmed. */
	readonly reply: Readonly<Record<Channel, { readonly open: string; readonly confirmed: string }>>;
	/** What follows from the answers to a check-in. */
	readonly advice: Readonly<Record<CheckInResult, string>>;
	/** Between a number and the newborn it stands for. */
	readonly choice: string;
}

/** The wording that a new organisation begins with, in one language. None has been reviewed by a qualified translator. */
export interface DefaultWording {
	readonly texts: Readonly<Partial<Record<MessageKind, KindTexts>>>;
	readonly sentences: Sentences;
}
