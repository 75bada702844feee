import { eq, ne, sql } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { insertPlainMessages, insertPlainSites } from '../../jobs/bench/plain-messages';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { makeCall } from '../../src/lib/server/outbox/call';
import { Lease } from '../../src/lib/server/outbox/lease';
import type { Held } from '../../src/lib/server/outbox/port';
import { reconcileUnknown } from '../../src/lib/server/outbox/reconcile';
import { recordCalls } from '../../src/lib/server/outbox/record';
import { renewLease } from '../../src/lib/server/outbox/renew';
import { rescueAbandoned } from '../../src/lib/server/outbox/rescue';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { takeDue } from '../../src/lib/server/outbox/take';
import { openFakes, openWorld } from '../messaging/sending-world';
import { openTestDatabase } from '../support/database';

/** A worker that dies between two steps is one whose next step is never made. What it held is found by its lease. */

const database = await openTestDatabase();
const fakes = await openFakes();
const dying = openWorld(database, fakes, { workerId: 'dying' });
const heir = openWorld(database, fakes, { workerId: 'heir' });
afterAll(() => {
	dying.close();
	heir.close();
});
const { db } = database;

beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	const siteIds = await insertPlainSites(db, 1);
	await insertPlainMessages(db, { count: 3, siteIds, channel: 'sms' });
	await insertPlainMessages(db, { count: 2, siteIds, channel: 'mail' });
});

const TOKEN = 'dying/1';
async function take(): Promise<Held[]> {
	const sms = await takeDue(dying.outbox, 'sms', 10, TOKEN);
	const mail = await takeDue(dying.outbox, 'mail', 10, TOKEN);
	return [...sms.held, ...mail.held];
}
/** Its lease is over, as if a minute had passed. */
const leaseEnds = () =>
	db
		.update(messages)
		.set({ lockedUntil: sql`utc_timestamp(3) - interval 1 second` })
		.where(eq(messages.state, 'sending'));
const count = () => fakes.store.count;
const unsent = () => db.select().from(messages).where(ne(messages.state, 'sent'));

async function inherit(): Promise<void> {
	await rescueAbandoned(heir.outbox);
	heir.clock.forward(60);
	await reconcileUnknown(heir.outbox);
	heir.clock.forward(60);
	await sendDue(heir.outbox);
}

describe('a worker that dies', () => {
	it('after the claim and before the call: everything is sent by another, once', async () => {
		expect(await take()).toHaveLength(5);
		await leaseEnds();
		await inherit();
		expect(await unsent()).toEqual([]);
		expect(count()).toBe(5);
	});

	it('after the call and before the record: nothing is sent again', async () => {
		const held = await take();
		await Promise.all(held.map((one) => makeCall(dying.outbox, one)));
		expect(count()).toBe(5);
		await leaseEnds();
		await inherit();
		expect(await unsent()).toEqual([]);
		expect(count()).toBe(5);
	});

	it('with some calls made and some not: the others are sent, and only they', async () => {
		const held = await take();
		await Promise.all(held.slice(0, 2).map((one) => makeCall(dying.outbox, one)));
		await leaseEnds();
		await inherit();
		expect(await unsent()).toEqual([]);
		expect(count()).toBe(5);
	});
});

describe('a worker that lives', () => {
	it('is never robbed while it renews its claim', async () => {
		const held = await take();
		await leaseEnds();
		const lost = await renewLease(
			db,
			new Lease(TOKEN, 60),
			held.map(({ row }) => row.id)
		);
		expect([...lost]).toEqual([]);
		expect(await rescueAbandoned(heir.outbox)).toBe(0);
	});

	it('learns that its claim is lost, and what it records late changes nothing', async () => {
		const held = await take();
		const called = await Promise.all(held.map((one) => makeCall(dying.outbox, one)));
		await leaseEnds();
		await rescueAbandoned(heir.outbox);
		const ids = held.map(({ row }) => row.id);
		expect(await renewLease(db, new Lease(TOKEN, 60), ids)).toEqual(new Set(ids));
		expect(await recordCalls(dying.outbox, called)).toBe(5);
		expect(new Set((await unsent()).map(({ state }) => state))).toEqual(new Set(['unknown']));
		await inherit();
		expect(await unsent()).toEqual([]);
		expect(count()).toBe(5);
	});
});
