import { eq } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { insertPlainSites } from '../../jobs/bench/plain-messages';
import { alerts, followUps } from '../../src/lib/server/db/schema/follow-up';
import { messages, watchFindings, workers } from '../../src/lib/server/db/schema/messaging';
import { withTx } from '../../src/lib/server/db/tx';
import { applyDelivery } from '../../src/lib/server/outbox/delivery';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { runTick } from '../../src/lib/server/outbox/ticks';
import { fallBack } from '../../src/lib/server/services/fallback';
import { watch } from '../../src/lib/server/services/watch';
import { openTestDatabase } from '../support/database';
import { type Family, insertFamily, planForFamily, SMS_LIMIT_MINUTES } from './family-world';
import { openFakes, openWorld } from './sending-world';

const database = await openTestDatabase();
const fakes = await openFakes();
const world = openWorld(database, fakes);
afterAll(() => world.close());
const { db } = database;
const { ctx, clock } = world;

const MOTHER = { phone: '+12025550111', email: 'mother@example.org' };
const FATHER = { phone: '+12025550112' };
let family: Family;
beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	fakes.troubles.clear();
	const [siteId = ''] = await insertPlainSites(db, 1);
	family = await insertFamily(db, siteId, [MOTHER, FATHER], clock.now());
});

const rowOf = async (id: string) => (await db.select().from(messages).where(eq(messages.id, id)))[0];
const report = (providerId: string, status: string, messageId?: string) =>
	withTx(db, (tx) => applyDelivery(tx, ctx, { providerId, status, messageId }));
/** The ways that were planned instead, in order. */
async function otherWays() {
	const rows = await db.select().from(messages).where(eq(messages.followUpId, family.followUpId));
	return rows
		.filter(({ facts }) => facts.insteadOf !== undefined)
		.map(({ carerId, channel }) => `${carerId === family.carerIds[0] ? 'mother' : 'father'} by ${channel}`);
}

async function sendOne(): Promise<string> {
	const id = await planForFamily(db, family, MOTHER.phone, clock.now());
	await sendDue(world.outbox);
	return id;
}

describe('delivery reports', () => {
	it('only move a message forward, in whatever order they come', async () => {
		const id = await sendOne();
		const sid = (await rowOf(id))?.providerId ?? '';
		expect(await report(sid, 'delivered')).toBe('applied');
		expect(await report(sid, 'sent')).toBe('older');
		expect(await report(sid, 'delivered')).toBe('older');
		expect(await rowOf(id)).toMatchObject({ delivery: 'delivered', unprovenSince: null });
	});

	it('prove a sending whose own record was lost', async () => {
		const id = await planForFamily(db, family, MOTHER.phone, clock.now());
		await db.update(messages).set({ state: 'unknown', callBeganAt: clock.now() }).where(eq(messages.id, id));
		expect(await report('SM1', 'sent')).toBe('no-message');
		expect(await report('SM1', 'sent', id)).toBe('applied');
		expect(await rowOf(id)).toMatchObject({ state: 'sent', providerId: 'SM1', delivery: 'sent' });
	});
});

