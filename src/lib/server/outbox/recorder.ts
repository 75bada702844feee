import type { Channel } from '../../domain/messaging/kinds';
import type { Called } from './call';
import { pause } from './pause';
import type { Outbox } from './port';
import { newsOf, recordCalls } from './record';
import { reportCalls } from './senders';

const AT_ONCE = 200;
const GIVE_UP_AFTER = 40;

/** Gathers outcomes for a moment and records them together, one transaction at a time. */
export class Recorder {
	readonly #outbox: Outbox;
	readonly #channel: Channel;
	readonly #onRecorded: () => void;
	#waiting: Called[] = [];
	#underWay: Called[] = [];
	#isRunning = false;
	/** Nobody should call before; set by what the last outcomes told about the provider. */
	pausedUntil: Date | null = null;
	/** The sender had no failures when calls were last granted, so successes are no news. */
	isUnbroken = false;

	constructor(outbox: Outbox, channel: Channel, onRecorded: () => void) {
		this.#outbox = outbox;
		this.#channel = channel;
		this.#onRecorded = onRecorded;
	}

	add(called: Called): void {
		this.#waiting.push(called);
		if (!this.#isRunning) void this.#run();
	}

	get isBusy(): boolean {
		return this.#isRunning;
	}

	/** Outcomes that are not in the database yet: their claims are to be renewed. */
	get unrecorded(): readonly Called[] {
		return [...this.#waiting, ...this.#underWay];
	}

	async #run(): Promise<void> {
		this.#isRunning = true;
		await pause(this.#outbox.settings.gatherMilliseconds);
		while (this.#waiting.length > 0) {
			this.#underWay = this.#waiting.splice(0, AT_ONCE);
			await this.#record(this.#underWay);
			await this.#report(this.#underWay);
			this.#underWay = [];
			this.#onRecorded();
		}
		this.#isRunning = false;
		this.#onRecorded();
	}

	/** The database may be away for a while. Outcomes are worth waiting for; past the lease others will find them out. */
	async #record(batch: readonly Called[]): Promise<void> {
		const { ctx } = this.#outbox;
		for (let attempt = 1; attempt <= GIVE_UP_AFTER; attempt++) {
			try {
				const lost = await recordCalls(this.#outbox, batch);
				if (lost > 0) ctx.log.warn({ lost }, 'outcomes came after the lease; the provider will be asked');
				return;
			} catch (error) {
				ctx.log.error({ err: error, attempt, count: batch.length }, 'outcomes could not be recorded yet');
				await pause(Math.min(100 * 2 ** attempt, 5000));
			}
		}
	}

	async #report(batch: readonly Called[]): Promise<void> {
		const news = newsOf(batch);
		if (this.isUnbroken && news.failures === 0 && !news.pauseSeconds) return;
		this.isUnbroken = false;
		try {
			this.pausedUntil = await reportCalls(this.#outbox, this.#channel, news);
		} catch (error) {
			this.#outbox.ctx.log.error({ err: error }, 'the state of the sender could not be saved');
		}
	}
}
