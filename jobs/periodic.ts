import cron from 'node-cron';
import type { Ctx } from '../src/lib/server/context';
import { runTick, type Tick } from '../src/lib/server/outbox/ticks';

/** A tick with the times at which it is tried (cron expression with seconds, UTC). */
export interface TimedTick extends Tick {
	readonly at: string;
	/** Every process does this for itself: nothing is locked or kept. */
	readonly isLocal?: boolean;
}

/**
 * Starts the clockwork. `node-cron` only wakes; whether there is something to do is read from the database, so a tick that
 * was missed while everything was down is made up at once, and two processes never run the same one together.
 * The returned function stops the clockwork and waits for what is running.
 */
export function startPeriodic(ctx: Ctx, workerId: string, ticks: readonly TimedTick[]): () => Promise<void> {
	const running = new Set<Promise<unknown>>();
	const attempt = (tick: TimedTick): Promise<unknown> => {
		const run = runSafely(ctx, workerId, tick).finally(() => running.delete(run));
		running.add(run);
		return run;
	};
	const tasks = ticks.map((tick) =>
		cron.schedule(tick.at, () => attempt(tick), {
			name: tick.name,
			timezone: 'Etc/UTC',
			noOverlap: true,
			logger: cronLog(ctx)
		})
	);
	for (const tick of ticks) void attempt(tick);
	return async () => {
		for (const task of tasks) await task.destroy();
		await Promise.all(running);
	};
}

async function runSafely(ctx: Ctx, workerId: string, tick: TimedTick): Promise<void> {
	try {
		if (tick.isLocal) await tick.run();
		else await runTick(ctx, workerId, tick);
	} catch (error) {
		// The database may be away; the next wake tries again.
		ctx.log.error({ err: error, tick: tick.name }, 'a tick could not be run');
	}
}

/** Of node-cron's own lines only errors matter: that a slow tick skips a wake is what we want. */
function cronLog({ log }: Ctx) {
	const nothing = () => {};
	const error = (message: string | Error) => log.error({ err: message }, 'the clockwork failed');
	return { info: nothing, warn: nothing, debug: nothing, error };
}
