import { randomBytes } from 'node:crypto';
import { afterAll } from 'vitest';
import { renderPlain } from '../../jobs/bench/plain-messages';
import { type Fakes, startFakes } from '../../jobs/fakes/fakes';
import type { FakesSettings } from '../../jobs/fakes/settings';
import type { TroubleOrder } from '../../jobs/fakes/troubles';
import { type Config, parseConfig } from '../../src/lib/server/config';
import type { Ctx } from '../../src/lib/server/context';
import type { Db } from '../../src/lib/server/db/client';
import { createLog } from '../../src/lib/server/log';
import type { Outbox, Renderer } from '../../src/lib/server/outbox/port';
import { DEFAULT_OUTBOX_SETTINGS, type OutboxSettings } from '../../src/lib/server/outbox/settings';
import { openProviders } from '../../src/lib/server/providers/index';
import { systemRandom } from '../../src/lib/server/random';
import { raiseAlert } from '../../src/lib/server/services/alerts';

export const ACCOUNT_SID = `AC${'a1'.repeat(16)}`;
export const AUTH_TOKEN = 'token-for-tests';
export const FROM_NUMBER = '+12025550100';

const FAKES_SETTINGS: FakesSettings = {
	host: '127.0.0.1',
	port: 0,
	smtpPort: 0,
	accountSid: ACCOUNT_SID,
	authToken: AUTH_TOKEN,
	fromNumber: FROM_NUMBER,
	inboundUrl: null,
	reportSeconds: 0,
	latencyMilliseconds: 0,
	journal: null
};

/** Fakes on free ports for one test file, closed when it is done. */
export async function openFakes(changes: Partial<FakesSettings> = {}): Promise<Fakes> {
	const fakes = await startFakes({ ...FAKES_SETTINGS, ...changes });
	afterAll(() => fakes.close());
	return fakes;
}

/** The environment under which a worker, in this process or another, speaks to the fakes. */
export function environmentFor(
	fakes: Pick<Fakes, 'url' | 'smtpPort'>,
	databaseUrl: string
): Record<string, string> {
	return {
		DATABASE_URL: databaseUrl,
		ORIGIN: 'http://127.0.0.1:9',
		LINK_SECRET: randomBytes(32).toString('hex'),
		TWILIO_ACCOUNT_SID: ACCOUNT_SID,
		TWILIO_AUTH_TOKEN: AUTH_TOKEN,
		TWILIO_FROM_NUMBER: FROM_NUMBER,
		TWILIO_BASE_URL: fakes.url,
		SMTP_HOST: '127.0.0.1',
		SMTP_PORT: String(fakes.smtpPort),
		MAIL_FROM: 'Fadewell <follow-up@example.org>',
		MAIL_SENT_LIST_URL: `${fakes.url}/mail/sent`,
		LOG_LEVEL: process.env.TEST_LOG_LEVEL ?? 'silent'
	};
}

/** Times scaled down: a lost answer is looked up at once. Calls keep some room, for machines that are busy. */
export const QUICK: OutboxSettings = {
	...DEFAULT_OUTBOX_SETTINGS,
	callSeconds: 5,
	settleSeconds: 0,
	breakerSeconds: 1,
	perSecond: { sms: null, mail: null }
};

/** A clock that stands still until it is moved. */
export class MovedClock {
	#at: Date;

	constructor(at = new Date()) {
		this.#at = at;
	}

	now(): Date {
		return new Date(this.#at);
	}

	forward(seconds: number): void {
		this.#at = new Date(this.#at.getTime() + seconds * 1000);
	}
}

export interface SendingWorld {
	readonly outbox: Outbox;
	readonly ctx: Ctx;
	readonly clock: MovedClock;
	readonly config: Config;
	readonly order: (order: OrderInput) => void;
	readonly close: () => void;
}

export type OrderInput = Pick<TroubleOrder, 'channel'> & {
	readonly kind: string;
	readonly times?: number;
	readonly seconds?: number;
	readonly to?: string;
};

export interface WorldOptions {
	readonly render?: Renderer;
	readonly settings?: Partial<OutboxSettings>;
	readonly mailSentListUrl?: string | null;
	readonly workerId?: string;
}

/** An outbox over a test's database and fakes, with real SDKs, and a clock of its own. */
export function openWorld(
	{ db, url }: { readonly db: Db; readonly url: string },
	fakes: Fakes,
	{ render = renderPlain, settings = {}, mailSentListUrl, workerId = 'test' }: WorldOptions = {}
): Omit<SendingWorld, 'order'> {
	const config = parseConfig(environmentFor(fakes, url));
	const clock = new MovedClock();
	const log = createLog(config.logLevel);
	const ctx: Ctx = { db, clock, random: systemRandom, log, config };
	const merged = { ...QUICK, ...settings };
	const providers = openProviders(config, {
		timeoutMilliseconds: merged.callSeconds * 1000,
		connections: merged.concurrency,
		mailSentListUrl: mailSentListUrl === null ? undefined : (mailSentListUrl ?? `${fakes.url}/mail/sent`)
	});
	const statusUrl = (id: string) => `${config.publicBaseUrl}/webhooks/sms/status?message=${id}`;
	const outbox: Outbox = { ctx, providers, render, raiseAlert, settings: merged, workerId, statusUrl };
	const close = () => {
		providers.sms.close();
		providers.mail.close();
	};
	return { outbox, ctx, clock, config, close };
}
