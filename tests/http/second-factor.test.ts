import { base32 } from 'oslo/encoding';
import { generateHOTP } from 'oslo/otp';
import { beforeEach, describe, expect, test } from 'vitest';
import { staff } from '../../src/lib/server/db/schema/staff';
import { startApp } from '../support/app';
import { openTestDatabase } from '../support/database';
import { makeHospital, type Hospital } from '../support/factories/hospital';
import { visitor, type Visitor } from '../support/visitor';

const database = await openTestDatabase();
const { db } = database;
const app = await startApp(database.url);
let hospital: Hospital;

beforeEach(async () => {
	await database.clean();
	hospital = await makeHospital(db);
});

/**
 * What an authenticator shows now, or so many steps of 30 seconds from now. The step before and after are good too,
 * so that a test whose step ends under it still holds.
 */
const code = (secret: string, steps = 0): Promise<string> =>
	generateHOTP(base32.decode(secret, { strict: false }), Math.floor(Date.now() / 30_000) + steps);

/** Switches the second factor on as a person would, and returns the secret in the authenticator. */
async function switchOn(browser: Visitor): Promise<string> {
	const offered = await (await browser.post('/account?/prepareFactor')).text();
	const [, secret] = /<code[^>]*>([A-Z2-7]{32})<\/code>/.exec(offered) ?? [];
	const [, sealed] = /name="sealed" value="([\w-]+)"/.exec(offered) ?? [];
	if (secret === undefined || sealed === undefined) throw new Error('No second factor was offered.');
	const on = await browser.post('/account?/switchOnFactor', { sealed, code: await code(secret) });
	expect(on.status).toBe(200);
	return secret;
}

describe('the second factor', () => {
	test('is kept sealed, and asked for from the next sign-in on', async () => {
		const here = visitor(app);
		await here.signIn(hospital.admin);
		const secret = await switchOn(here);
		expect(JSON.stringify(await db.select().from(staff))).not.toContain(secret);

		const there = visitor(app);
		const half = await there.signIn(hospital.admin);
		expect(half.headers.get('location')).toBe('/sign-in/code?next=%2F');
		expect((await there.get('/account')).status).toBe(303);
		const halfId = there.jar.get('fadewell');
		expect((await there.post('/sign-in/code', { code: '000000' })).status).toBe(401);
		const through = await there.post('/sign-in/code', { code: await code(secret, 1) });
		expect(through.status).toBe(303);
		expect(there.jar.get('fadewell')).not.toBe(halfId);
		expect((await there.get('/account')).status).toBe(200);
		expect((await visitor(app, new Map([['fadewell', halfId ?? '']])).get('/account')).status).toBe(303);
	});

	test('takes each code once', async () => {
		const here = visitor(app);
		await here.signIn(hospital.admin);
		const secret = await switchOn(here);
		const [one, two] = [visitor(app), visitor(app)];
		await one.signIn(hospital.admin);
		await two.signIn(hospital.admin);
		const now = await code(secret, 1);
		const both = await Promise.all([one, two].map((browser) => browser.post('/sign-in/code', { code: now })));
		expect(both.map(({ status }) => status).sort()).toEqual([303, 401]);
	});

	test('closes after 5 wrong codes', async () => {
		const here = visitor(app);
		await here.signIn(hospital.admin);
		const secret = await switchOn(here);
		const thief = visitor(app);
		await thief.signIn(hospital.admin);
		for (let tries = 0; tries < 5; tries++) {
			expect((await thief.post('/sign-in/code', { code: '123456' })).status).toBe(401);
		}
		expect((await thief.post('/sign-in/code', { code: await code(secret, 1) })).status).toBe(429);
	});

	test('goes off with the password, and an administrator can remove it for somebody', async () => {
		const desk = visitor(app);
		await desk.signIn(hospital.east.desk);
		await switchOn(desk);
		expect((await desk.post('/account?/switchOffFactor', { current: 'wrong' })).status).toBe(422);
		expect(
			(await desk.post('/account?/switchOffFactor', { current: hospital.east.desk.password })).status
		).toBe(200);
		await switchOn(desk);
		const admin = visitor(app);
		await admin.signIn(hospital.admin);
		await admin.post('/people?/resetFactor', { staffId: hospital.east.desk.actor.staffId });
		expect((await visitor(app).signIn(hospital.east.desk)).headers.get('location')).toBe('/');
	});
});
