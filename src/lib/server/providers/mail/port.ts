import type { CallOutcome, Lookup } from '../call';

export interface MailAttachment {
	readonly filename: string;
	readonly content: string;
	readonly contentType: string;
	/** Of a calendar object (RFC 5546): `REQUEST`, `CANCEL`. */
	readonly method?: string | undefined;
}

export interface Mail {
	readonly to: string;
	readonly subject: string;
	readonly text: string;
	readonly html?: string | undefined;
	readonly attachments?: readonly MailAttachment[] | undefined;
	/** Message-ID (RFC 5322) in its angle brackets; the same for every try of one message. */
	readonly messageId: string;
}

export interface MailPort {
	/** Hands one mail to the server. Never throws; ends within the call time-out. */
	send(mail: Mail): Promise<CallOutcome>;
	/** Asks the mail host whether it took a message of this Message-ID; SMTP itself has no such question. */
	findSent(messageId: string): Promise<Lookup>;
	close(): void;
}
