import { randomBytes } from 'node:crypto';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import { after } from './http';
import type { FakesSettings } from './settings';
import type { FakeAttachment, FakeMail, Store } from './store';
import type { MailTrouble, Met, Troubles } from './troubles';

interface Refusal {
	readonly code: number;
	readonly text: string;
}

const REFUSALS: Partial<Record<MailTrouble, Refusal>> = {
	greylist: { code: 451, text: '4.7.1 Greylisted, please try again later' },
	'mailbox-full': { code: 452, text: '4.2.2 The mailbox is full' },
	'no-such-mailbox': { code: 550, text: '5.1.1 No such mailbox' },
	'too-many': { code: 421, text: '4.7.0 Too many messages, try again later' }
};

/** An SMTP server that keeps what it is given, or fails as ordered. */
export function openFakeSmtp({ host, smtpPort }: FakesSettings, store: Store, troubles: Troubles) {
	const met = new WeakMap<SMTPServerSession, Met<MailTrouble>>();
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['STARTTLS'],
		disableReverseLookup: true,
		onAuth: ({ username }, _session, done) => done(null, { user: username }),
		onRcptTo: ({ address }, session, done) => {
			const trouble = troubles.forMail(address);
			const refusal = trouble === null ? undefined : REFUSALS[trouble.kind];
			if (refusal !== undefined) return done(smtpError(refusal));
			if (trouble === null) met.delete(session);
			else met.set(session, trouble);
			done();
		},
		onData: (stream, session, done) => {
			receive(stream, session, met.get(session) ?? null).then(() => done(), done);
		}
	});
	server.on('error', () => {
		// A client that leaves in the middle is no trouble of ours.
	});

	async function receive(
		stream: SMTPServerDataStream,
		session: SMTPServerSession,
		trouble: Met<MailTrouble> | null
	): Promise<void> {
		const parsed = await simpleParser(stream);
		for (const { address } of session.envelope.rcptTo) store.addMail(mailOf(parsed, address));
		if (trouble?.kind === 'slow' || trouble?.kind === 'silent') await after(trouble.seconds);
		if (trouble?.kind === 'cut' || trouble?.kind === 'silent') breakConnection(server, session);
	}

	return {
		listen: () => new Promise<void>((resolve) => server.listen(smtpPort, host, () => resolve())),
		get port() {
			const address = server.server.address();
			return address === null || typeof address === 'string' ? smtpPort : address.port;
		},
		close: () => new Promise<void>((resolve) => server.close(() => resolve()))
	};
}

function smtpError({ code, text }: Refusal): Error {
	return Object.assign(new Error(text), { responseCode: code });
}

function mailOf(parsed: ParsedMail, to: string): FakeMail {
	return {
		id: randomBytes(8).toString('hex'),
		messageId: parsed.messageId ?? '',
		from: parsed.from?.text ?? '',
		to,
		subject: parsed.subject ?? '',
		text: parsed.text ?? '',
		html: typeof parsed.html === 'string' ? parsed.html : null,
		attachments: attachmentsOf(parsed),
		at: Date.now()
	};
}

/** A calendar object comes twice, as another form of the mail and as a file; a reader shows it once. */
function attachmentsOf(parsed: ParsedMail): FakeAttachment[] {
	const all = parsed.attachments.map(({ filename, contentType, content, headers }) => ({
		filename: filename ?? 'calendar.ics',
		contentType,
		method: methodOf(headers.get('content-type')),
		base64: content.toString('base64')
	}));
	const last = new Map(all.map((one) => [one.base64, one]));
	return [...last.values()].map((one) => ({
		...one,
		method:
			one.method ?? all.find((twin) => twin.base64 === one.base64 && twin.method !== null)?.method ?? null
	}));
}

function methodOf(header: unknown): string | null {
	if (typeof header !== 'object' || header === null || !('params' in header)) return null;
	const { params } = header;
	if (typeof params !== 'object' || params === null || !('method' in params)) return null;
	return typeof params.method === 'string' ? params.method : null;
}

/** The server's own connections are not in its types. */
function breakConnection(server: SMTPServer, session: SMTPServerSession): void {
	const connections: unknown = Reflect.get(server, 'connections');
	if (!(connections instanceof Set)) return;
	for (const connection of connections) {
		const own: unknown = Reflect.get(connection, 'session');
		const socket: unknown = Reflect.get(connection, '_socket');
		const isSame = typeof own === 'object' && own !== null && Reflect.get(own, 'id') === session.id;
		if (isSame && typeof socket === 'object' && socket !== null) {
			const destroy: unknown = Reflect.get(socket, 'destroy');
			if (typeof destroy === 'function') destroy.call(socket);
		}
	}
}
