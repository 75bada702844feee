import type { Channel } from '../../domain/messaging/kinds';
import type { Ctx } from '../context';
import type { Reader, Tx } from '../db/client';
import type { MailAttachment } from '../providers/mail/port';
import type { Providers } from '../providers/index';
import type { MessageRow } from '../repos/messages';
import type { NewAlert } from '../services/alerts';
import type { OutboxSettings } from './settings';

/** What is to be done with a message that is due, seen from the follow-up as it is now. */
export type RenderedMessage =
	| {
			readonly kind: 'send';
			readonly to: string;
			readonly templateId: string | null;
			readonly subject?: string;
			readonly text: string;
			readonly html?: string;
			readonly attachments?: readonly MailAttachment[];
			/** Mark of an SMS, Message-ID of a mail. */
			readonly reference: string;
	  }
	| { readonly kind: 'withdraw'; readonly reason: string }
	| { readonly kind: 'postpone'; readonly until: Date; readonly reason: string };

/** Checks and renders a batch of due messages; runs inside the claim's transaction, so it only reads. */
export type Renderer = (
	db: Reader,
	ctx: Ctx,
	messages: MessageRow[]
) => Promise<ReadonlyMap<string, RenderedMessage>>;

/** The outbox's own world; what the services decide is handed in. */
export interface Outbox {
	readonly ctx: Ctx;
	readonly providers: Providers;
	readonly render: Renderer;
	readonly raiseAlert: (tx: Tx, ctx: Ctx, alert: NewAlert) => Promise<void>;
	readonly settings: OutboxSettings;
	/** Names this worker in its claims. */
	readonly workerId: string;
	/** Where the SMS provider reports the delivery of one message. */
	readonly statusUrl: (messageId: string) => string;
}

/** A message whose call is the holder's to make, until the lease ends. */
export interface Held {
	readonly row: MessageRow;
	readonly content: Extract<RenderedMessage, { kind: 'send' }>;
	readonly token: string;
}

export type { Channel, MessageRow };
