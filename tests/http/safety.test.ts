import { describe, expect, test, vi } from 'vitest';
import { startApp } from '../support/app';
import { openTestDatabase } from '../support/database';
import { makeHospital } from '../support/factories/hospital';
import { visitor } from '../support/visitor';

const database = await openTestDatabase();
const app = await startApp(database.url);
/** The same product as it believes to be behind https. */
const secure = await startApp(database.url, { ORIGIN: 'https://fadewell.example.org' });
const gone = new URL(database.url);
gone.pathname = '/there_is_no_such_database';
/** A server whose database is gone. */
const broken = await startApp(gone.href);
const hospital = await makeHospital(database.db);

describe('headers', () => {
	test.each(['/sign-in', '/nowhere', '/people', '/health/live', '/api/v1/places', '/v/no-such-token'])(
		'of %s let nothing be sniffed, framed, kept or found',
		async (path) => {
			const { headers } = await visitor(app).get(path);
			expect(headers.get('x-content-type-options')).toBe('nosniff');
			expect(headers.get('x-frame-options')).toBe('DENY');
			expect(headers.get('referrer-policy')).toBe('same-origin');
			expect(headers.get('cache-control')).toContain('no-store');
			expect(headers.get('x-robots-tag')).toContain('noindex');
			expect(headers.get('content-security-policy')).toMatch(/frame-ancestors 'none'/);
			expect(headers.get('strict-transport-security')).toBeNull();
		}
	);

	test('allow only scripts of our own that carry this answer’s nonce', async () => {
		const [one, two] = [await visitor(app).get('/sign-in'), await visitor(app).get('/sign-in')];
		const policies = [one, two].map(({ headers }) => headers.get('content-security-policy') ?? '');
		const nonces = policies.map((policy) => /script-src 'self' 'nonce-([^']+)'/.exec(policy)?.[1]);
		expect(nonces[0]).toBeDefined();
		expect(nonces[0]).not.toBe(nonces[1]);
		expect(policies[0]).not.toMatch(/script-src[^;]*unsafe/);
		const scripts = [...(await one.text()).matchAll(/<script\b([^>]*)>/g)].map(
			([, attributes]) => attributes
		);
		expect(scripts.length).toBeGreaterThan(0);
		for (const attributes of scripts) expect(attributes).toContain(`nonce="${nonces[0]}"`);
	});

	test('over https add strict transport and a cookie that only this host over https can have', async () => {
		const browser = visitor(secure);
		const response = await browser.signIn(hospital.admin);
		expect(response.headers.get('strict-transport-security')).toContain('max-age=');
		const [cookie] = response.headers.getSetCookie();
		expect(cookie).toMatch(/^__Host-fadewell=/);
		for (const flag of ['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/']) expect(cookie).toContain(flag);
		expect(cookie).not.toContain('Domain');
	});

	test('over plain loopback set the cookie without Secure, otherwise alike', async () => {
		const response = await visitor(app).signIn(hospital.admin);
		const [cookie] = response.headers.getSetCookie();
		expect(cookie).toMatch(/^fadewell=.*HttpOnly.*SameSite=Lax/);
		expect(cookie).not.toContain('Secure');
	});
});

describe('a form from another site', () => {
	const fields = () =>
		new URLSearchParams({ email: hospital.admin.email, password: hospital.admin.password });
	const send = (headers: Record<string, string>, body: BodyInit = fields(), path = '/sign-in') =>
		visitor(app).send(path, { method: 'POST', body, headers });

	test('is refused, whichever way it says or hides where it is from', async () => {
		expect((await send({ origin: 'https://example.com' })).status).toBe(403);
		expect((await send({ origin: 'null' })).status).toBe(403);
		expect((await send({})).status).toBe(403);
		expect((await send({ 'content-type': 'text/plain' }, 'email=a')).status).toBe(403);
		expect(
			(await send({ origin: 'https://example.com', 'content-type': 'application/json' }, '{}')).status
		).toBe(403);
		expect((await send({ origin: 'https://example.com' }, fields(), '/sign-out')).status).toBe(403);
	});

	test('does nothing before it is refused', async () => {
		const browser = visitor(app);
		await browser.signIn(hospital.admin);
		await browser.send('/account?/signOutEverywhere', {
			method: 'POST',
			headers: { origin: 'https://example.com' }
		});
		expect((await browser.get('/account')).status).toBe(200);
	});

	test('is let through from ourselves', async () => {
		expect((await send({ origin: app.origin })).status).toBe(303);
	});
});

/** The log line of a failure that a person was given the number of; it comes through a pipe, maybe after the answer. */
async function logLineOf(response: Response): Promise<{ page: string; line: string }> {
	const page = await response.text();
	const [, errorId] = /Reference number: (?:<strong[^>]*>)?([a-z0-9]{16})/.exec(page) ?? [];
	if (errorId === undefined) throw new Error(`no number in: ${page}`);
	const lineOf = () =>
		broken
			.output()
			.split('\n')
			.find((text) => text.includes(`"errorId":"${errorId}"`));
	return { page, line: (await vi.waitUntil(lineOf, { timeout: 10_000 })) ?? '' };
}

describe('a failure', () => {
	test('gives a number, and a log line with it but without the session or the database’s values', async () => {
		const cookie = 'a-session-that-cannot-be-looked-up';
		const response = await visitor(broken, new Map([['fadewell', cookie]])).get('/people');
		expect(response.status).toBe(500);
		const { page, line } = await logLineOf(response);
		expect(page).not.toMatch(/sql|select|ER_BAD_DB/i);
		expect(line).toContain('ER_BAD_DB_ERROR');
		expect(line).not.toContain(cookie);
		expect(response.headers.get('x-content-type-options')).toBe('nosniff');
	});

	test('of a person at sign-in names nobody in the log', async () => {
		const response = await visitor(broken).signIn({
			email: 'ana.secret@example.org',
			password: 'secret words'
		});
		expect(response.status).toBe(500);
		await logLineOf(response);
		expect(broken.output()).not.toMatch(/ana\.secret|secret words/);
	});

	test('of the database makes the server say that it is not ready, while it is alive', async () => {
		expect((await visitor(broken).get('/health/live')).status).toBe(200);
		expect((await visitor(broken).get('/health/ready')).status).toBe(503);
		expect((await visitor(app).get('/health/ready')).status).toBe(200);
	});
});

describe('the health answer', () => {
	test('counts, names nobody, and is not well without a worker', async () => {
		const response = await visitor(app).get('/api/health');
		expect(response.status).toBe(503);
		expect(await response.json()).toEqual({
			isWell: false,
			workerHeardSecondsAgo: null,
			openFindings: 0,
			messagesDue: 0,
			oldestDueSeconds: 0,
			messagesDead: 0
		});
	});
});

test('an address that is not there has our own page, with a way back', async () => {
	const response = await visitor(app).get('/nowhere');
	expect(response.status).toBe(404);
	const page = await response.text();
	expect(page).toContain('There is no such page.');
	expect(page).toContain('href="/"');
});
