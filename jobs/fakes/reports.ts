import { randomBytes } from 'node:crypto';
import webhooks from 'twilio/lib/webhooks/webhooks.js';
import type { FakesSettings } from './settings';
import type { FakeSms, Store } from './store';
import type { SmsTrouble } from './troubles';

const TRIES = 4;
const TIMEOUT_MILLISECONDS = 10_000;

type Fields = Record<string, string>;

/** What the SMS service tells the product later: delivery reports, and what parents write. Signed like the hosted service's. */
export class Reports {
	readonly #settings: FakesSettings;
	readonly #store: Store;
	readonly #timers = new Set<NodeJS.Timeout>();

	constructor(settings: FakesSettings, store: Store) {
		this.#settings = settings;
		this.#store = store;
	}

	/** Reports of messages whose fate was open when the fakes were stopped. */
	resume(): void {
		for (const sms of this.#store.smses) {
			if (sms.direction !== 'inbound' && ['queued', 'sent'].includes(sms.status)) this.schedule(sms, null);
		}
	}

	schedule(sms: FakeSms, trouble: SmsTrouble | null): void {
		const { reportSeconds } = this.#settings;
		if (reportSeconds === 0 || trouble === 'no-report') return;
		const isLost = trouble === 'carrier-reject' || trouble === 'unreachable';
		this.#later(reportSeconds / 2, () => this.#report(sms, 'sent', null));
		this.#later(reportSeconds, () =>
			this.#report(
				sms,
				isLost ? 'undelivered' : 'delivered',
				trouble === 'carrier-reject' ? 30007 : isLost ? 30003 : null
			)
		);
	}

	/** A parent writes. Returns the status of the product's answer; null when it could not be reached. */
	async receive(from: string, body: string): Promise<number | null> {
		const { fromNumber, inboundUrl } = this.#settings;
		const now = Date.now();
		const sid = `SM${randomBytes(16).toString('hex')}`;
		const entry = { sid, direction: 'inbound', from, to: fromNumber, body, statusCallback: null } as const;
		this.#store.addSms({
			...entry,
			createdAt: now,
			listedAt: now,
			status: 'received',
			errorCode: null,
			sentAt: now,
			updatedAt: now
		});
		if (inboundUrl === null) return null;
		return this.#post(inboundUrl, {
			MessageSid: sid,
			SmsSid: sid,
			SmsMessageSid: sid,
			From: from,
			To: fromNumber,
			Body: body,
			NumMedia: '0',
			NumSegments: '1'
		});
	}

	close(): void {
		for (const timer of this.#timers) clearTimeout(timer);
		this.#timers.clear();
	}

	async #report(sms: FakeSms, status: string, errorCode: number | null): Promise<void> {
		this.#store.setStatus(sms, status, errorCode, Date.now());
		if (sms.statusCallback === null) return;
		const fields: Fields = {
			MessageSid: sms.sid,
			SmsSid: sms.sid,
			MessageStatus: status,
			SmsStatus: status,
			From: sms.from,
			To: sms.to
		};
		if (errorCode !== null) fields.ErrorCode = String(errorCode);
		await this.#post(sms.statusCallback, fields);
	}

	/** Tries again while nobody answers: in a local stack the web server may start after the fakes. */
	async #post(url: string, given: Fields): Promise<number | null> {
		const { accountSid, authToken } = this.#settings;
		const fields: Fields = { ...given, AccountSid: accountSid, ApiVersion: '2010-04-01' };
		const headers = {
			'content-type': 'application/x-www-form-urlencoded',
			'x-twilio-signature': webhooks.getExpectedTwilioSignature(authToken, url, fields),
			'i-twilio-idempotency-token': randomBytes(16).toString('hex')
		};
		for (let attempt = 1; attempt <= TRIES; attempt++) {
			try {
				const signal = AbortSignal.timeout(TIMEOUT_MILLISECONDS);
				const body = new URLSearchParams(fields).toString();
				const response = await fetch(url, { method: 'POST', headers, body, signal });
				await response.arrayBuffer();
				if (response.status < 500) return response.status;
			} catch {
				// Nobody there (yet).
			}
			await new Promise<void>((resolve) => this.#later(attempt * 2, async () => resolve()));
		}
		return null;
	}

	#later(seconds: number, work: () => Promise<void>): void {
		const timer = setTimeout(() => {
			this.#timers.delete(timer);
			void work();
		}, seconds * 1000);
		this.#timers.add(timer);
	}
}
