import { and, eq, gt, inArray } from 'drizzle-orm';
import type mysql from 'mysql2/promise';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { insertPlainMessages, insertPlainSites, renderPlain } from '../../jobs/bench/plain-messages';
import { messages, senders } from '../../src/lib/server/db/schema/messaging';
import { withTx } from '../../src/lib/server/db/tx';
import { lockGroupQuery } from '../../src/lib/server/outbox/claim';
import { dueGroupsQuery, findDueGroups } from '../../src/lib/server/outbox/due';
import { abandonedQuery } from '../../src/lib/server/outbox/rescue';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { reserveCalls } from '../../src/lib/server/outbox/senders';
import { giveBack, takeDue } from '../../src/lib/server/outbox/take';
import { openTestDatabase } from '../support/database';
import { openFakes, openWorld } from './sending-world';

const database = await openTestDatabase();
const fakes = await openFakes();
const world = openWorld(database, fakes);
afterAll(() => world.close());
const { db } = database;

let siteIds: string[];
beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	fakes.troubles.clear();
	siteIds = await insertPlainSites(db, 3);
});

const [minute, hour] = [60_000, 3_600_000];
const ago = (milliseconds: number) => new Date(Date.now() - milliseconds);
const stateOf = async (id: string) =>
	(await db.select({ state: messages.state }).from(messages).where(eq(messages.id, id)))[0]?.state;

describe('the order of sending', () => {
	it('takes urgent messages first, however long the others have waited', async () => {
		await insertPlainMessages(db, { count: 100, siteIds, channel: 'sms', priority: 5, runAt: ago(9 * hour) });
		const urgent = await insertPlainMessages(db, {
			count: 10,
			siteIds,
			channel: 'sms',
			priority: 0,
			runAt: ago(minute)
		});
		const { held } = await takeDue(world.outbox, 'sms', 10, 'test/1');
		expect(held.map(({ row }) => row.id).sort()).toEqual([...urgent].sort());
	});

	it('gives a site with little its turn beside one with much', async () => {
		const [busy = '', quiet = '', calm = ''] = siteIds;
		await insertPlainMessages(db, { count: 500, siteIds: [busy], channel: 'sms', runAt: ago(9 * hour) });
		await insertPlainMessages(db, { count: 4, siteIds: [quiet], channel: 'sms', runAt: ago(minute) });
		await insertPlainMessages(db, { count: 2, siteIds: [calm], channel: 'sms', runAt: ago(minute) });
		const { held } = await takeDue(world.outbox, 'sms', 30, 'test/1');
		const of = (site: string) => held.filter(({ row }) => row.siteId === site).length;
		expect([of(busy), of(quiet), of(calm)].slice(1)).toEqual([4, 2]);
		expect(of(busy)).toBeGreaterThanOrEqual(10);
	});

	it('takes the oldest of a site first', async () => {
		const [site = ''] = siteIds;
		const late = await insertPlainMessages(db, {
			count: 3,
			siteIds: [site],
			channel: 'sms',
			runAt: ago(minute)
		});
		const early = await insertPlainMessages(db, {
			count: 3,
			siteIds: [site],
			channel: 'sms',
			runAt: ago(hour)
		});
		const { held } = await takeDue(world.outbox, 'sms', 3, 'test/1');
		expect(held.map(({ row }) => row.id).sort()).toEqual([...early].sort());
		expect(await stateOf(late[0] ?? '')).toBe('planned');
	});
});

describe('claims', () => {
	it('never give one message to two workers', async () => {
		const ids = await insertPlainMessages(db, { count: 1000, siteIds, channel: 'sms' });
		const workers = Array.from({ length: 10 }, (_, worker) =>
			(async () => {
				const mine: string[] = [];
				for (let claim = 0; ; claim++) {
					const { held } = await takeDue(world.outbox, 'sms', 20, `w${worker}/${claim}`);
					if (held.length === 0 && (await findDueGroups(db, 'sms', world.clock.now())).length === 0)
						return mine;
					mine.push(...held.map(({ row }) => row.id));
				}
			})()
		);
		const taken = (await Promise.all(workers)).flat();
		expect(taken).toHaveLength(1000);
		expect(new Set(taken)).toEqual(new Set(ids));
	});

	it('write the beginning of the call, its address and its lease before any call can be made', async () => {
		const [id = ''] = await insertPlainMessages(db, { count: 1, siteIds, channel: 'sms' });
		await takeDue(world.outbox, 'sms', 10, 'test/1');
		const [row] = await db.select().from(messages).where(eq(messages.id, id));
		expect(row).toMatchObject({ state: 'sending', lockedBy: 'test/1', address: '+12022000000', claims: 1 });
		expect(row?.callBeganAt).toBeInstanceOf(Date);
		expect(Number(row?.lockedUntil) - Number(row?.callBeganAt)).toBe(60_000);
	});

	it('can be given back without a trace, and only by their holder', async () => {
		await insertPlainMessages(db, { count: 2, siteIds, channel: 'sms' });
		const { held } = await takeDue(world.outbox, 'sms', 10, 'test/1');
		await giveBack(
			world.outbox,
			held.map((one) => ({ ...one, token: 'other/1' }))
		);
		expect(await stateOf(held[0]?.row.id ?? '')).toBe('sending');
		await giveBack(world.outbox, held);
		const rows = await db.select().from(messages);
		expect(
			rows.every((row) => row.state === 'planned' && row.callBeganAt === null && row.attempts === 0)
		).toBe(true);
	});
});

