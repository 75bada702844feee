import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { localVariables, readDotEnv, readVariables } from './environment.mjs';
import { describe, Explained } from './explained.mjs';
import { accepts, choosePorts, LOOPBACK } from './ports.mjs';
import { makeSecrets } from './secrets.mjs';
import { jobCommand, runJob } from './stack.mjs';
import { openTemporaryDatabase } from './temporary-database.mjs';

/**
 * Runs one file of jobs/ in the foreground: `node jobs/setup/job.mjs [--own-database] jobs/<file>.ts [arguments]`.
 * Settings come from the environment, then `.env`, then what the last `npm start` left in `.data/env`.
 * With `--own-database` the job gets an empty, migrated MariaDB of its own that is gone afterwards.
 */

const root = resolve(fileURLToPath(new URL('../..', import.meta.url)));
const given = process.argv.slice(2);
const ownDatabase = given[0] === '--own-database';
const [file, ...args] = ownDatabase ? given.slice(1) : given;

/** @returns {Promise<{ variables: Record<string, string>, close: () => Promise<void> }>} */
async function settings() {
	if (ownDatabase) return ownSettings();
	const saved = { ...readVariables(join(root, '.data', 'env')), ...readDotEnv(root) };
	for (const [name, value] of Object.entries(process.env)) if (value !== undefined) saved[name] = value;
	await checkDatabase(saved.DATABASE_URL);
	return { variables: saved, close: async () => {} };
}

async function ownSettings() {
	const database = await openTemporaryDatabase({ durable: true });
	const dataDir = mkdtempSync(join(tmpdir(), 'fadewell-job-'));
	const local = localVariables({ ports: choosePorts({}), secrets: makeSecrets(), dataDir });
	const variables = { ...local, DATABASE_URL: database.url };
	await runJob({ root, logs: dataDir, variables }, 'jobs/migrate.ts', 'Migrating');
	const close = async () => {
		await database.close();
		rmSync(dataDir, { recursive: true, force: true });
	};
	return { variables, close };
}

/** @param {string | undefined} url */
async function checkDatabase(url) {
	if (url === undefined) return;
	const { hostname, port } = new URL(url);
	if (hostname !== LOOPBACK || (await accepts(Number(port || 3306)))) return;
	throw new Explained(
		`Nothing answers at ${hostname}:${port}, where the database should be. Is npm start running?\n` +
			'If the database is elsewhere, set DATABASE_URL in .env or in the environment.'
	);
}

/** @param {string} name @param {Record<string, string>} variables @returns {Promise<number>} */
function runToEnd(name, variables) {
	const { command, args: first, env } = jobCommand(root, name);
	const child = spawn(command, [...first, ...args], {
		cwd: root,
		env: { ...process.env, ...variables, ...env },
		stdio: 'inherit'
	});
	for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
		// Ctrl-C reaches the job by itself; we only have to stay until it is done.
		process.on(signal, () => signal !== 'SIGINT' && child.kill(signal));
	}
	return new Promise((done) => {
		child.once('error', () => done(127));
		child.once('exit', (code) => done(code ?? 128));
	});
}

try {
	if (file === undefined || !existsSync(join(root, file))) {
		throw new Explained(`There is no ${file ?? 'job of that name'}.`);
	}
	const { variables, close } = await settings();
	try {
		process.exitCode = await runToEnd(file, variables);
	} finally {
		await close();
	}
} catch (error) {
	console.error(describe(error));
	process.exitCode = 1;
}
