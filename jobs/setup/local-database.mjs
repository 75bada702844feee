import { existsSync, lstatSync, readlinkSync, symlinkSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { Explained } from './explained.mjs';
import {
	dropDatabase,
	ensureAccount,
	isUnfilled,
	leftoverServer,
	prepareData,
	serverCanReach,
	startMariadb
} from './mariadb.mjs';
import { endProcess } from './shutdown.mjs';

/**
 * Where the private database of this clone keeps its data: `.data/mariadb`. Where root runs this in a folder that the
 * database's account may not enter (such as /root), it is a folder under /var/lib, and `.data/mariadb` points to it.
 * @param {{ dataDir: string, cloneId: string, remark: (sentence: string) => void }} options
 * @returns {string}
 */
export function placeData({ dataDir, cloneId, remark }) {
	const inside = join(dataDir, 'mariadb');
	const found = lstatSync(inside, { throwIfNoEntry: false });
	if (found?.isSymbolicLink()) return resolve(dataDir, readlinkSync(inside));
	if (serverCanReach(dataDir)) return inside;
	if (existsSync(join(inside, 'data'))) {
		throw new Explained(
			`The database's data are in ${inside}, but the account "mysql" cannot get there any more:\n` +
				'a folder above it is closed to others. Open it (chmod o+x) or move the clone elsewhere.'
		);
	}
	const outside = `/var/lib/fadewell-${cloneId}`;
	symlinkSync(outside, inside);
	remark(
		`The database runs as the account "mysql", which may not enter ${dataDir}.\n` +
			`Its data are kept in ${outside} instead; .data/mariadb points there.`
	);
	return outside;
}

/**
 * Starts the private database of this clone, whatever an earlier run left behind.
 * @param {{ base: string, port: number, password: string, remark: (sentence: string) => void }} options
 */
export async function startLocalDatabase({ base, port, password, remark }) {
	const leftover = leftoverServer(base);
	if (leftover !== null) {
		remark(`A database server of an earlier run was still up (process ${leftover}); it was shut down.`);
		await endProcess(leftover, 120_000);
	}
	const { created, setAside } = await prepareData(base);
	if (setAside !== null) {
		remark(
			'The database folder was only half made, probably by an interrupted start. It was set aside as\n' +
				`${setAside} and made anew. Nothing is in it; you may delete it.`
		);
	}
	const database = await startMariadb({ base, port });
	try {
		if (!created && isUnfilled(base)) {
			remark(
				'The first filling of the database was interrupted, before anybody could use it. It is done again.'
			);
			await dropDatabase(database);
		}
		await ensureAccount(database, { password });
	} catch (error) {
		await database.stop();
		throw error;
	}
	return database;
}
