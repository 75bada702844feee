import { randomBytes } from 'node:crypto';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Explained } from './explained.mjs';
import { databaseUrl, ensureAccount, hasMariadb, prepareData, startMariadb } from './mariadb.mjs';
import { freePorts } from './ports.mjs';

/** Nothing here must outlive a power cut, so the log need not reach the disk at every commit. */
const FAST = [
	'--innodb-flush-log-at-trx-commit=2',
	'--innodb-buffer-pool-size=96M',
	'--innodb-log-file-size=24M'
];

/**
 * A private MariaDB that lasts as long as a test run or a measurement, on a free port with its data in a temporary
 * folder. Its account may create databases.
 * @param {{ durable?: boolean }} [options] `durable` keeps the log flushed at each commit, as in use: for measurements.
 * @returns {Promise<{ url: string, port: number, close: () => Promise<void> }>}
 */
export async function openTemporaryDatabase({ durable = false } = {}) {
	if (!hasMariadb()) throw new Explained('MariaDB is not installed. npm start and npm test install it.');
	const folder = mkdtempSync(join(tmpdir(), 'fadewell-db-'));
	// The server may run as another account than ours: it has to pass through the folder that holds its own.
	chmodSync(folder, 0o711);
	const remove = () => rmSync(folder, { recursive: true, force: true });
	try {
		const base = join(folder, 'mariadb');
		const [port = 0] = await freePorts(1);
		const password = randomBytes(18).toString('base64url');
		await prepareData(base);
		const database = await startMariadb({ base, port, extra: durable ? [] : FAST, sharesGroup: true });
		await ensureAccount(database, { password, everyDatabase: true });
		const close = async () => {
			await database.stop();
			remove();
		};
		return { url: databaseUrl({ port, password }), port, close };
	} catch (error) {
		remove();
		throw error;
	}
}
