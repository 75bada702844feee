import { beforeEach, describe, expect, test } from 'vitest';
import { invitations } from '../../src/lib/server/db/schema/staff';
import { startApp } from '../support/app';
import { openTestDatabase } from '../support/database';
import { makeHospital, type Hospital } from '../support/factories/hospital';
import { visitor, type Visitor } from '../support/visitor';

const database = await openTestDatabase();
const { db } = database;
const app = await startApp(database.url);
let hospital: Hospital;
let admin: Visitor;

beforeEach(async () => {
	await database.clean();
	hospital = await makeHospital(db);
	admin = visitor(app);
	await admin.signIn(hospital.admin);
});

const PASSWORD = 'four good new words';
const CHOSEN = { password: PASSWORD, again: PASSWORD };

/** Invites somebody to the east desk and returns the path of the link shown. */
async function inviteNewcomer(email = 'newcomer@example.org'): Promise<string> {
	const response = await admin.post('/people?/invite', {
		name: 'New Comer',
		email,
		roles: `desk@${hospital.east.clinicId}`
	});
	const [, path] = /(\/invitation\/[\w-]{43})/.exec(await response.text()) ?? [];
	if (path === undefined) throw new Error(`No link was shown (${response.status}).`);
	return path;
}

describe('an invitation', () => {
	test('is a link whose token is stored as a hash only, and is not shown again', async () => {
		const path = await inviteNewcomer();
		expect(JSON.stringify(await db.select().from(invitations))).not.toContain(path.split('/').at(-1));
		expect(await (await admin.get('/people')).text()).not.toContain(path);
	});

	test('is not spent by looking, however often, and once by the button', async () => {
		const path = await inviteNewcomer();
		for (let look = 0; look < 5; look++) {
			expect(await (await visitor(app).get(path)).text()).toContain('New Comer');
			expect((await visitor(app).send(path, { method: 'HEAD' })).status).toBe(200);
		}
		const newcomer = visitor(app);
		const accepted = await newcomer.post(path, CHOSEN);
		expect([accepted.status, accepted.headers.get('location')]).toEqual([303, '/']);
		expect((await newcomer.get('/account')).status).toBe(200);
		expect((await visitor(app).post(path, CHOSEN)).status).toBe(410);
		expect((await visitor(app).signIn({ email: 'newcomer@example.org', password: PASSWORD })).status).toBe(
			303
		);
	});

	test('pressed twice at the same moment, is taken up once', async () => {
		const path = await inviteNewcomer();
		const both = await Promise.all([visitor(app).post(path, CHOSEN), visitor(app).post(path, CHOSEN)]);
		expect(both.map(({ status }) => status).sort()).toEqual([303, 410]);
	});

	test('runs out, and is replaced by a newer one', async () => {
		const first = await inviteNewcomer();
		await db.update(invitations).set({ expiresAt: new Date(Date.now() - 1000) });
		expect((await visitor(app).post(first, CHOSEN)).status).toBe(410);
		const [row] = await db.select().from(invitations);
		const again = await admin.post('/people?/inviteAgain', { staffId: row?.staffId ?? '' });
		const [, second] = /(\/invitation\/[\w-]{43})/.exec(await again.text()) ?? [];
		expect(await (await visitor(app).get(first)).text()).toContain('no longer good');
		expect((await visitor(app).post(second ?? '', CHOSEN)).status).toBe(303);
	});

	test('with a short or unrepeated password says so beside the field and gives nothing back', async () => {
		const path = await inviteNewcomer();
		const short = await visitor(app).post(path, { password: 'tooshort', again: 'tooshort' });
		expect(short.status).toBe(422);
		const text = await short.text();
		expect(text).toContain('Choose at least 12 characters');
		expect(text).not.toContain('tooshort');
		const other = await visitor(app).post(path, { password: PASSWORD, again: `${PASSWORD}!` });
		expect(await other.text()).toContain('The two are not the same.');
		expect((await visitor(app).post(path, CHOSEN)).status).toBe(303);
	});

	test('cannot be made for an address that has an account, and keeps what was typed', async () => {
		const response = await admin.post('/people?/invite', {
			name: 'Twice Here',
			email: hospital.east.desk.email,
			roles: 'admin'
		});
		expect(response.status).toBe(422);
		const text = await response.text();
		expect(text).toContain('There is already an account with this address.');
		expect(text).toContain('Twice Here');
	});
});

describe('an administrator', () => {
	test('cannot be the last one to go', async () => {
		const { staffId } = hospital.admin.actor;
		const fields = { staffId, roles: `desk@${hospital.east.clinicId}` };
		const refused = await admin.post('/people?/roles', fields);
		expect(refused.status).toBe(409);
		expect(await refused.text()).toContain('Nobody would be left who can manage people.');
		expect((await admin.post('/people?/disable', { staffId })).status).toBe(409);
	});

	test('sets roles that hold from the next click', async () => {
		const desk = visitor(app);
		await desk.signIn(hospital.east.desk);
		expect((await desk.get('/people')).status).toBe(403);
		await admin.post('/people?/roles', { staffId: hospital.east.desk.actor.staffId, roles: 'admin' });
		expect((await desk.get('/people')).status).toBe(200);
	});

	test('cannot give a role at the wrong kind of site', async () => {
		const { staffId } = hospital.east.desk.actor;
		const fields = { staffId, roles: `desk@${hospital.east.birthSiteId}` };
		expect((await admin.post('/people?/roles', fields)).status).toBe(422);
	});
});
