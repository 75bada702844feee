import { beforeAll, describe, expect, test } from 'vitest';
import type { StaffActor } from '../../src/lib/domain/access/roles';
import { workers } from '../../src/lib/server/db/schema/messaging';
import { decideAccess, ROUTE_ACCESS, type Need } from '../../src/lib/server/auth/route-access';
import { sessionCookieName, startSession } from '../../src/lib/server/auth/session';
import { startApp } from '../support/app';
import { testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { makeHospital } from '../support/factories/hospital';
import { addressOf, findRoutes } from '../support/routes';
import { visitor, type Visitor } from '../support/visitor';

/** Who asks. `nobody` has no session; the others work on the east side. */
const WHO = ['nobody', 'nurse', 'desk', 'pediatrician', 'admin'] as const;
type Who = (typeof WHO)[number];

const database = await openTestDatabase();
const app = await startApp(database.url);
const hospital = await makeHospital(database.db);
const visitors = new Map<Who, Visitor>();

const params = (side: 'east' | 'west'): Record<string, string> => ({
	followUpId: hospital[side].followUp.followUpId,
	siteId: hospital[side].clinicId,
	token: 'there-is-no-such-token',
	kind: 'visit-booked',
	channel: 'sms',
	language: 'en',
	checkInId: 'thereisnosuchone',
	entryId: 'thereisnosuchone'
});
/** Routes whose record may be one of the other side. */
const hasRecord = (id: string): boolean => /\[(followUpId|siteId)\]/.test(id);

const actorOf = (who: Who): StaffActor | null => {
	if (who === 'nobody') return null;
	return who === 'admin' ? hospital.admin.actor : hospital.east[who].actor;
};
const ask = (who: Who): Visitor => {
	const found = visitors.get(who);
	if (found === undefined) throw new Error(`No visitor for ${who}.`);
	return found;
};

beforeAll(async () => {
	const ctx = testContext(database);
	// A worker that is heard from all through the test, so that the health answer is not a failure.
	const heardAt = new Date(Date.now() + 3_600_000);
	await database.db.insert(workers).values({ id: 'test', startedAt: heardAt, heardAt });
	for (const who of WHO) {
		const jar = new Map<string, string>();
		const actor = actorOf(who);
		if (actor) jar.set(sessionCookieName(ctx), (await startSession(ctx, actor.staffId, true)).sessionId);
		visitors.set(who, visitor(app, jar));
	}
});

/** As through a proxy, so that being on the same machine opens nothing. */
const FROM_OUTSIDE = { 'x-forwarded-for': '198.51.100.7' };

/** What an answer says about access, whatever else it says. */
function verdictOf(response: Response): string {
	const location = response.headers.get('location') ?? '';
	if (response.status === 303 && location.startsWith('/sign-in?next=')) return 'sign-in-first';
	if (response.status === 401) return 'sign-in-first';
	if (response.status === 403) return 'not-your-work';
	if (response.status >= 500) return `broke with ${response.status}`;
	return 'allow';
}

interface Entry {
	readonly id: string;
	readonly method: string;
	/** `?/name` of a form action. */
	readonly query: string;
	readonly need: Need;
}

const entries: Entry[] = findRoutes().flatMap(({ id }): Entry[] => {
	const access = ROUTE_ACCESS[id];
	if (access === undefined) return [];
	if (access.kind === 'endpoint') {
		return Object.entries(access.methods).map(([method, need]) => ({ id, method, query: '', need }));
	}
	const actions = Object.entries(access.actions).map(([name, need]) => {
		return { id, method: 'POST', query: name === 'default' ? '' : `?/${name}`, need };
	});
	return [{ id, method: 'GET', query: '', need: access.view }, ...actions];
});
/** Ends the sessions that the others need. */
const ENDS_SESSIONS = ['?/signOutEverywhere', '?/password'];
const cases = entries
	.filter(
		({ id, query }) =>
			id !== '/(auth)/sign-out' && !(id === '/(staff)/account' && ENDS_SESSIONS.includes(query))
	)
	.flatMap((entry) =>
		WHO.map((who) => ({ ...entry, who, asked: `${who}: ${entry.method} ${entry.id}${entry.query}` }))
	);

const request = (who: Who, { id, method, query }: Entry, side: 'east' | 'west'): Promise<Response> => {
	const path = addressOf(id, params(side)) + query;
	if (method === 'GET') return ask(who).get(path, FROM_OUTSIDE);
	return ask(who).send(path, {
		method,
		body: new URLSearchParams(),
		headers: { origin: app.origin, ...FROM_OUTSIDE }
	});
};

describe('every route, method and action answers each role as the table says', () => {
	test.each(cases.map((asked) => [asked.asked, asked] as const))('%s', async (_, { who, ...entry }) => {
		const response = await request(who, entry, 'east');
		// A provider's call-back proves itself by its signature, which this one lacks.
		if (entry.id.startsWith('/webhooks/')) return expect(response.status).toBe(403);
		expect(verdictOf(response)).toBe(decideAccess(entry.need, actorOf(who), false));
	});
});

describe('nobody reaches a record of another site', () => {
	const others = cases.filter(({ id, who }) => hasRecord(id) && who !== 'nobody');
	test.each(others.map((asked) => [asked.asked, asked] as const))('%s', async (_, { who, ...entry }) => {
		if (decideAccess(entry.need, actorOf(who), false) !== 'allow') return;
		// The administrator's sites are all of the organisation's.
		if (who === 'admin') return;
		const response = await request(who, entry, 'west');
		expect(response.status).toBe(404);
	});
	test('and there is something to reach on the own one', async () => {
		const own = (
			await Promise.all([
				request(
					'desk',
					{ id: '/(admin)/sites/[siteId]', method: 'GET', query: '', need: 'openings.edit' },
					'east'
				),
				request(
					'admin',
					{ id: '/(admin)/sites/[siteId]', method: 'GET', query: '', need: 'openings.edit' },
					'west'
				)
			])
		).map(({ status }) => status);
		expect(own).toEqual([200, 200]);
	});
});

describe('what the table does not name is refused, also to an administrator', () => {
	test.each(entries.filter(({ method }) => method === 'GET').map(({ id }) => id))(
		'other methods on %s',
		async (id) => {
			for (const method of ['PUT', 'PATCH', 'DELETE']) {
				const response = await request('admin', { id, method, query: '', need: 'public' }, 'east');
				expect([404, 405]).toContain(response.status);
			}
		}
	);
	test('an action that is not there', async () => {
		expect((await ask('admin').post('/people?/promote')).status).toBe(404);
		expect((await ask('nobody').post('/sign-in?/toString')).status).toBe(404);
	});
	test('an address that is not there', async () => {
		expect((await ask('admin').get('/nowhere')).status).toBe(404);
	});
});

describe('counts for a watching machine', () => {
	test('are open on this machine itself, not through a proxy', async () => {
		expect((await ask('nobody').get('/metrics')).status).toBe(200);
		expect(verdictOf(await ask('nobody').get('/metrics', FROM_OUTSIDE))).toBe('sign-in-first');
		expect((await ask('admin').get('/metrics', FROM_OUTSIDE)).status).toBe(200);
	});
});
