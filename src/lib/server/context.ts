import type { Clock } from './clock';
import type { Config } from './config';
import type { Db } from './db/client';
import type { Log } from './log';
import type { Random } from './random';

/** What every service is given: the outside world, in one hand. */
export interface Ctx {
	readonly db: Db;
	readonly clock: Clock;
	readonly random: Random;
	readonly log: Log;
	readonly config: Config;
}
