import { spawnSync } from 'node:child_process';
import {
	chmodSync,
	chownSync,
	existsSync,
	mkdirSync,
	mkdtempSync,
	readFileSync,
	renameSync,
	rmSync,
	writeFileSync
} from 'node:fs';
import { tmpdir, userInfo } from 'node:os';
import { delimiter, join } from 'node:path';
import { accepts, LOOPBACK } from './ports.mjs';
import { run, startService, tail, waitUntil } from './processes.mjs';

/** The kernel refuses longer socket paths (108 bytes with the closing zero). */
const SOCKET_PATH_LIMIT = 107;
/** Present once the data folder is whole. */
const STAMP = '.complete';
/** Present until the tables and the demo have been put in for the first time; until then nobody has worked in it. */
const UNFILLED = '.unfilled';
/** How the product expects its database to behave, wherever it runs: instants in UTC, texts in full Unicode. */
export const SERVER_SETTINGS = Object.freeze([
	`--bind-address=${LOOPBACK}`,
	'--skip-name-resolve',
	'--character-set-server=utf8mb4',
	'--collation-server=utf8mb4_unicode_ci',
	'--default-time-zone=+00:00',
	'--innodb-buffer-pool-size=128M'
]);
export const DATABASE_NAME = 'fadewell';
export const DATABASE_USER = 'fadewell';

/**
 * @typedef {object} PrivateDatabase
 * @property {import('./processes.mjs').Service} service
 * @property {string} socket
 * @property {number} port
 * @property {() => Promise<void>} stop Shuts the server down cleanly.
 */

/** Debian keeps the server's programs in sbin, which an ordinary user's PATH leaves out. */
function withSbin() {
	return { ...process.env, PATH: [process.env.PATH ?? '', '/usr/sbin', '/sbin'].join(delimiter) };
}

/** True when the server's programs are installed. */
export function hasMariadb() {
	return ['mariadbd', 'mariadb-install-db', 'mariadb', 'mariadb-admin'].every(
		(name) => spawnSync('sh', ['-c', `command -v ${name}`], { env: withSbin() }).status === 0
	);
}

/**
 * The system account that runs the server: the server refuses to run as root, so root lends it to `mysql`.
 * @returns {{ name: string, uid: number, gid: number } | null} null when not root: the server then runs as ourselves.
 */
export function serverAccount() {
	if (userInfo().uid !== 0) return null;
	const number = (/** @type {string} */ option) =>
		Number(spawnSync('id', [option, 'mysql'], { encoding: 'utf8' }).stdout.trim() || Number.NaN);
	const account = { name: 'mysql', uid: number('-u'), gid: number('-g') };
	if (!Number.isInteger(account.uid)) throw new Error('There is no system account "mysql" for the database.');
	return account;
}

/**
 * True when the account that runs the server can pass through `folder` and all folders above it.
 * @param {string} folder
 */
export function serverCanReach(folder) {
	const account = serverAccount();
	if (account === null) return true;
	const { uid, gid } = account;
	return spawnSync('test', ['-x', folder], { uid, gid, cwd: '/' }).status === 0;
}

/**
 * What is found at the place of the data: nothing, a finished data folder, or one whose making was interrupted.
 * @param {string} base @returns {'absent' | 'complete' | 'half-made'}
 */
export function dataState(base) {
	if (!existsSync(join(base, 'data'))) return 'absent';
	return existsSync(join(base, STAMP)) ? 'complete' : 'half-made';
}

/**
 * Makes the data folder if it is not there; a half-made one is set aside, never deleted.
 * @param {string} base
 * @returns {Promise<{ created: boolean, setAside: string | null }>} `setAside` is where the half-made folder went.
 */
export async function prepareData(base) {
	const state = dataState(base);
	if (state === 'complete') return { created: false, setAside: null };
	let setAside = null;
	if (state === 'half-made') {
		setAside = `${join(base, 'data')}.set-aside-${new Date().toISOString().replaceAll(/[:.]/g, '-')}`;
		renameSync(join(base, 'data'), setAside);
	}
	const account = serverAccount();
	mkdirSync(base, { recursive: true, mode: 0o700 });
	give(base, account);
	const args = [
		'--no-defaults',
		`--datadir=${join(base, 'data')}`,
		'--auth-root-authentication-method=normal',
		'--skip-test-db',
		'--skip-name-resolve'
	];
	if (account) args.push(`--user=${account.name}`);
	const made = await run('mariadb-install-db', args, { env: withSbin(), cwd: '/' });
	if (made.code !== 0) {
		throw new Error(`The database's data folder could not be made in ${base}:\n${made.output.trim()}`);
	}
	writeFileSync(join(base, UNFILLED), '');
	// Last: without this stamp the folder counts as half-made.
	writeFileSync(join(base, STAMP), '');
	return { created: true, setAside };
}

/** @param {string} path @param {{ uid: number, gid: number } | null} account */
function give(path, account) {
	chmodSync(path, 0o700);
	if (account) chownSync(path, account.uid, account.gid);
}

