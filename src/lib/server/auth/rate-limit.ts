import { createHash } from 'node:crypto';
import { RateLimiterMySQL, RateLimiterRes } from 'rate-limiter-flexible';
import type { Ctx } from '../context';
import type { Db } from '../db/client';

const WINDOW_SECONDS = 15 * 60;

/** Wrong tries within 15 minutes before the door closes for the rest of them; common practice, no source. */
const POINTS = {
	/** One account, from anywhere. */
	account: 8,
	/** One network address: a whole hospital may come from one. */
	address: 80,
	/** One account's second factor: 6 digits must not be tried through. */
	code: 5,
	/** Tries of invitation links from one address. */
	invitation: 30
} as const;

export type LimitedThing = keyof typeof POINTS;

type Limiters = Record<LimitedThing, RateLimiterMySQL>;
const byDatabase = new WeakMap<Db, Limiters>();

function limiters(ctx: Ctx): Limiters {
	const known = byDatabase.get(ctx.db);
	if (known) return known;
	const make = (thing: LimitedThing) =>
		new RateLimiterMySQL({
			storeClient: ctx.db.$client.pool,
			storeType: 'pool',
			dbName: new URL(ctx.config.databaseUrl).pathname.slice(1),
			tableName: 'rate_limits',
			tableCreated: true,
			keyPrefix: thing,
			points: POINTS[thing],
			duration: WINDOW_SECONDS
		});
	const made: Limiters = {
		account: make('account'),
		address: make('address'),
		code: make('code'),
		invitation: make('invitation')
	};
	byDatabase.set(ctx.db, made);
	return made;
}

const hashed = (key: string): string => createHash('sha256').update(key).digest('hex').slice(0, 40);

/**
 * Counts one try in the database, before the try is made, so that many at once cannot slip through.
 * @returns null where it may go on, else the seconds to wait.
 */
export async function countTry(ctx: Ctx, thing: LimitedThing, key: string): Promise<number | null> {
	try {
		await limiters(ctx)[thing].consume(hashed(key));
		return null;
	} catch (refusal) {
		if (refusal instanceof RateLimiterRes) return Math.ceil(refusal.msBeforeNext / 1000);
		throw refusal;
	}
}

/** Forgets the tries of an account that got in. */
export async function forgetTries(ctx: Ctx, thing: LimitedThing, key: string): Promise<void> {
	await limiters(ctx)[thing].delete(hashed(key));
}

/** Gives back one try that was not a wrong one. */
export async function giveBackTry(ctx: Ctx, thing: LimitedThing, key: string): Promise<void> {
	await limiters(ctx)[thing].reward(hashed(key));
}
