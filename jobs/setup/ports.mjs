import { existsSync, readdirSync, readFileSync, readlinkSync } from 'node:fs';
import { connect, createServer } from 'node:net';
import { Explained } from './explained.mjs';

export const LOOPBACK = '127.0.0.1';

/** The ports of `npm start`, each with the variable that moves it. `docker-compose.local-fakes.yml` uses the same. */
export const DEFAULT_PORTS = Object.freeze({
	web: Object.freeze({ variable: 'PORT', port: 4310, what: 'the web server' }),
	fakes: Object.freeze({
		variable: 'FAKES_PORT',
		port: 4311,
		what: "the fake SMS service and the parents' telephones"
	}),
	smtp: Object.freeze({ variable: 'FAKES_SMTP_PORT', port: 4312, what: 'the fake mail service' }),
	database: Object.freeze({ variable: 'DATABASE_PORT', port: 4313, what: 'the database' })
});

/** @typedef {keyof typeof DEFAULT_PORTS} PortName */

/**
 * The ports to use: the defaults, moved by the environment.
 * @param {Record<string, string | undefined>} env
 * @returns {Record<PortName, number>}
 * @throws Explained for the person when a variable is no port, or two services were given the same one.
 */
export function choosePorts(env) {
	const chosen = {
		web: readPort(env, 'web'),
		fakes: readPort(env, 'fakes'),
		smtp: readPort(env, 'smtp'),
		database: readPort(env, 'database')
	};
	const names = /** @type {PortName[]} */ (Object.keys(chosen));
	for (const name of names) {
		const twin = names.find((other) => other !== name && chosen[other] === chosen[name]);
		if (twin) {
			const { variable } = DEFAULT_PORTS[name];
			throw new Explained(
				`${variable} and ${DEFAULT_PORTS[twin].variable} are both ${chosen[name]}. Give each its own port.`
			);
		}
	}
	return chosen;
}

/** @param {Record<string, string | undefined>} env @param {PortName} name */
function readPort(env, name) {
	const { variable, port } = DEFAULT_PORTS[name];
	const text = env[variable];
	if (text === undefined || text === '') return port;
	const value = Number(text);
	if (!Number.isInteger(value) || value < 1 || value > 65535) {
		throw new Explained(`${variable} is "${text}", which is not a port. Give a number from 1 to 65535.`);
	}
	return value;
}

/**
 * True when nothing listens on the port of the loopback address.
 * @param {number} port @returns {Promise<boolean>}
 */
export function isFree(port) {
	return new Promise((resolve) => {
		const probe = createServer();
		probe.once('error', () => resolve(false));
		probe.listen({ port, host: LOOPBACK, exclusive: true }, () => probe.close(() => resolve(true)));
	});
}

/**
 * Ports that are free right now, for tests. Held open together, so that all differ.
 * @param {number} count @returns {Promise<number[]>}
 */
export async function freePorts(count) {
	const probes = await Promise.all(
		Array.from({ length: count }, async () => {
			const probe = createServer();
			await new Promise((resolve, reject) => {
				probe.once('error', reject);
				probe.listen({ port: 0, host: LOOPBACK }, () => resolve(undefined));
			});
			return probe;
		})
	);
	const ports = probes.map((probe) => {
		const address = probe.address();
		if (address === null || typeof address === 'string') throw new Error('The system gave no port.');
		return address.port;
	});
	await Promise.all(probes.map((probe) => new Promise((resolve) => probe.close(resolve))));
	return ports;
}

/**
 * True when something accepts connections on the port.
 * @param {number} port @returns {Promise<boolean>}
 */
export function accepts(port) {
	return new Promise((resolve) => {
		const socket = connect({ port, host: LOOPBACK });
		const answer = (/** @type {boolean} */ value) => {
			socket.destroy();
			resolve(value);
		};
		socket.setTimeout(1000, () => answer(false));
		socket.once('connect', () => answer(true));
		socket.once('error', () => answer(false));
	});
}

/**
 * Who listens on a port, as far as the system lets us see: "process 123 (node build)"; null when it does not.
 * @param {number} port @returns {string | null}
 */
export function whoListens(port) {
	const inode = listeningInode(port);
	if (inode === null) return null;
	for (const pid of readdirSync('/proc').filter((name) => /^\d+$/.test(name))) {
		try {
			const holds = readdirSync(`/proc/${pid}/fd`).some(
				(fd) => readlinkOrEmpty(`/proc/${pid}/fd/${fd}`) === `socket:[${inode}]`
			);
			if (!holds) continue;
			const command = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').join(' ').trim();
			return `process ${pid} (${command.slice(0, 80)})`;
		} catch {
			// Another user's process, or one that has just ended: it stays unnamed.
		}
	}
	return null;
}

/** @param {number} port @returns {string | null} */
function listeningInode(port) {
	const LISTEN = '0A';
	const wanted = port.toString(16).toUpperCase().padStart(4, '0');
	for (const file of ['/proc/net/tcp', '/proc/net/tcp6']) {
		if (!existsSync(file)) continue;
		for (const line of readFileSync(file, 'utf8').split('\n').slice(1)) {
			const [, local, , state, , , , , , inode] = line.trim().split(/\s+/);
			if (state === LISTEN && local?.endsWith(`:${wanted}`) && inode) return inode;
		}
	}
	return null;
}

/** @param {string} path */
function readlinkOrEmpty(path) {
	try {
		return readlinkSync(path);
	} catch {
		return '';
	}
}
