import { eq } from 'drizzle-orm';
import type { Ctx } from '../context';
import { workers } from '../db/schema/messaging';

/** Signs this worker in, or on again; the watch misses one that is not heard from. */
export async function noteAlive({ db, clock }: Ctx, workerId: string): Promise<void> {
	const now = clock.now();
	await db
		.insert(workers)
		.values({ id: workerId, startedAt: now, heardAt: now, stoppedAt: null })
		.onDuplicateKeyUpdate({ set: { heardAt: now, stoppedAt: null } });
}

/** A worker that was stopped on purpose is not missed. */
export async function noteStopped({ db, clock }: Ctx, workerId: string): Promise<void> {
	await db.update(workers).set({ stoppedAt: clock.now() }).where(eq(workers.id, workerId));
}
