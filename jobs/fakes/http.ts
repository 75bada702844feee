import type { IncomingMessage, ServerResponse } from 'node:http';

const LONGEST_BODY = 1_000_000;

/** @throws when the body is longer than a megabyte. */
export async function readBody(request: IncomingMessage): Promise<string> {
	const chunks: Buffer[] = [];
	let length = 0;
	for await (const chunk of request) {
		const bytes = Buffer.from(chunk);
		length += bytes.length;
		if (length > LONGEST_BODY) throw new Error('the body is too long');
		chunks.push(bytes);
	}
	return Buffer.concat(chunks).toString('utf8');
}

export async function readForm(request: IncomingMessage): Promise<URLSearchParams> {
	return new URLSearchParams(await readBody(request));
}

export function sendJson(
	response: ServerResponse,
	status: number,
	body: unknown,
	headers: Record<string, string> = {}
): void {
	const bytes = Buffer.from(JSON.stringify(body));
	response.writeHead(status, {
		'content-type': 'application/json',
		'content-length': bytes.length,
		...headers
	});
	response.end(bytes);
}

export function sendText(
	response: ServerResponse,
	status: number,
	type: string,
	body: string | Buffer
): void {
	response.writeHead(status, { 'content-type': type, 'cache-control': 'no-store' });
	response.end(body);
}

export const after = (seconds: number): Promise<void> =>
	new Promise((resolve) => setTimeout(resolve, seconds * 1000));