/**
 * Starts a private MariaDB on 127.0.0.1 with its data in `base`, and waits until it answers. `prepareData` comes first.
 * @param {{ base: string, port: number, extra?: string[], sharesGroup?: boolean }} options `sharesGroup`: see startService.
 * @returns {Promise<PrivateDatabase>}
 */
export async function startMariadb({ base, port, extra = [], sharesGroup = false }) {
	const account = serverAccount();
	const tmp = join(base, 'tmp');
	mkdirSync(tmp, { recursive: true });
	give(tmp, account);
	const { socket, dispose } = socketPath(base, account);
	const logFile = join(base, 'mariadb.log');
	const service = await startService({
		name: 'MariaDB',
		command: 'mariadbd',
		args: [
			'--no-defaults',
			...(account ? [`--user=${account.name}`] : []),
			`--datadir=${join(base, 'data')}`,
			`--socket=${socket}`,
			`--port=${port}`,
			`--pid-file=${join(base, 'mariadb.pid')}`,
			`--tmpdir=${tmp}`,
			...SERVER_SETTINGS,
			...extra
		],
		env: withSbin(),
		cwd: '/',
		logFile,
		sharesGroup
	});
	const problem = await waitUntil(() => accepts(port), {
		timeoutMs: 120_000,
		giveUp: () => (service.isRunning() ? null : 'it ended by itself')
	});
	if (problem !== null) {
		await service.stop();
		dispose();
		throw new Error(`The database did not start: ${problem}. The end of ${logFile}:\n${tail(logFile)}`);
	}
	const stop = async () => {
		// SIGTERM is MariaDB's own clean shutdown; flushing may take a while on a slow disk.
		await service.stop(120_000);
		dispose();
	};
	return { service, socket, port, stop };
}

/** @param {string} base @param {{ uid: number, gid: number } | null} account */
function socketPath(base, account) {
	const beside = join(base, 'm.sock');
	if (Buffer.byteLength(beside) <= SOCKET_PATH_LIMIT) return { socket: beside, dispose: () => {} };
	const folder = mkdtempSync(join(tmpdir(), 'fadewell-'));
	give(folder, account);
	return { socket: join(folder, 'm.sock'), dispose: () => rmSync(folder, { recursive: true, force: true }) };
}

/**
 * Creates the product's database and its account, and closes every way in that has no password. May be repeated.
 * @param {PrivateDatabase} database
 * @param {{ password: string, everyDatabase?: boolean }} options `everyDatabase` is for tests, which make one a file.
 */
export async function ensureAccount(database, { password, everyDatabase = false }) {
	if (!/^[\w-]+$/.test(password))
		throw new Error('The database password holds a character that was not expected.');
	const account = `'${DATABASE_USER}'@'${LOOPBACK}'`;
	const sql = [
		`create database if not exists ${DATABASE_NAME}`,
		`create user if not exists ${account} identified by '${password}'`,
		`alter user ${account} identified by '${password}'`,
		`grant all on ${everyDatabase ? '*.*' : `${DATABASE_NAME}.*`} to ${account}`,
		// root keeps the socket only, in a folder that nobody else can enter.
		`delete from mysql.global_priv where User = 'root' and Host <> 'localhost'`,
		`delete from mysql.global_priv where User = ''`,
		'flush privileges'
	].join(';\n');
	await asRoot(database, sql);
}

/** @param {string} base */
export function isUnfilled(base) {
	return existsSync(join(base, UNFILLED));
}

/** @param {string} base */
export function markFilled(base) {
	rmSync(join(base, UNFILLED), { force: true });
}

/**
 * Empties a database in which the first filling was interrupted: half of it would pass for the whole.
 * @param {PrivateDatabase} database
 */
export async function dropDatabase(database) {
	await asRoot(database, `drop database if exists ${DATABASE_NAME}`);
}

/** @param {PrivateDatabase} database @param {string} sql */
async function asRoot(database, sql) {
	const args = ['--no-defaults', `--socket=${database.socket}`, '-uroot'];
	const done = await run('mariadb', args, { env: withSbin(), input: sql });
	if (done.code !== 0) throw new Error(`The database could not be set up:\n${done.output.trim()}`);
}

/**
 * The address of a database on the private server.
 * @param {{ port: number, password: string, name?: string }} options
 */
export function databaseUrl({ port, password, name = DATABASE_NAME }) {
	return `mysql://${DATABASE_USER}:${password}@${LOOPBACK}:${port}/${name}`;
}

/**
 * The id of a server that still works on the data in `base`, left over from a start that was killed; null when none.
 * @param {string} base @returns {number | null}
 */
export function leftoverServer(base) {
	try {
		const pid = Number(readFileSync(join(base, 'mariadb.pid'), 'utf8').trim());
		const command = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0');
		return command.includes(`--datadir=${join(base, 'data')}`) ? pid : null;
	} catch {
		return null;
	}
}
