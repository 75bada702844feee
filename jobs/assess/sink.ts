import { once } from 'node:events';
import type { Writable } from 'node:stream';

const PIECE_BYTES = 1 << 16;
const MOST_BYTES_A_UNIT = 3;
const LINE_FEED = 10;

/**
 * Gathers lines and writes them in pieces, waiting whenever the reader of the output is slower than we are.
 * Lines go into bytes one by one: one letter beyond Latin-1 in a long text would make all of it twice as wide.
 */
export class Sink {
	private piece = Buffer.allocUnsafe(PIECE_BYTES);
	private used = 0;
	private full: Buffer[] = [];

	constructor(
		private readonly stream: Writable,
		private readonly beforeWriting: () => void = () => {}
	) {}

	/** Adds a line; call `settle` now and then, or memory grows. */
	line(text: string): void {
		const mostBytes = text.length * MOST_BYTES_A_UNIT + 1;
		if (this.used + mostBytes > this.piece.length) this.turn(mostBytes);
		this.used += this.piece.write(text, this.used);
		this.piece[this.used++] = LINE_FEED;
	}

	/** Writes what was gathered and waits until the stream will take more. */
	async settle(): Promise<void> {
		this.turn(0);
		if (this.full.length === 0) return;
		const pieces = this.full;
		this.full = [];
		this.beforeWriting();
		for (const piece of pieces) if (!this.stream.write(piece)) await once(this.stream, 'drain');
	}

	/** Puts what is held aside for writing; the rest of the piece is kept in use unless it is too short. */
	private turn(mostBytes: number): void {
		if (this.used > 0) this.full.push(this.piece.subarray(0, this.used));
		const left = this.piece.length - this.used;
		this.piece =
			left >= Math.max(mostBytes, PIECE_BYTES / 4)
				? this.piece.subarray(this.used)
				: Buffer.allocUnsafe(Math.max(mostBytes, PIECE_BYTES));
		this.used = 0;
	}
}
