import { parseConfig } from '../../src/lib/server/config';
import { createLog } from '../../src/lib/server/log';
import type { Ctx } from '../../src/lib/server/context';
import { systemRandom } from '../../src/lib/server/random';
import type { TestDatabase } from './database';

/** A clock that stands still until a test moves it. */
export function fixedClock(start: Date) {
	let now = start.getTime();
	return {
		now: () => new Date(now),
		advance: (by: { minutes?: number; hours?: number; days?: number }) => {
			const minutes = (by.minutes ?? 0) + (by.hours ?? 0) * 60 + (by.days ?? 0) * 1440;
			now += minutes * 60_000;
		}
	};
}

export type FixedClock = ReturnType<typeof fixedClock>;

/** Settings that reach nothing outside: for services under test, and as the environment of a server under test. */
export function testEnvironment(databaseUrl: string): Record<string, string> {
	return {
		DATABASE_URL: databaseUrl,
		ORIGIN: 'http://127.0.0.1:4310',
		LINK_SECRET: 'a secret of the tests, long enough to be one',
		TWILIO_ACCOUNT_SID: `AC${'0'.repeat(32)}`,
		TWILIO_AUTH_TOKEN: 'the token of the tests',
		TWILIO_FROM_NUMBER: '+12025550100',
		TWILIO_BASE_URL: 'http://127.0.0.1:9',
		SMTP_HOST: '127.0.0.1',
		SMTP_PORT: '9',
		MAIL_FROM: 'Fadewell <fadewell@example.org>',
		LOG_LEVEL: 'silent',
		BODY_SIZE_LIMIT: '4M'
	};
}

/** A whole context over a test's database; the clock stands at the real present unless one is given. */
export function testContext(database: TestDatabase, clock: FixedClock = fixedClock(new Date())): Ctx {
	const config = parseConfig(testEnvironment(database.url));
	return { db: database.db, clock, random: systemRandom, log: createLog('silent'), config };
}
