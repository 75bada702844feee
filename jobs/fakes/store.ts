import { createWriteStream, existsSync, mkdirSync, readFileSync, type WriteStream } from 'node:fs';
import { dirname } from 'node:path';

export interface FakeSms {
	readonly sid: string;
	readonly direction: 'outbound-api' | 'inbound';
	readonly from: string;
	readonly to: string;
	readonly body: string;
	readonly statusCallback: string | null;
	/** Milliseconds since 1970, like every instant of the fakes. */
	readonly createdAt: number;
	/** Not shown in the list of sent messages before. */
	readonly listedAt: number;
	status: string;
	errorCode: number | null;
	sentAt: number | null;
	updatedAt: number;
}

export interface FakeAttachment {
	readonly filename: string;
	readonly contentType: string;
	/** Of a calendar object. */
	readonly method: string | null;
	readonly base64: string;
}

export interface FakeMail {
	readonly id: string;
	readonly messageId: string;
	readonly from: string;
	readonly to: string;
	readonly subject: string;
	readonly text: string;
	readonly html: string | null;
	readonly attachments: readonly FakeAttachment[];
	readonly at: number;
}

type Entry =
	| { readonly sms: FakeSms }
	| { readonly mail: FakeMail }
	| { readonly status: Pick<FakeSms, 'sid' | 'status' | 'errorCode' | 'sentAt' | 'updatedAt'> };

/** All that the fakes were given, oldest first; with a journal it outlives a restart. */
export class Store {
	readonly #smsBySid = new Map<string, FakeSms>();
	readonly #smsByTelephone = new Map<string, FakeSms[]>();
	readonly mails: FakeMail[] = [];
	readonly #journal: WriteStream | null;
	/** Grows with every change; the page asks by it whether there is news. */
	version = 0;

	constructor(journal: string | null) {
		if (journal !== null && existsSync(journal)) this.#read(journal);
		if (journal !== null) mkdirSync(dirname(journal), { recursive: true });
		this.#journal = journal === null ? null : createWriteStream(journal, { flags: 'a' });
	}

	get smses(): Iterable<FakeSms> {
		return this.#smsBySid.values();
	}

	/** Messages taken so far, of both kinds. */
	get count(): number {
		return this.#smsBySid.size + this.mails.length;
	}

	findSms(sid: string): FakeSms | undefined {
		return this.#smsBySid.get(sid);
	}

	/** What went to or came from a telephone, oldest first. */
	smsesOf(telephone: string): readonly FakeSms[] {
		return this.#smsByTelephone.get(telephone) ?? [];
	}

	get telephones(): readonly string[] {
		return [...this.#smsByTelephone.keys()];
	}

	addSms(sms: FakeSms): void {
		this.#keepSms(sms);
		this.#write({ sms });
	}

	addMail(mail: FakeMail): void {
		this.mails.push(mail);
		this.#write({ mail });
	}

	setStatus(sms: FakeSms, status: string, errorCode: number | null, now: number): void {
		sms.status = status;
		sms.errorCode = errorCode;
		sms.updatedAt = now;
		if (status === 'sent' || status === 'delivered') sms.sentAt ??= now;
		const { sid, sentAt, updatedAt } = sms;
		this.#write({ status: { sid, status, errorCode, sentAt, updatedAt } });
	}

	clear(): void {
		this.#smsBySid.clear();
		this.#smsByTelephone.clear();
		this.mails.length = 0;
		this.version++;
	}

	close(): Promise<void> {
		const journal = this.#journal;
		return journal === null ? Promise.resolve() : new Promise((done) => journal.end(done));
	}

	#keepSms(sms: FakeSms): void {
		this.#smsBySid.set(sms.sid, sms);
		const telephone = sms.direction === 'inbound' ? sms.from : sms.to;
		const thread = this.#smsByTelephone.get(telephone);
		if (thread === undefined) this.#smsByTelephone.set(telephone, [sms]);
		else thread.push(sms);
	}

	#write(entry: Entry): void {
		this.version++;
		this.#journal?.write(`${JSON.stringify(entry)}\n`);
	}

	#read(journal: string): void {
		for (const line of readFileSync(journal, 'utf8').split('\n')) {
			const entry = readEntry(line);
			if (entry === null) continue;
			if ('sms' in entry) this.#keepSms(entry.sms);
			else if ('mail' in entry) this.mails.push(entry.mail);
			else Object.assign(this.#smsBySid.get(entry.status.sid) ?? {}, entry.status);
		}
	}
}

/** The last line may be half written when the fakes were killed. */
function readEntry(line: string): Entry | null {
	try {
		return line === '' ? null : (JSON.parse(line) as Entry);
	} catch {
		return null;
	}
}
