import { beforeAll, describe, expect, it } from 'vitest';
import { invent, seeded } from '../../jobs/bench/births';
import { assessmentOutputSchema, MOST_RECORDS, refusedRecordSchema } from '../../src/lib/schemas/assessment';
import { sessionCookieName, startSession } from '../../src/lib/server/auth/session';
import { startApp } from '../support/app';
import { testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { makeHospital } from '../support/factories/hospital';
import { visitor, type Visitor } from '../support/visitor';

const PATH = '/api/v1/assessments';
const database = await openTestDatabase();
const app = await startApp(database.url);
const hospital = await makeHospital(database.db);
let pediatrician: Visitor;

beforeAll(async () => {
	const ctx = testContext(database);
	const { sessionId } = await startSession(ctx, hospital.east.pediatrician.actor.staffId, true);
	pediatrician = visitor(app, new Map([[sessionCookieName(ctx), sessionId]]));
});

const post = (body: string, query = '', type = 'application/json'): Promise<Response> =>
	pediatrician.send(PATH + query, { method: 'POST', body, headers: { 'content-type': type } });

const random = seeded(21);
/** Records that weigh more than a usual body, as a quality team's do. */
const records = Array.from({ length: MOST_RECORDS }, (_, i) => ({
	...invent(random, i),
	id: `birth-${i}-${'x'.repeat(150)}`
}));

describe('POST /api/v1/assessments', () => {
	it('assesses the most records it takes, in order, each of the published form', async () => {
		const body = JSON.stringify(records);
		expect(body.length).toBeGreaterThan(512 * 1024);
		const response = await post(body);
		expect(response.status).toBe(200);
		const results: unknown = await response.json();
		if (!Array.isArray(results)) throw new Error('no list');
		expect(results.map((one: { id: string }) => one.id)).toEqual(records.map(({ id }) => id));
		for (const one of results) {
			const isKnown =
				assessmentOutputSchema.safeParse(one).success || refusedRecordSchema.safeParse(one).success;
			expect(isKnown, JSON.stringify(one)).toBe(true);
		}
	});

	it('answers lines with lines', async () => {
		const lines = records.slice(0, 3).map((one) => JSON.stringify(one));
		const response = await post(`${lines.join('\n')}\nnot json\n`, '', 'application/x-ndjson');
		const answers = (await response.text()).trim().split('\n');
		expect(answers).toHaveLength(4);
		expect(JSON.parse(answers[3] ?? '')).toMatchObject({ id: null, error: { code: 'unreadable' } });
	});

	it('gives one record its reasons, and refuses one with what to do instead', async () => {
		const [one] = records;
		expect(await (await post(JSON.stringify(one), '?trace=true')).json()).toHaveProperty('trace');
		const refused = await post(JSON.stringify({ ...one, gestationalAge: '30+0', standard: 'aap-2022' }));
		expect(refused.status).toBe(422);
		expect(await refused.json()).toMatchObject({ error: { code: 'gestational-age-out-of-range' } });
	});

	it.each([
		['one record too many', JSON.stringify([...records, records[0]]), 413, /At most 1,?000 records/],
		['a body that is too long', `"${'x'.repeat(4 * 1024 * 1024)}"`, 413, /too long/],
		['what is no JSON', '{', 400, /not JSON/]
	])('refuses %s with a sentence', async (_, body, status, sentence) => {
		const response = await post(body);
		expect(response.status).toBe(status);
		expect(await response.text()).toMatch(sentence);
	});

	it('is for those who may see discharges', async () => {
		const nobody = visitor(app);
		const response = await nobody.send(PATH, {
			method: 'POST',
			body: '{}',
			headers: { 'content-type': 'application/json' }
		});
		expect(response.status).toBe(401);
	});
});
