import type { CallOutcome, Lookup } from '../call';

export interface Sms {
	/** E.164. */
	readonly to: string;
	readonly text: string;
	/** Where the provider reports the delivery. */
	readonly statusUrl: string;
}

/** What is known of an SMS whose answer was lost. */
export interface SentSms {
	readonly to: string;
	/** How its text ends: the message's own mark. */
	readonly mark: string;
	/** Its call did not begin before. */
	readonly since: Date;
}

export interface SmsPort {
	/** Hands one SMS to the provider. Never throws; ends within the call time-out. */
	send(sms: Sms): Promise<CallOutcome>;
	/** Looks for an SMS in the provider's list of what was sent. Never throws. */
	findSent(wanted: SentSms): Promise<Lookup>;
	close(): void;
}
