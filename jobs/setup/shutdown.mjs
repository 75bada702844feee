import { setTimeout as pause } from 'node:timers/promises';
import { signalQuietly, startTicks } from './processes.mjs';

/** @typedef {{ name: string, pid: number, isRunning: () => boolean, stop: () => Promise<void> }} Stoppable */

/**
 * Keeps what was started and stops it in reverse, once, on Ctrl-C, on SIGTERM or when one part fails.
 * A second signal does not wait any longer.
 */
export class Shutdown {
	/** @type {Stoppable[]} */
	#started = [];
	#controller = new AbortController();
	/** @type {Promise<void> | null} */
	#stopping = null;

	/** Aborted as soon as the person wants to stop: work that takes long ends early. */
	get signal() {
		return this.#controller.signal;
	}

	/** @param {Stoppable} part */
	add(part) {
		this.#started.push(part);
	}

	listen() {
		for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
			process.on(signal, () => {
				if (this.signal.aborted) this.#killAll();
				else this.#ask();
			});
		}
		this.#watchParent();
	}

	#ask() {
		console.log('\nStopping …');
		this.#controller.abort();
	}

	/** Under npm, whoever kills npm itself means us too: nothing may go on running unseen. */
	#watchParent() {
		if (process.env.npm_lifecycle_event === undefined) return;
		const parent = process.ppid;
		const timer = setInterval(() => {
			if (process.ppid === parent || this.signal.aborted) return;
			clearInterval(timer);
			this.#ask();
		}, 1000);
		timer.unref();
	}

	/** @returns {Promise<void>} */
	stopAll() {
		this.#stopping ??= this.#stopInReverse();
		return this.#stopping;
	}

	async #stopInReverse() {
		for (const part of this.#started.toReversed()) {
			const wasRunning = part.isRunning();
			await part.stop();
			if (wasRunning) console.log(`  ${part.name} has stopped`);
		}
	}

	#killAll() {
		for (const part of this.#started) if (part.isRunning()) signalQuietly(-part.pid, 'SIGKILL');
		process.exit(130);
	}
}

/**
 * Ends a process that is not our child: asks, waits, and in the end insists.
 * @param {number} pid @param {number} [graceMs]
 */
export async function endProcess(pid, graceMs = 60_000) {
	const ticks = startTicks(pid);
	if (ticks === null) return;
	const runs = () => startTicks(pid) === ticks;
	signalQuietly(pid, 'SIGTERM');
	const until = performance.now() + graceMs;
	while (runs() && performance.now() < until) await pause(50);
	if (runs()) signalQuietly(pid, 'SIGKILL');
	while (runs()) await pause(50);
}
