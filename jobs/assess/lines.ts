import { StringDecoder } from 'node:string_decoder';

/**
 * Cuts a stream of bytes into lines, a batch for each piece that arrives, so that the caller works without waiting
 * inside a batch. A mark of byte order at the very start and a carriage return at the end of a line are dropped.
 */
export async function* lineBatches(
	chunks: AsyncIterable<Uint8Array>
): AsyncGenerator<{ lines: string[]; bytes: number }> {
	const decoder = new StringDecoder('utf8');
	let rest = '';
	let isFirst = true;
	for await (const chunk of chunks) {
		let text = rest + decoder.write(Buffer.from(chunk.buffer, chunk.byteOffset, chunk.byteLength));
		if (isFirst && text.charCodeAt(0) === 0xfeff) text = text.slice(1);
		isFirst = isFirst && text === '';
		const lines: string[] = [];
		let from = 0;
		for (let to = text.indexOf('\n'); to !== -1; to = text.indexOf('\n', from)) {
			lines.push(text.slice(from, text.charCodeAt(to - 1) === 13 ? to - 1 : to));
			from = to + 1;
		}
		rest = text.slice(from);
		yield { lines, bytes: chunk.byteLength };
	}
	rest += decoder.end();
	if (rest !== '') yield { lines: [rest.endsWith('\r') ? rest.slice(0, -1) : rest], bytes: 0 };
}
