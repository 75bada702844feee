import { once } from 'node:events';
import type { Writable } from 'node:stream';

const FLUSH_AT = 1 << 16;

/** Gathers lines and writes them in pieces, waiting whenever the reader of the output is slower than we are. */
export class Sink {
	private held = '';

	constructor(
		private readonly stream: Writable,
		private readonly beforeWriting: () => void = () => {}
	) {}

	/** Adds a line; call `settle` now and then, or memory grows. */
	line(text: string): void {
		this.held += `${text}\n`;
	}

	/** Writes what was gathered and waits until the stream will take more. */
	async settle(isLast = false): Promise<void> {
		if (this.held.length < FLUSH_AT && !isLast) return;
		const text = this.held;
		this.held = '';
		if (text === '') return;
		this.beforeWriting();
		if (!this.stream.write(text)) await once(this.stream, 'drain');
	}
}
