import type { Db, Tx } from './client';

const RETRIED = new Set([1213, 1205]);

function errorNumber(error: unknown): number | undefined {
	for (let e = error; e instanceof Error; e = e.cause) {
		if ('errno' in e && typeof e.errno === 'number') return e.errno;
	}
	return undefined;
}

/** True where a unique key refused the row. */
export const isDuplicate = (error: unknown): boolean => errorNumber(error) === 1062;

/** True where a CHECK refused the row (MariaDB 4025, which mysql2 misnames: the number is what counts). */
export const isCheckFailure = (error: unknown): boolean => errorNumber(error) === 4025;

/** Runs the work in one READ COMMITTED transaction; a deadlock or lock time-out runs it again, three times in all. */
export async function withTx<T>(db: Db, work: (tx: Tx) => Promise<T>): Promise<T> {
	for (let attempt = 1; ; attempt++) {
		try {
			return await db.transaction(work, { isolationLevel: 'read committed' });
		} catch (error) {
			if (attempt >= 3 || !RETRIED.has(errorNumber(error) ?? 0)) throw error;
		}
	}
}
