import { OPENS_AFTER } from '../../domain/messaging/breaker';
import type { Channel } from '../../domain/messaging/kinds';
import { makeCall } from './call';
import { Lease } from './lease';
import { pause } from './pause';
import type { Held, Outbox } from './port';
import { newsOf } from './record';
import { Recorder } from './recorder';
import { renewLease } from './renew';
import { giveBack, takeDue } from './take';

interface InHand {
	readonly held: Held;
	readonly lease: Lease;
}

const AFTER_TROUBLE_MILLISECONDS = 1000;
const CONTENDED_MILLISECONDS = 20;

/**
 * One worker's way of sending over one channel: takes due messages in batches, keeps a fixed number of calls going, and
 * records outcomes together.
 */
export class Lane {
	readonly #outbox: Outbox;
	readonly #channel: Channel;
	readonly #recorder: Recorder;
	readonly #leases = new Map<string, Lease>();
	readonly #calling = new Set<Held>();
	#ready: InHand[] = [];
	#isStopped = false;
	#claims = 0;
	/** Since the last outcomes were recorded; the next calls wait for what all workers make of it. */
	#failuresInARow = 0;
	#wake: (() => void) | null = null;

	constructor(outbox: Outbox, channel: Channel) {
		this.#outbox = outbox;
		this.#channel = channel;
		this.#recorder = new Recorder(outbox, channel, () => this.#recorded());
	}

	/** Takes no more messages; what was not begun is given back, calls under way end and are recorded. */
	stop(): void {
		this.#isStopped = true;
		this.poke();
	}

	/** Something may have become due, or come free. */
	poke(): void {
		this.#wake?.();
		this.#wake = null;
	}

	/** Sends what is due until nothing is, and returns the number of messages looked at. For tests and one-off runs. */
	async drain(): Promise<number> {
		return this.#whileRenewing(async () => {
			let looked = 0;
			for (let isDone = false; !isDone;) {
				const { count, isContended } = await this.#take();
				looked += count;
				await this.#untilIdle();
				isDone = count === 0 && !isContended;
				if (isContended) await pause(CONTENDED_MILLISECONDS);
			}
			return looked;
		});
	}

	/** Sends what is due, now and at every `poke`, until `stop`; then ends with every outcome recorded. */
	async serve(): Promise<void> {
		await this.#whileRenewing(async () => {
			while (!this.#isStopped) {
				const hasRoom = this.#ready.length < this.#outbox.settings.concurrency;
				const count = hasRoom ? await this.#takeOrPause() : 0;
				if (this.#recorder.pausedUntil !== null) await this.#giveBackReady();
				if (count === 0 && !this.#isStopped) await this.#poked();
			}
			await this.#giveBackReady();
			await this.#untilIdle();
		});
	}

	async #untilIdle(): Promise<void> {
		while (this.#ready.length > 0 || this.#calling.size > 0 || this.#recorder.isBusy) {
			if (this.#recorder.pausedUntil !== null && this.#ready.length > 0) await this.#giveBackReady();
			else await this.#poked();
		}
	}

	#poked(): Promise<void> {
		return new Promise((resolve) => (this.#wake = resolve));
	}

	/** The database may be away: the loop outlives it. */
	async #takeOrPause(): Promise<number> {
		try {
			return (await this.#take()).count;
		} catch (error) {
			this.#outbox.ctx.log.error({ err: error, channel: this.#channel }, 'no messages could be taken');
			await pause(AFTER_TROUBLE_MILLISECONDS);
			return 0;
		}
	}

	async #take(): Promise<{ count: number; isContended: boolean }> {
		const { settings, workerId, ctx } = this.#outbox;
		const { pausedUntil } = this.#recorder;
		if (pausedUntil !== null && pausedUntil > ctx.clock.now()) return { count: 0, isContended: false };
		this.#recorder.pausedUntil = null;
		const lease = new Lease(`${workerId}/${this.#channel}${++this.#claims}`, settings.leaseSeconds);
		const taken = await takeDue(this.#outbox, this.#channel, settings.batch, lease.token);
		const { looked: count, held, isContended } = taken;
		if (held.length > 0) {
			this.#leases.set(lease.token, lease);
			this.#recorder.isUnbroken = taken.isUnbroken;
		}
		this.#ready.push(...held.map((one) => ({ held: one, lease })));
		this.#call();
		return { count, isContended };
	}

	#call(): void {
		const { concurrency, callSeconds } = this.#outbox.settings;
		while (this.#calling.size < concurrency && this.#mayCall()) {
			const next = this.#ready.shift();
			if (next === undefined) return;
			// A call must end within its lease: past it, somebody else may be asking the provider about it already.
			if (next.lease.secondsLeft() > callSeconds + 2) this.#begin(next.held);
			else this.#outbox.ctx.log.warn({ messageId: next.held.row.id }, 'not called: the lease ran out');
		}
	}

	#mayCall(): boolean {
		return this.#failuresInARow < OPENS_AFTER && this.#recorder.pausedUntil === null;
	}

	#recorded(): void {
		this.#failuresInARow = 0;
		this.#call();
		this.poke();
	}

	#begin(held: Held): void {
		this.#calling.add(held);
		void makeCall(this.#outbox, held).then((called) => {
			const { failures, pauseSeconds } = newsOf([called]);
			this.#failuresInARow = pauseSeconds ? OPENS_AFTER : failures > 0 ? this.#failuresInARow + 1 : 0;
			this.#recorder.add(called);
			this.#calling.delete(held);
			this.#call();
			if (this.#ready.length < this.#outbox.settings.concurrency) this.poke();
		});
	}

	async #giveBackReady(): Promise<void> {
		const waiting = this.#ready.map(({ held }) => held);
		this.#ready = [];
		for (const token of new Set(waiting.map((held) => held.token))) {
			try {
				await giveBack(
					this.#outbox,
					waiting.filter((held) => held.token === token)
				);
			} catch (error) {
				// They are found when their lease ends.
				this.#outbox.ctx.log.error({ err: error }, 'messages could not be given back');
			}
		}
	}

	async #whileRenewing<T>(work: () => Promise<T>): Promise<T> {
		const timer = setInterval(() => void this.#renewAll(), (this.#outbox.settings.leaseSeconds * 1000) / 3);
		try {
			return await work();
		} finally {
			clearInterval(timer);
		}
	}

	async #renewAll(): Promise<void> {
		const unrecorded = this.#recorder.unrecorded.map(({ held }) => held);
		const all = [...this.#ready.map(({ held }) => held), ...this.#calling, ...unrecorded];
		for (const [token, lease] of this.#leases) {
			const ids = all.filter((held) => held.token === token).map(({ row }) => row.id);
			if (ids.length === 0) this.#leases.delete(token);
			else await this.#renew(lease, ids);
		}
	}

	async #renew(lease: Lease, ids: readonly string[]): Promise<void> {
		try {
			const lost = await renewLease(this.#outbox.ctx.db, lease, ids);
			this.#ready = this.#ready.filter(({ held }) => !lost.has(held.row.id));
		} catch (error) {
			this.#outbox.ctx.log.warn({ err: error }, 'a lease could not be renewed');
		}
	}
}
