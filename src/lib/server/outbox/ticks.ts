import { and, eq, isNull, lt, lte, or } from 'drizzle-orm';
import type { Ctx } from '../context';
import { ticks } from '../db/schema/messaging';
import { databaseIn, databaseNow } from './lease';

/** A job that time starts. Any number of processes may try to run it; one does. */
export interface Tick {
	readonly name: string;
	readonly everySeconds: number;
	readonly run: () => Promise<unknown>;
}

const LEASE_SECONDS = 60;
const NEVER = new Date(0);

/**
 * Runs a tick unless it ran within its period or another process is at it. Because the last run is kept, one that was missed
 * while every process was down is made up by the first that asks. Returns false when there was nothing to do.
 * A failing run is noted and logged, not thrown: the next period tries again.
 */
export async function runTick(ctx: Ctx, workerId: string, tick: Tick): Promise<boolean> {
	const began = ctx.clock.now();
	const token = `${workerId}/${ctx.random.id()}`;
	if (!(await claim(ctx, tick, token, began))) return false;
	const renewing = setInterval(() => void renew(ctx, tick.name, token), (LEASE_SECONDS * 1000) / 3);
	let lastError: string | null = null;
	try {
		await tick.run();
	} catch (error) {
		lastError = (error instanceof Error ? error.message : String(error)).slice(0, 300);
		ctx.log.error({ err: error, tick: tick.name }, 'a tick failed');
	} finally {
		clearInterval(renewing);
	}
	const lastTookMilliseconds = ctx.clock.now().getTime() - began.getTime();
	await ctx.db
		.update(ticks)
		.set({ lastTookMilliseconds, lastError, lockedBy: null, lockedUntil: null })
		.where(held(tick.name, token));
	return true;
}

const held = (name: string, token: string) => and(eq(ticks.name, name), eq(ticks.lockedBy, token));

/** One statement decides: the row is free, and its period is over. Half a period of grace for clocks that differ. */
async function claim({ db }: Ctx, tick: Tick, token: string, now: Date): Promise<boolean> {
	const since = new Date(now.getTime() - tick.everySeconds * 500);
	await db.insert(ticks).ignore().values({ name: tick.name, lastRunAt: NEVER });
	const [{ affectedRows }] = await db
		.update(ticks)
		.set({ lastRunAt: now, lockedBy: token, lockedUntil: databaseIn(LEASE_SECONDS) })
		.where(
			and(
				eq(ticks.name, tick.name),
				lte(ticks.lastRunAt, since),
				or(isNull(ticks.lockedUntil), lt(ticks.lockedUntil, databaseNow))
			)
		);
	return affectedRows === 1;
}

async function renew({ db, log }: Ctx, name: string, token: string): Promise<void> {
	try {
		await db
			.update(ticks)
			.set({ lockedUntil: databaseIn(LEASE_SECONDS) })
			.where(held(name, token));
	} catch (error) {
		log.warn({ err: error, tick: name }, 'the lease of a tick could not be renewed');
	}
}
