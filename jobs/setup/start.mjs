import { existsSync, mkdirSync, readFileSync, statSync } from 'node:fs';
import { userInfo } from 'node:os';
import { join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildIsCurrent, buildWeb, compileTexts } from './build.mjs';
import { localVariables, mergeVariables, readDotEnv, saveVariables } from './environment.mjs';
import { describe, Explained } from './explained.mjs';
import { dependenciesAreCurrent, ensureSystemPackages, installDependencies, MARIADB } from './install.mjs';
import { placeData, startLocalDatabase } from './local-database.mjs';
import { takeLock } from './lock.mjs';
import { isUnfilled, markFilled } from './mariadb.mjs';
import { choosePorts, DEFAULT_PORTS, isFree, LOOPBACK, whoListens } from './ports.mjs';
import { phase } from './progress.mjs';
import { loadSecrets } from './secrets.mjs';
import { endProcess, Shutdown } from './shutdown.mjs';
import { runJob, startFakes, startWeb, startWorker, whyItFailed } from './stack.mjs';

/** `npm start`: from a fresh clone to the running product. `--dev` runs the development server in place of the build. */

const root = resolve(fileURLToPath(new URL('../..', import.meta.url)));
const dataDir = join(root, '.data');
const logs = join(dataDir, 'logs');
const buildFolder = join(root, 'build');
const isDev = process.argv.includes('--dev');
const shutdown = new Shutdown();
/** @type {import('./processes.mjs').Service[]} */
const services = [];
/** @type {string[]} Sentences for the person; printed between the phases, so that no progress line is broken. */
const remarks = [];
const remark = (/** @type {string} */ sentence) => remarks.push(sentence);

function printRemarks() {
	if (remarks.length === 0) return;
	console.log(`\n${remarks.splice(0).join('\n').replaceAll(/^/gm, '    ')}\n`);
}

/** @template T @param {string} title @param {(note: (text: string) => void) => Promise<T>} work */
async function step(title, work) {
	if (shutdown.signal.aborted) throw new Explained('Stopped before it was ready.');
	const result = await phase(title, work);
	printRemarks();
	return result;
}

function prepareDataFolder() {
	const found = statSync(dataDir, { throwIfNoEntry: false });
	const { uid } = userInfo();
	if (found && found.uid !== uid) {
		throw new Explained(
			`The folder .data belongs to another account (number ${found.uid}, you are ${uid}).\n` +
				'Run npm start as that account; otherwise neither of you could read what the other leaves there.'
		);
	}
	// The database's account passes through; each file inside is closed by itself.
	mkdirSync(dataDir, { recursive: true, mode: 0o711 });
	mkdirSync(logs, { recursive: true, mode: 0o700 });
}

function lockOrExplain() {
	const path = join(dataDir, 'start.lock');
	const lock = takeLock(path);
	if (!lock.taken) {
		throw new Explained(
			`Fadewell is already running from this folder (process ${lock.pid}).\n` +
				`Stop it with Ctrl-C in its own terminal, or with: kill ${lock.pid}`
		);
	}
	return lock;
}

/** @param {Record<import('./ports.mjs').PortName, number>} ports */
async function checkPorts(ports) {
	const names = /** @type {import('./ports.mjs').PortName[]} */ (Object.keys(ports));
	const taken = [];
	for (const name of names) {
		if (await isFree(ports[name])) continue;
		const { variable, what } = DEFAULT_PORTS[name];
		const who = whoListens(ports[name]) ?? 'another program';
		taken.push(
			`Port ${ports[name]}, meant for ${what}, is in use by ${who}.\n` +
				`End that program, or choose another port: ${variable}=${ports[name] + 100} npm start`
		);
	}
	if (taken.length > 0) throw new Explained(taken.join('\n\n'));
}

/** @param {ReturnType<typeof lockOrExplain>} lock */
async function clearLeftovers(lock) {
	if (!lock.wasStale) return;
	remark('The last run did not end properly (its process is gone). Its lock was taken over.');
	// In reverse, the database last.
	for (const orphan of lock.orphans.toReversed()) {
		remark(`Its ${orphan.name} process was still running (${orphan.pid}) and was stopped.`);
		await endProcess(orphan.pid);
	}
	printRemarks();
}

/** @param {ReturnType<typeof lockOrExplain>} lock @param {import('./processes.mjs').Service} service */
function keep(lock, service) {
	services.push(service);
	shutdown.add(service);
	lock.add(service.name, service.pid);
}

async function installWhatIsMissing() {
	const { signal } = shutdown;
	await step('Debian packages', async (note) => {
		const installed = await ensureSystemPackages([MARIADB], { signal });
		note(installed.length > 0 ? `installed ${installed.join(', ')}` : 'all there');
	});
	await step('npm packages', async (note) => {
		if (dependenciesAreCurrent(root)) return note('all there');
		await installDependencies(root, { signal });
		note('installed');
	});
}

