import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { localVariables } from './environment.mjs';
import { Explained } from './explained.mjs';
import { freePorts, LOOPBACK } from './ports.mjs';
import { makeSecrets } from './secrets.mjs';
import { runJob, startFakes, startWeb, startWorker } from './stack.mjs';
import { openTemporaryDatabase } from './temporary-database.mjs';

/**
 * @typedef {object} TemporaryStack The whole product on free ports, for a test: built web server, worker, fakes, and a
 *   migrated private MariaDB with the demo in it.
 * @property {string} origin Where staff and parents reach the web server.
 * @property {string} fakesUrl The parents' telephones, and the fake SMS service.
 * @property {string} databaseUrl
 * @property {string} dataDir
 * @property {string} signIns What the demo says about its sign-ins; empty without the demo.
 * @property {Record<string, string>} variables Settings for another worker or web server over the same database.
 * @property {() => Promise<void>} close Stops everything and deletes its data.
 */

/**
 * Starts the whole product beside anything else that runs.
 * @param {{ root: string, build: string, demo?: boolean, worker?: boolean }} options `build` is the folder of the built
 *   web server.
 * @returns {Promise<TemporaryStack>}
 */
export async function openTemporaryStack({ root, build, demo = true, worker = true }) {
	if (!existsSync(join(build, 'index.js'))) {
		throw new Explained(`There is no built web server in ${build}. Build it with: npm run build`);
	}
	const dataDir = mkdtempSync(join(tmpdir(), 'fadewell-stack-'));
	/** @type {(() => unknown)[]} */
	const undo = [() => rmSync(dataDir, { recursive: true, force: true })];
	const close = async () => {
		for (const step of undo.splice(0).toReversed()) await step();
	};
	try {
		const database = await openTemporaryDatabase();
		undo.push(database.close);
		const [web = 0, fakes = 0, smtp = 0] = await freePorts(3);
		const ports = { web, fakes, smtp, database: database.port };
		const variables = {
			...localVariables({ ports, secrets: makeSecrets(), dataDir }),
			DATABASE_URL: database.url,
			DEMO: demo ? '1' : '0'
		};
		const place = { root, logs: dataDir, variables, sharesGroup: true };
		await runJob(place, 'jobs/migrate.ts', 'Migrating');
		// Always open: a test must find a free place at whatever hour and on whatever day it runs.
		if (demo) await runJob(place, 'jobs/demo.ts', 'Loading the demo', ['--always-open']);
		const services = [
			() => startFakes(place),
			...(worker ? [() => startWorker(place)] : []),
			() => startWeb(place, { build })
		];
		for (const start of services) {
			const service = await start();
			undo.push(() => service.stop());
		}
		return {
			origin: `http://${LOOPBACK}:${web}`,
			fakesUrl: `http://${LOOPBACK}:${fakes}`,
			databaseUrl: database.url,
			dataDir,
			signIns: readIfThere(join(dataDir, 'demo-sign-ins.txt')),
			variables,
			close
		};
	} catch (error) {
		await close();
		throw error;
	}
}

/** @param {string} file */
function readIfThere(file) {
	return existsSync(file) ? readFileSync(file, 'utf8') : '';
}
