import { existsSync, renameSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Explained } from './explained.mjs';
import { accepts, LOOPBACK } from './ports.mjs';
import { run, startService, tail, waitUntil } from './processes.mjs';

/**
 * @typedef {object} Place Where a stack runs.
 * @property {string} root The top of the project.
 * @property {string} logs Folder for the services' logs.
 * @property {Record<string, string>} variables See environment.mjs.
 * @property {boolean} [sharesGroup] See startService.
 */

const READY_MS = 120_000;
/** Written by jobs/run-worker.ts once it has everything it needs. */
const WORKER_READY = '"the worker runs"';

/**
 * How a TypeScript file under jobs/ is run: in one process, so that signals reach it.
 * @param {string} root @param {string} file
 * @returns {{ command: string, args: string[], env: Record<string, string> }}
 */
export function jobCommand(root, file) {
	const path = join(root, file);
	if (!existsSync(path)) throw new Explained(`${file} does not exist, so it cannot be started.`);
	const loader = pathToFileURL(join(root, 'node_modules', 'tsx', 'dist', 'loader.mjs')).href;
	return {
		command: process.execPath,
		args: ['--import', loader, path],
		env: { TSX_TSCONFIG_PATH: join(root, 'jobs', 'tsconfig.json') }
	};
}

/**
 * Runs a job that ends by itself.
 * @param {Place} place @param {string} file @param {string} doing What it does, for the message when it fails.
 * @param {string[]} [options] For the job itself.
 */
export async function runJob(place, file, doing, options = []) {
	const { command, args, env } = jobCommand(place.root, file);
	const done = await run(command, [...args, ...options], {
		cwd: place.root,
		env: { ...process.env, ...place.variables, ...env }
	});
	if (done.code !== 0) throw new Explained(`${doing} failed (${file}):\n${done.output.trim()}`);
	return done.output;
}

/** @param {Place} place */
export async function startFakes(place) {
	const service = await startJob(place, 'fakes', 'jobs/fakes/main.ts');
	await untilReady(place, service, async () => {
		const ports = [place.variables.FAKES_PORT, place.variables.FAKES_SMTP_PORT].map(Number);
		return (await Promise.all(ports.map(accepts))).every(Boolean);
	});
	return service;
}

/**
 * Starts a worker and waits for the line with which it says that it is at work, if its log level lets it say so.
 * @param {Place} place
 */
export async function startWorker(place) {
	const service = await startJob(place, 'worker', 'jobs/worker.ts');
	const log = join(place.logs, 'worker.log');
	const speaks = ['info', 'debug', 'trace'].includes(place.variables.LOG_LEVEL ?? 'info');
	await untilReady(place, service, async () => !speaks || tail(log).includes(WORKER_READY));
	return service;
}

/**
 * Starts the built web server, or the development server, and waits until it says that it is ready.
 * @param {Place} place @param {{ build: string } | 'dev'} what `build` is the folder of the built server.
 */
export async function startWeb(place, what) {
	const { root, logs, variables } = place;
	const args =
		what === 'dev'
			? [
					'node_modules/vite/bin/vite.js',
					'dev',
					'--host',
					LOOPBACK,
					'--port',
					String(variables.PORT),
					'--strictPort'
				]
			: [what.build];
	const logFile = freshLog(logs, 'web');
	const mode = what === 'dev' ? 'development' : 'production';
	const service = await startService({
		name: 'web',
		command: process.execPath,
		args,
		cwd: root,
		env: { ...process.env, ...variables, NODE_ENV: mode },
		logFile,
		sharesGroup: place.sharesGroup
	});
	await untilReady(place, service, () => answersOk(`http://${LOOPBACK}:${variables.PORT}/health/ready`));
	return service;
}

/** @param {Place} place @param {string} name @param {string} file */
async function startJob(place, name, file) {
	const { command, args, env } = jobCommand(place.root, file);
	return startService({
		name,
		command,
		args,
		cwd: place.root,
		env: { ...process.env, ...place.variables, ...env, NODE_ENV: 'production' },
		logFile: freshLog(place.logs, name),
		sharesGroup: place.sharesGroup
	});
}

/** @param {Place} place @param {import('./processes.mjs').Service} service @param {() => Promise<boolean>} check */
async function untilReady(place, service, check) {
	const problem = await waitUntil(check, {
		timeoutMs: READY_MS,
		giveUp: () => (service.isRunning() ? null : 'it ended by itself')
	});
	if (problem === null) return;
	await service.stop();
	throw new Explained(whyItFailed(place.logs, service.name, problem));
}

/** @param {string} logs @param {string} name @param {string} problem */
export function whyItFailed(logs, name, problem) {
	const file = join(logs, `${name}.log`);
	return `The ${name} process failed: ${problem}. The end of ${file}:\n${tail(file) || '(nothing was written)'}`;
}

/** @param {string} url */
async function answersOk(url) {
	try {
		const response = await fetch(url, { signal: AbortSignal.timeout(2000), redirect: 'manual' });
		await response.arrayBuffer();
		return response.ok;
	} catch {
		return false;
	}
}

/** Keeps the log of the last run beside the new one. @param {string} logs @param {string} name */
function freshLog(logs, name) {
	const file = join(logs, `${name}.log`);
	if (existsSync(file)) renameSync(file, `${file}.1`);
	return file;
}