describe('a text message that does not arrive', () => {
	it('is left alone while it may still arrive, and for good once it did', async () => {
		const id = await sendOne();
		clock.forward((SMS_LIMIT_MINUTES - 1) * 60);
		expect(await fallBack(ctx)).toBe(0);
		await report((await rowOf(id))?.providerId ?? '', 'delivered');
		clock.forward(3600);
		expect(await fallBack(ctx)).toBe(0);
		expect(await otherWays()).toEqual([]);
	});

	it('goes by mail once the limit of the site has passed, and only once', async () => {
		await sendOne();
		clock.forward((SMS_LIMIT_MINUTES + 1) * 60);
		await fallBack(ctx);
		await fallBack(ctx);
		expect(await otherWays()).toEqual(['mother by mail']);
	});

	it('goes the whole way at once when each way is refused: mail, second carer, then the desk', async () => {
		const id = await sendOne();
		await report((await rowOf(id))?.providerId ?? '', 'undelivered');
		await fallBack(ctx);
		expect(await otherWays()).toEqual(['mother by mail']);
		expect(await db.select().from(alerts)).toHaveLength(0);
		for (let step = 0; step < 2; step++) {
			await db
				.update(messages)
				.set({ state: 'dead', unprovenSince: clock.now() })
				.where(eq(messages.state, 'planned'));
			await fallBack(ctx);
		}
		expect(await otherWays()).toEqual(expect.arrayContaining(['mother by mail', 'father by sms']));
		const [alert] = await db.select().from(alerts);
		expect(alert).toMatchObject({ kind: 'message-undeliverable', role: 'desk', siteId: family.siteId });
		expect(alert?.dueAt).toBeInstanceOf(Date);
	});

	it('is a task of the desk in the transaction that gives it up', async () => {
		fakes.troubles.order({ channel: 'sms', kind: 'invalid', times: 1, seconds: 0 });
		const id = await sendOne();
		expect((await rowOf(id))?.state).toBe('dead');
		expect(await db.select().from(alerts)).toMatchObject([
			{ dedupeKey: `undeliverable:${id}`, role: 'desk' }
		]);
		await fallBack(ctx);
		expect(await otherWays()).toEqual(['mother by mail']);
	});
});

describe('the watch', () => {
	const openKinds = async () =>
		(await db.select().from(watchFindings))
			.filter(({ settledAt }) => settledAt === null)
			.map(({ kind }) => kind);

	it('finds a next step that nobody took, tells the duty address once, and settles it when it is taken', async () => {
		await db
			.update(followUps)
			.set({ nextStepDueAt: new Date(clock.now().getTime() - 86_400_000) })
			.where(eq(followUps.id, family.followUpId));
		await watch(ctx);
		await watch(ctx);
		expect(await openKinds()).toEqual(['step-overdue']);
		const mails = await db.select().from(messages).where(eq(messages.kind, 'duty-finding'));
		expect(mails).toMatchObject([{ channel: 'mail', siteId: family.siteId, state: 'planned' }]);
		await db
			.update(followUps)
			.set({ nextStepDueAt: new Date(clock.now().getTime() + 86_400_000) })
			.where(eq(followUps.id, family.followUpId));
		await watch(ctx);
		expect(await openKinds()).toEqual([]);
	});

	it('finds messages that do not move and a worker that fell silent', async () => {
		const id = await planForFamily(db, family, MOTHER.phone, clock.now());
		const longAgo = new Date(clock.now().getTime() - 20 * 60_000);
		await db.update(messages).set({ runAt: longAgo }).where(eq(messages.id, id));
		await db.insert(workers).values({ id: 'w1', startedAt: longAgo, heardAt: longAgo });
		await db.insert(workers).values({ id: 'w2', startedAt: longAgo, heardAt: longAgo, stoppedAt: longAgo });
		await watch(ctx);
		expect((await openKinds()).sort()).toEqual(['messages-stuck', 'worker-silent']);
	});
});

describe('ticks', () => {
	it('run in one process at a time, once in their period, and are made up when they were missed', async () => {
		let runs = 0;
		let isOver = () => {};
		const tick = {
			name: 'slow',
			everySeconds: 60,
			run: () => new Promise<void>((resolve) => ((runs += 1), (isOver = resolve)))
		};
		const first = runTick(ctx, 'one', tick);
		await expect.poll(() => runs).toBe(1);
		clock.forward(600);
		expect(await runTick(ctx, 'two', tick)).toBe(false);
		isOver();
		expect(await first).toBe(true);
		const quick = { ...tick, run: async () => (runs += 1) };
		expect(await runTick(ctx, 'two', quick)).toBe(true);
		expect(await runTick(ctx, 'one', quick)).toBe(false);
		expect(runs).toBe(2);
	});
});
