import { z } from 'zod';
import { DEFAULT_OUTBOX_SETTINGS, type OutboxSettings } from '../src/lib/server/outbox/settings';

/** Settings of the jobs alone; everything that the web server shares is in `src/lib/server/config.ts`. */

const defaults = DEFAULT_OUTBOX_SETTINGS;
const seconds = (fallback: number) => z.coerce.number().positive().default(fallback);
const count = (fallback: number) => z.coerce.number().int().positive().default(fallback);
/** 0 for no limit. */
const rate = (fallback: number | null) =>
	z.coerce
		.number()
		.min(0)
		.default(fallback ?? 0)
		.transform((value) => (value === 0 ? null : value));

const environment = z.object({
	SEND_BATCH: count(defaults.batch),
	SEND_CONCURRENCY: count(defaults.concurrency),
	SEND_LEASE_SECONDS: seconds(defaults.leaseSeconds),
	SEND_CALL_SECONDS: seconds(defaults.callSeconds),
	SEND_SETTLE_SECONDS: seconds(defaults.settleSeconds),
	SEND_BREAKER_SECONDS: seconds(defaults.breakerSeconds),
	SMS_PER_SECOND: rate(defaults.perSecond.sms),
	MAIL_PER_SECOND: rate(defaults.perSecond.mail),
	/** `GET <url>?messageId=<id>` tells whether the mail host took a mail; see providers/mail/sent-list.ts. */
	MAIL_SENT_LIST_URL: z.url().optional(),
	/** Longest wait for calls under way when the worker is asked to stop. */
	STOP_GRACE_SECONDS: seconds(defaults.callSeconds + 5)
});

export interface JobSettings {
	readonly outbox: OutboxSettings;
	readonly mailSentListUrl?: string | undefined;
	readonly stopGraceSeconds: number;
}

/** Reads the jobs' own settings. @throws ZodError naming what is malformed. */
export function parseJobSettings(env: Readonly<Record<string, string | undefined>>): JobSettings {
	const given = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''));
	const parsed = environment.parse(given);
	return {
		outbox: {
			...defaults,
			batch: parsed.SEND_BATCH,
			concurrency: parsed.SEND_CONCURRENCY,
			leaseSeconds: parsed.SEND_LEASE_SECONDS,
			callSeconds: parsed.SEND_CALL_SECONDS,
			settleSeconds: parsed.SEND_SETTLE_SECONDS,
			breakerSeconds: parsed.SEND_BREAKER_SECONDS,
			perSecond: { sms: parsed.SMS_PER_SECOND, mail: parsed.MAIL_PER_SECOND }
		},
		mailSentListUrl: parsed.MAIL_SENT_LIST_URL,
		stopGraceSeconds: parsed.STOP_GRACE_SECONDS
	};
}
