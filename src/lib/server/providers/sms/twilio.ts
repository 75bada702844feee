import twilio from 'twilio';
import { type CallOutcome, codeOf, type Lookup, neverConnected, shortReason } from '../call';
import type { SentSms, Sms, SmsPort } from './port';
import { KeptOpenClient, TooManyRequests } from './request-client';

export interface TwilioSettings {
	readonly accountSid: string;
	readonly authToken: string;
	readonly fromNumber: string;
	/** Set when messages go to a local fake. */
	readonly baseUrl?: string | undefined;
	readonly timeoutMilliseconds: number;
	readonly connections: number;
}

/** The provider's codes for a message that can never be taken: https://www.twilio.com/docs/api/errors (from memory). */
const REFUSALS = new Set([
	'21211', // not a telephone number
	'21214', // cannot be reached
	'21217', // does not look valid
	'21408', // sending to this region is not allowed
	'21602', // no text
	'21604', // no number
	'21610', // the telephone said STOP to this sender
	'21612', // no way from our number to theirs
	'21614', // not a mobile telephone
	'21617', // text too long
	'30450' // blocked destination
]);

/** The list says how new its entries are to the second, and its clock is not ours. */
const CLOCK_SKEW_MILLISECONDS = 5 * 60_000;
const NEWEST = 50;

/** SMS through the `twilio` SDK, at the hosted service or at a local fake with the same paths. */
export function openTwilio(settings: TwilioSettings): SmsPort {
	const { accountSid, authToken, fromNumber, baseUrl, timeoutMilliseconds, connections } = settings;
	const httpClient = new KeptOpenClient({ timeout: timeoutMilliseconds, connections });
	const client = twilio(accountSid, authToken, { httpClient });
	if (baseUrl !== undefined) client.api.baseUrl = baseUrl;
	return {
		send: ({ to, text, statusUrl }: Sms) =>
			client.messages
				.create({ to, from: fromNumber, body: text, statusCallback: statusUrl })
				.then(({ sid }): CallOutcome => ({ kind: 'accepted', providerId: sid }))
				.catch(outcomeOf),
		findSent: (wanted) => findSent(client, wanted).catch(unavailable),
		close: () => httpClient.close()
	};
}

function outcomeOf(error: unknown): CallOutcome {
	if (error instanceof TooManyRequests) {
		const { retryAfterSeconds } = error;
		return { kind: 'not-taken', reason: '429', blame: 'pace', retryAfterSeconds };
	}
	const status = error instanceof Error && 'status' in error ? error.status : undefined;
	if (typeof status === 'number') return outcomeOfAnswer(status, codeOf(error));
	const reason = shortReason(error);
	return neverConnected(error)
		? { kind: 'not-taken', reason, blame: 'provider' }
		: { kind: 'unknown', reason };
}

function outcomeOfAnswer(status: number, code: string | undefined): CallOutcome {
	const reason = code === undefined ? String(status) : `${status}/${code}`;
	// A gateway may say 5xx after the service behind it took the message.
	if (status >= 500) return { kind: 'unknown', reason };
	if (code !== undefined && REFUSALS.has(code)) return { kind: 'refused', reason };
	return { kind: 'not-taken', reason, blame: 'provider' };
}

/**
 * Asks twice, because the filter by time may leave out what is accepted and not yet sent: first by recipient and time, then
 * the newest entries for the recipient.
 */
async function findSent(client: ReturnType<typeof twilio>, { to, mark, since }: SentSms): Promise<Lookup> {
	const dateSentAfter = new Date(since.getTime() - CLOCK_SKEW_MILLISECONDS);
	for (const filter of [
		{ to, dateSentAfter, limit: 200 },
		{ to, limit: NEWEST }
	]) {
		const entries = await client.messages.list(filter);
		const found = entries.find(
			({ body, direction }) => direction !== 'inbound' && body.trimEnd().endsWith(mark)
		);
		if (found !== undefined) return { kind: 'found', providerId: found.sid, status: found.status };
	}
	return { kind: 'absent' };
}

const unavailable = (error: unknown): Lookup => ({ kind: 'unavailable', reason: shortReason(error) });
