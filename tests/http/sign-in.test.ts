import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { hashToken } from '../../src/lib/server/repos/sessions';
import { accessRecords, sessions, staff } from '../../src/lib/server/db/schema/staff';
import { rateLimits } from '../../src/lib/server/db/schema/rate-limit';
import { startApp } from '../support/app';
import { openTestDatabase } from '../support/database';
import { makeHospital, type Hospital } from '../support/factories/hospital';
import { visitor } from '../support/visitor';

const database = await openTestDatabase();
const { db } = database;
const app = await startApp(database.url);
/** A second web process over the same database. */
const twin = await startApp(database.url, { ORIGIN: app.origin });
let hospital: Hospital;

beforeEach(async () => {
	await database.clean();
	hospital = await makeHospital(db);
});

const isSignedIn = async (browser: ReturnType<typeof visitor>): Promise<boolean> =>
	(await browser.get('/account')).status === 200;

/** The sentence above the form. */
const sentence = async (response: Response): Promise<string> =>
	/role="alert"[^>]*>.*?<div class="min-w-0[^>]*>(.*?)<\/div>/s
		.exec(await response.text())?.[1]
		?.replace(/<[^>]*>/g, '')
		.trim() ?? '';

describe('signing in', () => {
	test('leads to the first screen of the role, under a new session whose id is kept as a hash', async () => {
		const browser = visitor(app);
		const response = await browser.signIn(hospital.admin);
		expect(response.status).toBe(303);
		expect(response.headers.get('location')).toBe('/');
		expect((await browser.get('/')).headers.get('location')).toBe('/people');
		const cookie = browser.jar.get('fadewell') ?? '';
		const rows = await db.select().from(sessions);
		expect(rows.map(({ id }) => id)).toEqual([hashToken(cookie)]);
		expect(JSON.stringify(rows)).not.toContain(cookie);
	});

	test('goes on to the page that was asked for, and never to another site', async () => {
		const browser = visitor(app);
		const turnedAway = await browser.get('/operations?x=1');
		expect(turnedAway.headers.get('location')).toBe('/sign-in?next=%2Foperations%3Fx%3D1');
		const { email, password } = hospital.admin;
		const back = await browser.post('/sign-in?next=%2Foperations%3Fx%3D1', { email, password });
		expect(back.headers.get('location')).toBe('/operations?x=1');
		for (const next of ['https://example.com/', '//example.com', '/\\example.com', 'javascript:alert(1)']) {
			const answer = await visitor(app).post(`/sign-in?next=${encodeURIComponent(next)}`, {
				email,
				password
			});
			expect(answer.headers.get('location')).toBe('/');
		}
	});

	test('takes the place of the session that the browser came with', async () => {
		const browser = visitor(app);
		await browser.signIn(hospital.admin);
		const first = browser.jar.get('fadewell') ?? '';
		// The sign-in page turns signed-in people away, but a form that was left open can still be sent.
		await browser.signIn(hospital.east.desk);
		expect(browser.jar.get('fadewell')).not.toBe(first);
		expect(await isSignedIn(visitor(app, new Map([['fadewell', first]])))).toBe(false);
	});

	test('never accepts an id that it did not give out', async () => {
		const browser = visitor(app, new Map([['fadewell', 'chosen-by-somebody-else']]));
		await browser.signIn(hospital.admin);
		expect(browser.jar.get('fadewell')).not.toBe('chosen-by-somebody-else');
	});

	test('says the same for a wrong password, an unknown and a disabled account, and gives no password back', async () => {
		await db.update(staff).set({ isDisabled: true }).where(eq(staff.email, hospital.west.desk.email));
		const tries = [
			{ email: hospital.admin.email, password: 'a wrong password' },
			{ email: 'nobody@example.org', password: 'a wrong password' },
			hospital.west.desk
		];
		const sentences: string[] = [];
		for (const { email, password } of tries) {
			const response = await visitor(app).post('/sign-in', { email, password });
			expect(response.status).toBe(401);
			const page = response.clone();
			sentences.push(await sentence(response));
			expect(await page.text()).not.toContain(password);
		}
		expect(new Set(sentences)).toEqual(
			new Set(['The e-mail address and the password do not belong together.'])
		);
	});

	test('is on record, refusals too', async () => {
		await visitor(app).post('/sign-in', { email: hospital.admin.email, password: 'wrong' });
		await visitor(app).signIn(hospital.admin);
		const lines = await db.select().from(accessRecords).orderBy(accessRecords.at);
		expect(lines.map(({ action, staffId }) => [action, staffId])).toEqual([
			['session.refused', hospital.admin.actor.staffId],
			['session.started', hospital.admin.actor.staffId]
		]);
	});
});

