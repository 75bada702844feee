import { isAscii } from 'node:buffer';
import { UnreadableInput } from './unreadable-input';

const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

/** A newborn with a hundred measurements takes some 12 KB; a longer line is a file of another form. */
export const LONGEST_LINE_BYTES = 1 << 20;

/**
 * Cuts a stream of bytes into lines, a batch for each piece that arrives, so that the caller works without waiting
 * inside a batch. A mark of byte order at the very start and a carriage return at the end of a line are dropped.
 * Throws `UnreadableInput` on a line that does not end, so that memory stays flat.
 */
export async function* lineBatches(
	chunks: AsyncIterable<Uint8Array>
): AsyncGenerator<{ lines: string[]; bytes: number }> {
	const cutter = new LineCutter();
	for await (const chunk of chunks) {
		yield {
			lines: cutter.cut(Buffer.from(chunk.buffer, chunk.byteOffset, chunk.byteLength)),
			bytes: chunk.byteLength
		};
	}
	yield { lines: cutter.end(), bytes: 0 };
}

/** Each line becomes a string of its own: one string of a whole piece, cut afterwards, took ten times as long. */
class LineCutter {
	private held: Buffer[] = [];
	private heldBytes = 0;
	private readLines = 0;

	cut(piece: Buffer): string[] {
		const lines: string[] = [];
		let from = 0;
		let to = piece.indexOf(LINE_FEED);
		if (to !== -1 && this.heldBytes > 0) {
			this.hold(piece.subarray(0, to));
			lines.push(this.takeHeld());
			from = to + 1;
			to = piece.indexOf(LINE_FEED, from);
		}
		const encoding = isAscii(piece) ? 'latin1' : 'utf8';
		for (; to !== -1; to = piece.indexOf(LINE_FEED, from)) {
			lines.push(this.read(piece, encoding, from, to));
			from = to + 1;
		}
		if (from < piece.length) this.hold(piece.subarray(from));
		return lines;
	}

	end(): string[] {
		return this.heldBytes > 0 ? [this.takeHeld()] : [];
	}

	private hold(bytes: Buffer): void {
		this.held.push(bytes);
		this.heldBytes += bytes.length;
		if (this.heldBytes > LONGEST_LINE_BYTES) {
			throw new UnreadableInput(
				`line ${this.readLines + 1} is longer than ${LONGEST_LINE_BYTES.toLocaleString('en')} bytes. Write one newborn a line.`
			);
		}
	}

	private takeHeld(): string {
		const line = Buffer.concat(this.held);
		this.held = [];
		this.heldBytes = 0;
		return this.read(line, 'utf8', 0, line.length);
	}

	private read(bytes: Buffer, encoding: 'latin1' | 'utf8', from: number, to: number): string {
		const text = bytes.toString(encoding, from, bytes[to - 1] === CARRIAGE_RETURN ? to - 1 : to);
		return this.readLines++ === 0 && text.charCodeAt(0) === 0xfeff ? text.slice(1) : text;
	}
}
