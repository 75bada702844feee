import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { randomBytes } from 'node:crypto';
import type { TestProject } from 'vitest/node';
import {
	databaseUrl,
	ensureAccount,
	hasMariadb,
	prepareData,
	startMariadb
} from '../../jobs/setup/mariadb.mjs';
import { freePorts } from '../../jobs/setup/ports.mjs';

declare module 'vitest' {
	interface ProvidedContext {
		/** Address of the private MariaDB of this run; its account may create databases. */
		mariadbUrl: string;
	}
}

/** Tests lose nothing when the machine loses power, so the log need not reach the disk at every commit. */
const FAST = [
	'--innodb-flush-log-at-trx-commit=2',
	'--innodb-buffer-pool-size=96M',
	'--innodb-log-file-size=24M'
];

/** One private MariaDB for a whole run, on a free port with its data in a temporary folder. */
export default async function startForRun(project: TestProject): Promise<() => Promise<void>> {
	if (!hasMariadb()) throw new Error('MariaDB is not installed; `npm test` installs it.');
	const folder = mkdtempSync(join(tmpdir(), 'fadewell-test-'));
	const base = join(folder, 'mariadb');
	const [port] = await freePorts(1);
	if (port === undefined) throw new Error('The system gave no port.');
	const password = randomBytes(18).toString('base64url');
	// The server may run as another account than ours: it has to pass through the folder that holds its own.
	chmodSync(folder, 0o711);
	await prepareData(base);
	const database = await startMariadb({ base, port, extra: FAST });
	await ensureAccount(database, { password, everyDatabase: true });
	project.provide('mariadbUrl', databaseUrl({ port, password }));
	return async () => {
		await database.stop();
		rmSync(folder, { recursive: true, force: true });
	};
}
