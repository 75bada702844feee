import { and, eq, lte, sql } from 'drizzle-orm';
import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { systemClock } from '../src/lib/server/clock';
import { getConfig } from '../src/lib/server/config';
import type { Ctx } from '../src/lib/server/context';
import { openDatabase } from '../src/lib/server/db/client';
import { messages } from '../src/lib/server/db/schema/messaging';
import { organisations } from '../src/lib/server/db/schema/organisation';
import { createLog } from '../src/lib/server/log';
import { systemRandom } from '../src/lib/server/random';
import { demoClock } from './demo/context';
import { buildOrganisation, signIns } from './demo/organisation';
import { tellScenario } from './demo/scenario';

/** What the worker would have sent while the histories were happening counts as sent: nothing old goes out now. */
async function markPastMessagesSent(ctx: Ctx, now: Date): Promise<void> {
	await ctx.db
		.update(messages)
		.set({
			state: 'sent',
			sentAt: sql`${messages.runAt}`,
			delivery: 'delivered',
			deliveryAt: sql`${messages.runAt}`
		})
		.where(and(eq(messages.state, 'planned'), lte(messages.runAt, new Date(now.getTime() - 60_000))));
}

/** Loads the invented organisation into an empty database; leaves a database that has one alone. */
async function main(): Promise<void> {
	const config = getConfig();
	const database = openDatabase(config.databaseUrl);
	try {
		const now = systemClock.now();
		const clock = demoClock(now);
		const log = createLog(config.logLevel, { process: 'demo' });
		const ctx: Ctx = { db: database.db, clock, random: systemRandom, log, config };
		const [already] = await database.db.select({ id: organisations.id }).from(organisations).limit(1);
		if (!already) {
			const demo = await buildOrganisation(ctx, clock, {
				isAlwaysOpen: process.argv.includes('--always-open')
			});
			await tellScenario(demo);
			await markPastMessagesSent(ctx, now);
		}
		await mkdir(config.dataDir, { recursive: true });
		await writeFile(join(config.dataDir, 'demo-sign-ins.txt'), signIns());
	} finally {
		await database.close();
	}
}

await main();
