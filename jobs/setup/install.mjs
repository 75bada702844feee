import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { userInfo } from 'node:os';
import { join } from 'node:path';
import { Explained } from './explained.mjs';
import { hasMariadb } from './mariadb.mjs';
import { run } from './processes.mjs';

const STAMP = '.fadewell-lock';

/**
 * @typedef {object} SystemPackage
 * @property {string} name Debian's name of it.
 * @property {() => boolean} isThere
 */

/** @type {SystemPackage} */
export const MARIADB = { name: 'mariadb-server', isThere: hasMariadb };

/** @type {SystemPackage} */
export const CHROMIUM = { name: 'chromium', isThere: () => existsSync(chromiumPath()) };

export function chromiumPath() {
	return process.env.CHROMIUM_PATH || '/usr/bin/chromium';
}

/**
 * The command that installs packages here, or null when this account may not: then a person has to.
 * @param {{ uid: number, hasSudo: boolean }} account @param {readonly string[]} args
 * @returns {string[] | null}
 */
export function aptCommand({ uid, hasSudo }, args) {
	const apt = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-o', 'DPkg::Lock::Timeout=300', ...args];
	if (uid === 0) return apt;
	return hasSudo ? ['sudo', '-n', ...apt] : null;
}

/**
 * Installs those packages that are missing.
 * @param {readonly SystemPackage[]} packages
 * @param {{ signal?: AbortSignal }} [options]
 * @returns {Promise<string[]>} the names of what was installed
 * @throws Explained with the exact command when this account may not install, or when installing fails
 */
export async function ensureSystemPackages(packages, { signal } = {}) {
	const missing = packages.filter((wanted) => !wanted.isThere()).map((wanted) => wanted.name);
	if (missing.length === 0) return [];
	const byHand = `sudo apt-get update && sudo apt-get install -y --no-install-recommends ${missing.join(' ')}`;
	if (spawnSync('sh', ['-c', 'command -v apt-get']).status !== 0) {
		throw new Explained(
			`${missing.join(' and ')} must be installed, and there is no apt-get here to do it with.\n` +
				`On Debian the command is:\n\n  ${byHand}\n`
		);
	}
	const account = { uid: userInfo().uid, hasSudo: spawnSync('sudo', ['-n', 'true']).status === 0 };
	const install = aptCommand(account, ['install', '-y', '--no-install-recommends', ...missing]);
	const update = aptCommand(account, ['update']);
	if (install === null || update === null) {
		throw new Explained(
			`${missing.join(' and ')} must be installed, which this account may not do without a password.\n` +
				`Run this, then start again:\n\n  ${byHand}\n`
		);
	}
	// Old lists are good enough when the update cannot be had; the installation then says what is wrong.
	await runCommand(update, signal);
	const done = await runCommand(install, signal);
	const still = packages.filter((wanted) => !wanted.isThere()).map((wanted) => wanted.name);
	if (done.code !== 0 || still.length > 0) {
		const lastLines = done.output.trim().split('\n').slice(-12).join('\n');
		throw new Explained(
			`Installing ${missing.join(' and ')} failed. apt-get said:\n${lastLines}\n\nThe command by hand is:\n\n  ${byHand}\n`
		);
	}
	return missing;
}

/** @param {string[]} command @param {AbortSignal | undefined} signal */
function runCommand([program = '', ...args], signal) {
	return run(program, args, { signal, cwd: '/' });
}

/** @param {string} root */
function lockDigest(root) {
	return createHash('sha256')
		.update(readFileSync(join(root, 'package-lock.json')))
		.update(`node ${process.versions.modules} ${process.platform} ${process.arch}`)
		.digest('hex');
}

/**
 * True when `node_modules` was made from the present lock file, by this kind of Node.
 * @param {string} root
 */
export function dependenciesAreCurrent(root) {
	try {
		return readFileSync(join(root, 'node_modules', STAMP), 'utf8') === lockDigest(root);
	} catch {
		return false;
	}
}

/**
 * Installs exactly what the lock file lists.
 * @param {string} root @param {{ signal?: AbortSignal }} [options]
 */
export async function installDependencies(root, { signal } = {}) {
	// Under `npm start` npm names its own program, which need not be the first `npm` on the PATH.
	const npm = process.env.npm_execpath;
	const [command, first] = npm ? [process.execPath, [npm]] : ['npm', []];
	const args = [...first, 'ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
	const done = await run(command, args, { cwd: root, signal });
	if (done.code !== 0) {
		throw new Explained(`npm ci failed:\n${done.output.trim().split('\n').slice(-20).join('\n')}`);
	}
	// Last: an interrupted installation leaves no stamp and is done again.
	writeFileSync(join(root, 'node_modules', STAMP), lockDigest(root));
}
