import { spawn } from 'node:child_process';
import { closeSync, openSync, readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

/**
 * @typedef {object} Service A long-running child of the start command or of a test.
 * @property {string} name
 * @property {number} pid
 * @property {Promise<string>} ended Resolves, never rejects, with how it ended: "exit code 1", "signal SIGKILL".
 * @property {() => boolean} isRunning
 * @property {(graceMs?: number) => Promise<void>} stop SIGTERM, and SIGKILL when the grace is over.
 */

/**
 * Starts a long-running child in a process group of its own, so that Ctrl-C in the terminal reaches only us and we
 * stop the children in our order. With `sharesGroup` it stays in ours and cannot outlive a group that is killed: for
 * tests. Its output goes to `logFile`.
 * @param {{ name: string, command: string, args: string[], env?: NodeJS.ProcessEnv, cwd?: string, logFile: string, sharesGroup?: boolean }} options
 * @returns {Promise<Service>}
 * @throws Error when the command cannot be started at all.
 */
export async function startService({ name, command, args, env, cwd, logFile, sharesGroup = false }) {
	const log = openSync(logFile, 'a', 0o600);
	const child = spawn(command, args, { env, cwd, detached: !sharesGroup, stdio: ['ignore', log, log] });
	closeSync(log);
	let running = true;
	/** @type {Promise<string>} */
	const ended = new Promise((resolve) => {
		const finish = (/** @type {string} */ how) => {
			running = false;
			resolve(how);
		};
		child.once('error', (error) => finish(error.message));
		child.once('exit', (code, signal) => finish(signal ? `signal ${signal}` : `exit code ${code}`));
	});
	if (child.pid === undefined) throw new Error(`${name} could not be started: ${await ended}`);
	const pid = child.pid;
	return {
		name,
		pid,
		ended,
		isRunning: () => running,
		stop: async (graceMs = 30_000) => {
			if (!running) return;
			signalQuietly(pid, 'SIGTERM');
			const inTime = await Promise.race([ended.then(() => true), pause(graceMs, false, { ref: false })]);
			if (inTime) return;
			signalQuietly(sharesGroup ? pid : -pid, 'SIGKILL');
			await ended;
		}
	};
}

/** @param {number} pid @param {NodeJS.Signals} signal */
export function signalQuietly(pid, signal) {
	try {
		process.kill(pid, signal);
	} catch {
		// It ended in the meantime, which is what was wanted.
	}
}

/**
 * Runs a command to its end, in a process group of its own: Ctrl-C in the terminal reaches only us.
 * @param {string} command @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, cwd?: string, input?: string, signal?: AbortSignal, onOutput?: (text: string) => void }} [options]
 *   `onOutput` is given both streams as they come; `signal` ends the command and everything it started.
 * @returns {Promise<{ code: number, output: string }>} `code` is 127 when the command does not exist and 128 after a signal.
 */
export function run(command, args, { env, cwd, input, signal, onOutput } = {}) {
	return new Promise((resolve) => {
		const child = spawn(command, args, { env, cwd, detached: true, stdio: ['pipe', 'pipe', 'pipe'] });
		const end = () => child.pid !== undefined && signalQuietly(-child.pid, 'SIGTERM');
		signal?.addEventListener('abort', end, { once: true });
		const settle = (/** @type {number} */ code, /** @type {string} */ text) => {
			signal?.removeEventListener('abort', end);
			resolve({ code, output: text });
		};
		let output = '';
		const take = (/** @type {Buffer} */ chunk) => {
			const text = chunk.toString('utf8');
			output += text;
			onOutput?.(text);
		};
		child.stdout.on('data', take);
		child.stderr.on('data', take);
		child.once('error', (error) => settle(127, error.message));
		child.once('close', (code) => settle(code ?? 128, output));
		child.stdin.on('error', () => {
			// The command ended without reading its input; its exit code says why.
		});
		child.stdin.end(input ?? '');
	});
}

/**
 * The last lines of a log, for a message to the person.
 * @param {string} file @param {number} [count] @returns {string}
 */
export function tail(file, count = 15) {
	try {
		return readFileSync(file, 'utf8').trimEnd().split('\n').slice(-count).join('\n');
	} catch {
		return '';
	}
}

/**
 * When a process was started, in the kernel's ticks since boot; null when there is no such process. Together with
 * the id it names one process for good, where an id alone may be given to another later.
 * @param {number} pid @returns {number | null}
 */
export function startTicks(pid) {
	try {
		const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
		const afterName = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
		const [state] = afterName;
		if (state === 'Z' || state === 'X') return null;
		return Number(afterName[19]);
	} catch {
		return null;
	}
}

/**
 * Waits until `check` says yes.
 * @param {() => boolean | Promise<boolean>} check
 * @param {{ timeoutMs: number, everyMs?: number, giveUp?: () => string | null }} options `giveUp` ends the wait early
 *   with its reason.
 * @returns {Promise<string | null>} null when ready, otherwise why not.
 */
export async function waitUntil(check, { timeoutMs, everyMs = 100, giveUp }) {
	const until = performance.now() + timeoutMs;
	for (;;) {
		const reason = giveUp?.() ?? null;
		if (reason !== null) return reason;
		if (await check()) return null;
		if (performance.now() > until) return `it was not ready after ${Math.round(timeoutMs / 1000)} seconds`;
		await pause(everyMs);
	}
}
