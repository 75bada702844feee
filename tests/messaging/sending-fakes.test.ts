import { once } from 'node:events';
import { createServer } from 'node:http';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import twilio from 'twilio';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { startFakes } from '../../jobs/fakes/fakes';
import { ACCOUNT_SID, AUTH_TOKEN, FROM_NUMBER, openFakes } from './sending-world';

interface Received {
	readonly url: string;
	readonly signature: string;
	readonly fields: Record<string, string>;
}

/** Stands where the product would be told. */
const received: Received[] = [];
const product = createServer((request, response) => {
	let body = '';
	request.on('data', (chunk: Buffer) => (body += chunk.toString('utf8')));
	request.on('end', () => {
		const signature = String(request.headers['x-twilio-signature']);
		received.push({
			url: origin + request.url,
			signature,
			fields: Object.fromEntries(new URLSearchParams(body))
		});
		response.writeHead(204).end();
	});
});
product.listen(0, '127.0.0.1');
await once(product, 'listening');
const address = product.address();
const origin = `http://127.0.0.1:${address !== null && typeof address === 'object' ? address.port : 0}`;
afterAll(() => product.close());

const fakes = await openFakes({ reportSeconds: 0.1, inboundUrl: `${origin}/inbound` });
const client = twilio(ACCOUNT_SID, AUTH_TOKEN);
client.api.baseUrl = fakes.url;
const stranger = twilio(ACCOUNT_SID, 'another-token');
stranger.api.baseUrl = fakes.url;

beforeEach(() => {
	fakes.store.clear();
	received.length = 0;
});

const send = (to: string, body = 'Hello') =>
	client.messages.create({ to, from: FROM_NUMBER, body, statusCallback: `${origin}/status?message=m1` });
/** Each report is a call of its own, so they may overtake one another. */
const reportsOf = (sid: string) =>
	received
		.filter(({ fields }) => fields.MessageSid === sid)
		.sort((a, b) => String(a.fields.MessageStatus).localeCompare(String(b.fields.MessageStatus)));
const statusesOf = (sid: string) => reportsOf(sid).map(({ fields }) => fields.MessageStatus);

describe('the fake SMS service', () => {
	it('refuses a stranger as the hosted one does', async () => {
		const call = stranger.messages.create({ to: '+12025550111', from: FROM_NUMBER, body: 'x' });
		await expect(call).rejects.toMatchObject({ status: 401, code: 20003 });
	});

	it.each([
		['12025550111', 21211],
		['+15005550001', 21211],
		['+15005550004', 21610],
		['+15005550009', 21614]
	])('refuses %s with code %i', async (to, code) => {
		await expect(send(to)).rejects.toMatchObject({ status: 400, code });
	});

	it('lists what was sent, newest first, page after page', async () => {
		for (let index = 0; index < 7; index++) await send('+12025550111', `Text ${index}`);
		await send('+12025550112', 'Another telephone');
		const found = await client.messages.list({ to: '+12025550111', pageSize: 3 });
		expect(found.map(({ body }) => body)).toEqual([6, 5, 4, 3, 2, 1, 0].map((index) => `Text ${index}`));
		expect(found[0]?.dateCreated).toBeInstanceOf(Date);
	});

	it('counts the parts of a text in another script', async () => {
		expect((await send('+12025550111', 'م'.repeat(71))).numSegments).toBe('2');
		expect((await send('+12025550111', 'a'.repeat(160))).numSegments).toBe('1');
	});

	it('reports the delivery later, signed with the account', async () => {
		const { sid } = await send('+12025550111');
		await expect.poll(() => statusesOf(sid), { timeout: 20_000 }).toEqual(['delivered', 'sent']);
		for (const { url, signature, fields } of reportsOf(sid)) {
			expect(url).toBe(`${origin}/status?message=m1`);
			expect(twilio.validateRequest(AUTH_TOKEN, signature, url, fields)).toBe(true);
			expect(twilio.validateRequest('another-token', signature, url, fields)).toBe(false);
		}
	});

	it('reports what a carrier rejects, with its code', async () => {
		const { sid } = await send('+12025550191');
		await expect.poll(() => statusesOf(sid), { timeout: 20_000 }).toEqual(['sent', 'undelivered']);
		expect(reportsOf(sid)[1]?.fields.ErrorCode).toBe('30007');
	});
});

describe("the parents' telephones", () => {
	const page = async (path = '/') => (await fetch(fakes.url + path)).text();

	it('show a text in its own direction, with its link, and nothing that it holds as markup', async () => {
		await send('+12025550111', 'مرحبا <b>x</b> http://127.0.0.1:9/v/abc.');
		const html = await page();
		expect(html).toContain('dir="auto"');
		expect(html).toContain('<a href="http://127.0.0.1:9/v/abc"');
		expect(html).toContain('&lt;b&gt;x&lt;/b&gt;');
		expect(html).not.toContain('<b>x</b>');
	});

	it('let a person answer as the parent, signed like the hosted service', async () => {
		await send('+12025550113', 'Will you come?');
		const body = new URLSearchParams({ from: '+12025550113', body: 'sí, gracias', word: '' });
		const response = await fetch(`${fakes.url}/answer`, { method: 'POST', body, redirect: 'manual' });
		expect(response.status).toBe(303);
		const inbound = received.find(({ url }) => url.endsWith('/inbound'));
		expect(inbound?.fields).toMatchObject({ From: '+12025550113', To: FROM_NUMBER, Body: 'sí, gracias' });
		expect(
			twilio.validateRequest(AUTH_TOKEN, inbound?.signature ?? '', inbound?.url ?? '', inbound?.fields ?? {})
		).toBe(true);
	});
});

describe('the journal', () => {
	it('brings back what was sent when the fakes start again', async () => {
		const folder = mkdtempSync(join(tmpdir(), 'fadewell-fakes-'));
		const settings = {
			host: '127.0.0.1',
			port: 0,
			smtpPort: 0,
			accountSid: ACCOUNT_SID,
			authToken: AUTH_TOKEN,
			fromNumber: FROM_NUMBER,
			inboundUrl: null,
			reportSeconds: 0,
			latencyMilliseconds: 0,
			journal: join(folder, 'fakes.jsonl')
		};
		const first = await startFakes(settings);
		await first.reports.receive('+12025550111', 'Is this normal?');
		await first.close();
		const second = await startFakes(settings);
		expect(second.store.smsesOf('+12025550111').map(({ body }) => body)).toEqual(['Is this normal?']);
		await second.close();
		rmSync(folder, { recursive: true });
	});
});