describe('a message at the moment of sending', () => {
	it('is not sent after its time', async () => {
		const [id = ''] = await insertPlainMessages(db, {
			count: 1,
			siteIds,
			channel: 'sms',
			expiresAt: ago(minute)
		});
		await sendDue(world.outbox);
		expect(await stateOf(id)).toBe('expired');
		expect([...fakes.store.smses]).toHaveLength(0);
	});

	it('is withdrawn or put off when its follow-up says so', async () => {
		const ids = await insertPlainMessages(db, { count: 3, siteIds, channel: 'sms' });
		const [gone = '', quiet = '', wanted = ''] = ids;
		const until = new Date(world.clock.now().getTime() + 5 * hour);
		const picky = openWorld(database, fakes, {
			render: async (reader, ctx, rows) =>
				new Map(await renderPlain(reader, ctx, rows))
					.set(gone, { kind: 'withdraw', reason: 'the visit moved' })
					.set(quiet, { kind: 'postpone', until, reason: 'quiet hours' })
		});
		await sendDue(picky.outbox);
		picky.close();
		const rows = await db.select().from(messages).where(inArray(messages.id, ids));
		const byId = new Map(rows.map((row) => [row.id, row]));
		expect(byId.get(gone)).toMatchObject({ state: 'withdrawn', lastError: 'the visit moved' });
		expect(byId.get(quiet)).toMatchObject({ state: 'planned', runAt: until });
		expect(byId.get(wanted)?.state).toBe('sent');
	});
});

describe('the rate of a sender', () => {
	it('is shared by all workers', async () => {
		const settings = { ...world.outbox.settings, perSecond: { sms: 10, mail: null } };
		// One instant for all: a clock that moves on between them would shorten the last one's second.
		const instant = world.clock.now();
		const ctx = { ...world.outbox.ctx, clock: { now: () => instant } };
		const workers = ['a', 'b', 'c'].map((workerId) => ({ ...world.outbox, ctx, settings, workerId }));
		const granted = await Promise.all(workers.map((outbox) => reserveCalls(outbox, 'sms', 8)));
		expect(granted.reduce((sum, one) => sum + one.granted, 0)).toBe(10);
		expect(await db.select().from(senders)).toHaveLength(1);
	});
});

describe('the plans of the hot queries', () => {
	const fill = async () => {
		await insertPlainMessages(db, {
			count: 2000,
			siteIds,
			channel: 'sms',
			runAt: new Date(Date.now() + hour)
		});
		await insertPlainMessages(db, { count: 300, siteIds, channel: 'sms' });
		await database.pool.query('analyze table messages');
	};
	const explain = async (query: { toSQL: () => { sql: string; params: unknown[] } }) => {
		const { sql, params } = query.toSQL();
		const values = params.map((one) =>
			one instanceof Date ? one.toISOString().slice(0, 23).replace('T', ' ') : one
		);
		const [rows] = await database.pool.query<mysql.RowDataPacket[]>(
			`explain ${sql.replace(/ for update.*$/, '')}`,
			values
		);
		return rows;
	};

	it('read only due rows of one site, by one index, without sorting', async () => {
		await fill();
		const now = world.clock.now();
		const group = { priority: 5, siteId: siteIds[0] ?? '' };
		const wish = { channel: 'sms', limit: 64, now, fraction: 0 } as const;
		const [plan] = await explain(lockGroupQuery(db, group, wish));
		expect(plan).toMatchObject({ key: 'messages_claim', type: 'range' });
		expect(plan?.Extra).not.toMatch(/filesort|temporary/i);
		expect(Number(plan?.rows)).toBeLessThan(300);
	});

	it('find the sites with due messages in one step each', async () => {
		await fill();
		const [plan] = await explain(dueGroupsQuery(db, 'sms'));
		expect(plan).toMatchObject({ key: 'messages_claim' });
		expect(plan?.Extra).toMatch(/Using index for group-by/);
		expect(plan?.Extra).not.toMatch(/filesort|temporary/i);
	});

	it('find abandoned messages by their lease', async () => {
		await fill();
		const [plan] = await explain(abandonedQuery(db));
		expect(plan).toMatchObject({ key: 'messages_lease', type: 'range' });
	});

	it('lock nothing that is not due: another transaction may change it meanwhile', async () => {
		await fill();
		const group = { priority: 5, siteId: siteIds[0] ?? '' };
		const wish = { channel: 'sms', limit: 64, now: world.clock.now(), fraction: 0 } as const;
		await withTx(db, async (tx) => {
			expect(await lockGroupQuery(tx, group, wish)).toHaveLength(64);
			const notDue = and(eq(messages.siteId, group.siteId), gt(messages.runAt, world.clock.now()));
			const others = await db.select({ id: messages.id }).from(messages).where(notDue).limit(40);
			for (const { id } of others) await db.update(messages).set({ priority: 6 }).where(eq(messages.id, id));
			expect(others).toHaveLength(40);
			const rest = await lockGroupQuery(db, group, wish);
			expect(rest.length).toBe(36);
		});
	});
});