describe('the rate limit', () => {
	const { email, password } = { email: 'target@example.org', password: 'a wrong password' };

	test('closes one account after 8 wrong tries in every web process, also for the right password', async () => {
		await db.update(staff).set({ email }).where(eq(staff.id, hospital.admin.actor.staffId));
		for (let tries = 0; tries < 8; tries++) {
			const where = tries % 2 === 0 ? app : twin;
			expect((await visitor(where).post('/sign-in', { email, password })).status).toBe(401);
		}
		const right = { email, password: hospital.admin.password };
		const refused = await visitor(twin).signIn(right);
		expect(refused.status).toBe(429);
		expect(await sentence(refused)).toBe('Too many tries. Please wait 15 minutes and try again.');
		expect((await visitor(app).signIn(hospital.east.desk)).status).toBe(303);
		await db.update(rateLimits).set({ expire: Date.now() - 1 });
		expect((await visitor(app).signIn(right)).status).toBe(303);
	});

	test('lets no more through when all come at once', async () => {
		const all = await Promise.all(
			Array.from({ length: 20 }, (_, i) => visitor(i % 2 ? app : twin).post('/sign-in', { email, password }))
		);
		expect(all.filter(({ status }) => status === 401)).toHaveLength(8);
		expect(all.filter(({ status }) => status === 429)).toHaveLength(12);
	});

	test('closes an address that tries many accounts', async () => {
		const tries = Array.from({ length: 81 }, (_, i) => `account-${i}@example.org`);
		const statuses: number[] = [];
		for (const name of tries)
			statuses.push((await visitor(app).post('/sign-in', { email: name, password })).status);
		expect(statuses.slice(0, 80).every((status) => status === 401)).toBe(true);
		expect(statuses[80]).toBe(429);
	});

	test('keeps no address and no account in readable form', async () => {
		await visitor(app).post('/sign-in', { email, password });
		const rows = await db.select().from(rateLimits);
		expect(rows.length).toBeGreaterThan(0);
		expect(JSON.stringify(rows)).not.toMatch(/127\.0\.0\.1|target/);
	});
});

describe('a session ends', () => {
	test('when somebody signs out, and the cookie goes', async () => {
		const browser = visitor(app);
		await browser.signIn(hospital.admin);
		const cookie = browser.jar.get('fadewell') ?? '';
		const out = await browser.post('/sign-out');
		expect(out.headers.get('location')).toBe('/sign-in');
		expect(browser.jar.has('fadewell')).toBe(false);
		expect(await isSignedIn(visitor(app, new Map([['fadewell', cookie]])))).toBe(false);
	});

	test('on every device with "sign out everywhere"', async () => {
		const [here, there] = [visitor(app), visitor(twin)];
		await here.signIn(hospital.admin);
		await there.signIn(hospital.admin);
		await here.post('/account?/signOutEverywhere');
		expect([await isSignedIn(here), await isSignedIn(there)]).toEqual([false, false]);
	});

	test('when the account is disabled by an administrator, at once', async () => {
		const [admin, desk] = [visitor(app), visitor(twin)];
		await admin.signIn(hospital.admin);
		await desk.signIn(hospital.east.desk);
		expect(await isSignedIn(desk)).toBe(true);
		await admin.post('/people?/disable', { staffId: hospital.east.desk.actor.staffId });
		expect(await isSignedIn(desk)).toBe(false);
	});

	test('when it was not used for its idle time', async () => {
		const browser = visitor(app);
		await browser.signIn(hospital.admin);
		await db.update(sessions).set({ expiresAt: new Date(Date.now() - 2000) });
		expect(await isSignedIn(browser)).toBe(false);
		expect(await db.select().from(sessions)).toEqual([]);
	});

	test('12 hours after sign-in, however busy it is', async () => {
		const browser = visitor(app);
		await browser.signIn(hospital.admin);
		// Used a moment ago, begun 11 hours and 59 minutes ago: it is not moved on past the 12 hours.
		const startedAt = new Date(Date.now() - (12 * 60 - 1) * 60_000);
		await db.update(sessions).set({ startedAt, expiresAt: new Date(Date.now() + 30_000) });
		expect(await isSignedIn(browser)).toBe(true);
		const [row] = await db.select().from(sessions);
		expect(Math.abs((row?.expiresAt.getTime() ?? 0) - (startedAt.getTime() + 12 * 3_600_000))).toBeLessThan(
			1500
		);
	});

	test('on the other devices when the password changes, and here it gets a new id', async () => {
		const [here, there] = [visitor(app), visitor(twin)];
		await here.signIn(hospital.admin);
		await there.signIn(hospital.admin);
		const before = here.jar.get('fadewell');
		const next = 'four other good words';
		const fields = { current: hospital.admin.password, password: next, again: next };
		expect((await here.post('/account?/password', fields)).status).toBe(200);
		expect(here.jar.get('fadewell')).not.toBe(before);
		expect([await isSignedIn(here), await isSignedIn(there)]).toEqual([true, false]);
		expect((await visitor(app).signIn(hospital.admin)).status).toBe(401);
		expect((await visitor(app).signIn({ ...hospital.admin, password: next })).status).toBe(303);
	});
});
