import { bigint, int, mysqlTable } from 'drizzle-orm/mysql-core';
import { asciiWord } from '../columns';

/** Counters of rate-limiter-flexible, shared by every web process; it inserts by position, so the order stands. */
export const rateLimits = mysqlTable('rate_limits', {
	/** Purpose and a hash of what is limited: no address and no account can be read from it. */
	key: asciiWord({ length: 120 }).primaryKey(),
	points: int().notNull().default(0),
	/** Milliseconds since 1970. */
	expire: bigint({ mode: 'number', unsigned: true })
});
