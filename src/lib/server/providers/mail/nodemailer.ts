import { createTransport } from 'nodemailer';
import { type CallOutcome, codeOf, neverConnected, shortReason } from '../call';
import { findInSentList } from './sent-list';
import type { Mail, MailAttachment, MailPort } from './port';

export interface SmtpSettings {
	readonly host: string;
	readonly port: number;
	readonly user?: string | undefined;
	readonly pass?: string | undefined;
	readonly from: string;
	readonly timeoutMilliseconds: number;
	readonly connections: number;
	/** Address that answers whether a Message-ID was taken; absent where the mail host has nothing of the kind. */
	readonly sentListUrl?: string | undefined;
}

const LOOPBACK = new Set(['127.0.0.1', 'localhost', '::1']);

/** Mail through a pool of SMTP connections. */
export function openSmtp(settings: SmtpSettings): MailPort {
	const { host, port, user, pass, from, timeoutMilliseconds, connections, sentListUrl } = settings;
	const transport = createTransport({
		pool: true,
		host,
		port,
		secure: port === 465,
		requireTLS: !LOOPBACK.has(host) && port !== 465,
		ignoreTLS: LOOPBACK.has(host),
		...(user === undefined ? {} : { auth: { user, pass: pass ?? '' } }),
		maxConnections: connections,
		maxMessages: 1000,
		// By itself the pool sends a mail again, up to five times, when its connection breaks, also after the server took it.
		maxRequeues: 0,
		connectionTimeout: timeoutMilliseconds,
		greetingTimeout: timeoutMilliseconds,
		socketTimeout: timeoutMilliseconds
	});
	return {
		send: (mail) => transport.sendMail(envelopeOf(mail, from)).then(() => accepted(mail), outcomeOf),
		findSent: (messageId) => findInSentList(sentListUrl, messageId, timeoutMilliseconds),
		close: () => transport.close()
	};
}

function envelopeOf({ to, subject, text, html, attachments = [], messageId }: Mail, from: string) {
	const [invitation] = attachments.filter(({ method }) => method !== undefined);
	return {
		from,
		to,
		subject,
		text,
		messageId,
		...(html === undefined ? {} : { html }),
		// RFC 6047: as an alternative part of its own, so that the reader's calendar takes it.
		...(invitation === undefined ? {} : { icalEvent: calendarPart(invitation) }),
		attachments: attachments.filter((one) => one !== invitation).map((one) => ({ ...one })),
		// RFC 3834: absence notices and the like are not to answer.
		headers: { 'Auto-Submitted': 'auto-generated' },
		disableFileAccess: true,
		disableUrlAccess: true
	};
}

const calendarPart = ({ filename, content, method }: MailAttachment) => ({
	filename,
	content,
	method: method ?? 'PUBLISH'
});

const accepted = ({ messageId }: Mail): CallOutcome => ({ kind: 'accepted', providerId: messageId });

/** SMTP replies (RFC 5321): 5yz is for good, 4yz may pass. */
function outcomeOf(error: unknown): CallOutcome {
	const reply = replyOf(error);
	if (reply !== undefined) return outcomeOfReply(reply, codeOf(error));
	const reason = shortReason(error);
	return neverConnected(error)
		? { kind: 'not-taken', reason, blame: 'provider' }
		: { kind: 'unknown', reason };
}

/** These are about our standing with the server, not about the mail. */
const OUR_STANDING = new Set([421, 454, 530, 534, 535, 538]);

function outcomeOfReply(reply: number, code: string | undefined): CallOutcome {
	const reason = `SMTP ${reply}`;
	if (OUR_STANDING.has(reply) || code === 'EAUTH' || code === 'EPROTOCOL') {
		return { kind: 'not-taken', reason, blame: 'provider' };
	}
	return reply >= 500 ? { kind: 'refused', reason } : { kind: 'not-taken', reason, blame: 'message' };
}

function replyOf(error: unknown): number | undefined {
	if (typeof error !== 'object' || error === null || !('responseCode' in error)) return undefined;
	return typeof error.responseCode === 'number' ? error.responseCode : undefined;
}