/**
 * @param {ReturnType<typeof lockOrExplain>} lock
 * @param {{ ports: Record<import('./ports.mjs').PortName, number>, secrets: import('./secrets.mjs').Secrets, place: import('./stack.mjs').Place }} local
 */
async function bringUpDatabase(lock, { ports, secrets, place }) {
	const base = placeData({ dataDir, cloneId: secrets.cloneId, remark });
	await step('Database', async () => {
		const password = secrets.databasePassword;
		const database = await startLocalDatabase({ base, port: ports.database, password, remark });
		keep(lock, { ...database.service, stop: database.stop });
	});
	await step('Tables', () => runJob(place, 'jobs/migrate.ts', 'Bringing the tables up to date'));
	if (!isUnfilled(base)) return;
	if (place.variables.DEMO === '1') {
		await step('Demo: an invented hospital', () => runJob(place, 'jobs/demo.ts', 'Loading the demo'));
	}
	markFilled(base);
}

/** @param {ReturnType<typeof lockOrExplain>} lock @param {import('./stack.mjs').Place} place */
async function bringUpServices(lock, place) {
	const sending = async () => {
		keep(lock, await startFakes(place));
		// After the fakes: its first message must find them.
		keep(lock, await startWorker(place));
	};
	const serving = async () => keep(lock, await startWeb(place, isDev ? 'dev' : { build: buildFolder }));
	// Both to the end, also when one fails: what was started must be known to be stopped.
	const ends = await Promise.allSettled([sending(), serving()]);
	for (const end of ends) if (end.status === 'rejected') throw end.reason;
}

/** @param {Record<import('./ports.mjs').PortName, number>} ports @param {import('./stack.mjs').Place} place @param {number} seconds */
function printWelcome(ports, place, seconds) {
	const fakesAreUsed = place.variables.TWILIO_BASE_URL?.endsWith(`:${ports.fakes}`);
	console.log(`\nFadewell is running (${seconds.toFixed(0)} s).\n`);
	console.log(`  For staff                  ${place.variables.ORIGIN}`);
	if (fakesAreUsed) console.log(`  The parents' telephones    http://${LOOPBACK}:${ports.fakes}`);
	console.log(`  Logs                       ${relative(process.cwd(), logs) || '.'}`);
	const signIns = join(dataDir, 'demo-sign-ins.txt');
	if (place.variables.DEMO === '1' && existsSync(signIns))
		console.log(`\n${readFileSync(signIns, 'utf8').trimEnd()}`);
	console.log('\nCtrl-C stops everything and keeps the data.\n');
}

/** @returns {Promise<string | null>} null when the person stopped it, otherwise which part ended, and how */
async function untilStopped() {
	/** @type {Promise<null>} */
	const asked = new Promise((resolve) => {
		if (shutdown.signal.aborted) resolve(null);
		shutdown.signal.addEventListener('abort', () => resolve(null), { once: true });
	});
	const ends = services.map(async (service) => whyItFailed(logs, service.name, await service.ended));
	return Promise.race([asked, ...ends]);
}

async function main() {
	const began = performance.now();
	console.log(`\nFadewell, in ${root}\n`);
	prepareDataFolder();
	const lock = lockOrExplain();
	shutdown.listen();
	try {
		await clearLeftovers(lock);
		const own = readDotEnv(root);
		const ports = choosePorts({ ...own, ...process.env });
		await checkPorts(ports);
		await installWhatIsMissing();
		const secrets = loadSecrets(dataDir);
		const merged = mergeVariables(localVariables({ ports, secrets, dataDir }), own);
		merged.remarks.forEach(remark);
		saveVariables(dataDir, merged.variables);
		const place = { root, logs, variables: merged.variables };
		if (isDev) await step('Texts', () => compileTexts(root, { signal: shutdown.signal }));
		else {
			await step('Web server, built', async (note) => {
				if (buildIsCurrent(root, buildFolder)) return note('unchanged since it was last built');
				await buildWeb(root, buildFolder, { signal: shutdown.signal });
			});
		}
		await bringUpDatabase(lock, { ports, secrets, place });
		await step('Fakes, worker and web server', () => bringUpServices(lock, place));
		printWelcome(ports, place, (performance.now() - began) / 1000);
		const failure = await untilStopped();
		if (failure !== null)
			throw new Explained(`${failure}\n\nEverything else is stopped now; the data are kept.`);
	} finally {
		printRemarks();
		await shutdown.stopAll();
		lock.release();
	}
}

// A terminal that was closed must not keep us from stopping what was started.
process.stdout.on('error', () => {});
process.stderr.on('error', () => {});

try {
	await main();
	console.log('Stopped. The data are kept.');
	process.exit(0);
} catch (error) {
	if (shutdown.signal.aborted) {
		console.log('Stopped before it was ready. Nothing is lost; npm start goes on from here.');
		process.exit(0);
	}
	console.error(`\n${describe(error)}\n`);
	process.exit(1);
}
