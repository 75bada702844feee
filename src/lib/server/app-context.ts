import { systemClock } from './clock';
import { getConfig } from './config';
import type { Ctx } from './context';
import { type Database, openDatabase } from './db/client';
import { createLog } from './log';
import { systemRandom } from './random';

let open: { ctx: Ctx; database: Database } | undefined;

/** The web process's one context, made from the environment on first use. */
export function appContext(): Ctx {
	open ??= build();
	return open.ctx;
}

function build(): { ctx: Ctx; database: Database } {
	const config = getConfig();
	const database = openDatabase(config.databaseUrl);
	const log = createLog(config.logLevel, { process: 'web' });
	return { ctx: { db: database.db, clock: systemClock, random: systemRandom, log, config }, database };
}

/** Closes the pool: while it is open the process does not end. */
export async function closeAppContext(): Promise<void> {
	const closing = open;
	open = undefined;
	await closing?.database.close();
}
