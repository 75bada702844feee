import type { RowDataPacket } from 'mysql2/promise';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { getCallPanel } from '../../src/lib/server/services/call-panel';
import { getCalendar } from '../../src/lib/server/services/desk-calendar';
import { getMorning } from '../../src/lib/server/services/morning';
import { getQueue } from '../../src/lib/server/services/queue';
import { getStray } from '../../src/lib/server/services/stray-view';
import { makeCrowd } from '../support/crowd';
import { openTestDatabase } from '../support/database';
import { MONDAY, openWorld, type World } from '../support/follow-up-world';

const database = await openTestDatabase();

/** Tables that grow with every newborn; the others hold a hospital's few sites and hours. */
const GROWING = [
	'follow_ups',
	'newborns',
	'carers',
	'visits',
	'alerts',
	'attempts',
	'check_ins',
	'messages',
	'thread_entries',
	'stray_texts',
	'measurements',
	'phototherapy_courses'
];

interface Statement {
	readonly sql: string;
	readonly params: readonly unknown[];
}

/** The statements that a piece of work sends; the real pool does the work, it is only listened to. */
async function statementsOf(work: () => Promise<unknown>): Promise<Statement[]> {
	const spy = vi.spyOn(database.pool, 'query');
	try {
		await work();
		return spy.mock.calls.map(([query, params]: unknown[]) => {
			const sql = typeof query === 'string' ? query : Object(query).sql;
			return { sql: String(sql), params: Array.isArray(params) ? params : [] };
		});
	} finally {
		spy.mockRestore();
	}
}

interface Plan {
	readonly table: string;
	readonly type: string;
	readonly extra: string;
	readonly sql: string;
}

async function plansOf(statements: readonly Statement[]): Promise<Plan[]> {
	const plans: Plan[] = [];
	for (const { sql, params } of statements.filter((one) => one.sql.startsWith('select'))) {
		const [rows] = await database.pool.query<RowDataPacket[]>(`explain ${sql}`, [...params]);
		for (const row of rows) {
			plans.push({ table: String(row.table), type: String(row.type), extra: String(row.Extra), sql });
		}
	}
	return plans;
}

describe('the desk’s queries over years of newborns', () => {
	let world: World;
	let followUpId = '';
	let strayId = '';

	beforeAll(async () => {
		await database.clean();
		world = await openWorld(database);
		const { east, hospital } = world;
		const at = { ...east, organisationId: hospital.organisationId, now: MONDAY };
		await makeCrowd(database.db, at, { count: 4_000, stage: 'closed' });
		await makeCrowd(database.db, at, { count: 230, stage: 'booked' });
		await database.pool.query(`analyze table ${GROWING.join(', ')}`);
		const { rows, strays } = await getQueue(world.ctx, east.desk.actor, { limit: 1 });
		followUpId = rows[0]?.followUpId ?? '';
		strayId = strays[0]?.texts[0]?.entryId ?? '';
	}, 240_000);
	afterAll(() => database.clean());

	const works = (): Record<string, () => Promise<unknown>> => ({
		queue: () => getQueue(world.ctx, world.east.desk.actor, { limit: 100 }),
		'call panel': () => getCallPanel(world.ctx, world.east.desk.actor, followUpId),
		calendar: () => getCalendar(world.ctx, world.east.desk.actor, { forId: followUpId }),
		'morning list': () => getMorning(world.ctx, world.east.desk.actor, { on: '2026-03-02' }),
		'text of an unknown number': () => getStray(world.ctx, world.east.desk.actor, strayId)
	});

	test.each(['queue', 'call panel', 'calendar', 'morning list', 'text of an unknown number'])(
		'the %s reads growing tables by an index and sorts none of them',
		async (name) => {
			const work = works()[name];
			const statements = await statementsOf(async () => work?.());
			expect(statements.length).toBeGreaterThan(3);
			const plans = (await plansOf(statements)).filter(({ table }) =>
				GROWING.some((grown) => table === grown || table === `\`${grown}\``)
			);
			expect(plans.length).toBeGreaterThan(3);
			expect(plans.filter(({ type }) => type === 'ALL' || type === 'index')).toEqual([]);
			expect(plans.filter(({ extra }) => /filesort|temporary/i.test(extra))).toEqual([]);
		}
	);

	test('the queue sends as many statements for one row as for two hundred, and holds them all', async () => {
		const few = await statementsOf(() => getQueue(world.ctx, world.east.desk.actor, { limit: 1 }));
		let rows = 0;
		const many = await statementsOf(async () => {
			rows = (await getQueue(world.ctx, world.east.desk.actor, { limit: 1_000 })).rows.length;
		});
		expect(rows).toBeGreaterThanOrEqual(230);
		expect(many.length).toBe(few.length);
		expect(many.length).toBeLessThanOrEqual(14);
	});

	test('the calendar and the morning list send few statements, however many visits there are', async () => {
		const calendar = await statementsOf(() => getCalendar(world.ctx, world.east.desk.actor, {}));
		expect(calendar.length).toBeLessThanOrEqual(4);
		const empty = await statementsOf(() =>
			getMorning(world.ctx, world.east.desk.actor, { on: '2031-01-01' })
		);
		const full = await statementsOf(() => getMorning(world.ctx, world.east.desk.actor, { on: '2026-03-02' }));
		expect(empty.length).toBeLessThanOrEqual(full.length);
		expect(full.length).toBeLessThanOrEqual(13);
	});
});
