import { eq } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { insertPlainMessages, insertPlainSites } from '../../jobs/bench/plain-messages';
import { type TroubleOrder, troubleOrder } from '../../jobs/fakes/troubles';
import type { Channel } from '../../src/lib/domain/messaging/kinds';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { reconcileUnknown } from '../../src/lib/server/outbox/reconcile';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { openTestDatabase } from '../support/database';
import { openFakes, openWorld } from './sending-world';

/** Each failure of a provider, met by the real SDKs over the network. */

const database = await openTestDatabase();
const fakes = await openFakes();
const world = openWorld(database, fakes);
const hasty = openWorld(database, fakes, { settings: { callSeconds: 1 } });
afterAll(() => {
	world.close();
	hasty.close();
});

let siteIds: string[];
beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	fakes.troubles.clear();
	siteIds = await insertPlainSites(database.db, 1);
});

async function plan(channel: Channel, to?: string): Promise<string> {
	const [id] = await insertPlainMessages(database.db, {
		count: 1,
		siteIds,
		channel,
		...(to === undefined ? {} : { to: () => to })
	});
	if (id === undefined) throw new Error('no message was planned');
	return id;
}

async function rowOf(id: string) {
	const [row] = await database.db.select().from(messages).where(eq(messages.id, id));
	if (row === undefined) throw new Error('the message is gone');
	return row;
}

const order = (trouble: { channel: Channel; kind: string; times?: number; seconds?: number }) =>
	fakes.troubles.order(troubleOrder.parse(trouble) satisfies TroubleOrder);
const smsCount = () => [...fakes.store.smses].length;

/** Time passes, workers look after lost answers and send what is due again. */
async function later(seconds = 60): Promise<void> {
	world.clock.forward(seconds);
	await reconcileUnknown(world.outbox);
	world.clock.forward(seconds);
	await sendDue(world.outbox);
}

describe('an SMS that is not taken', () => {
	it('waits as long as the provider asks (429), and so does every other message', async () => {
		order({ channel: 'sms', kind: 'too-many', seconds: 90 });
		const id = await plan('sms');
		await sendDue(world.outbox);
		expect(await rowOf(id)).toMatchObject({ state: 'planned', attempts: 0, lastError: '429' });
		const other = await plan('sms');
		world.clock.forward(80);
		await sendDue(world.outbox);
		expect((await rowOf(other)).state).toBe('planned');
		expect(smsCount()).toBe(0);
		world.clock.forward(20);
		await sendDue(world.outbox);
		expect((await rowOf(id)).state).toBe('sent');
		expect((await rowOf(other)).state).toBe('sent');
		expect(smsCount()).toBe(2);
	});

	it('is looked up after a server error and then tried again', async () => {
		order({ channel: 'sms', kind: 'server-error' });
		const id = await plan('sms');
		await sendDue(world.outbox);
		expect((await rowOf(id)).state).toBe('unknown');
		await later();
		expect(await rowOf(id)).toMatchObject({ state: 'sent', attempts: 1 });
		expect(smsCount()).toBe(1);
	});

	it.each([
		['invalid', '400/21211'],
		['stopped', '400/21610'],
		['not-mobile', '400/21614']
	])('is given up when the provider will never take it (%s)', async (kind, reason) => {
		order({ channel: 'sms', kind });
		const id = await plan('sms');
		await sendDue(world.outbox);
		expect(await rowOf(id)).toMatchObject({ state: 'dead', lastError: reason });
		await later();
		expect(smsCount()).toBe(0);
	});
});

describe('an SMS whose answer is lost', () => {
	it.each(['cut', 'server-error-taken'])('is found at the provider and not sent again (%s)', async (kind) => {
		order({ channel: 'sms', kind });
		const id = await plan('sms');
		await sendDue(world.outbox);
		expect((await rowOf(id)).state).toBe('unknown');
		await later();
		expect(await rowOf(id)).toMatchObject({ state: 'sent', attempts: 0 });
		expect((await rowOf(id)).providerId).toMatch(/^SM[0-9a-f]{32}$/);
		expect(smsCount()).toBe(1);
	});

	it('is found after a time-out behind which it was taken', async () => {
		order({ channel: 'sms', kind: 'silent', seconds: 3 });
		const id = await plan('sms');
		await sendDue(hasty.outbox);
		expect((await rowOf(id)).state).toBe('unknown');
		await later();
		expect((await rowOf(id)).state).toBe('sent');
		expect(smsCount()).toBe(1);
	});

	it('is waited for when the answer is only slow', async () => {
		order({ channel: 'sms', kind: 'slow', seconds: 0.5 });
		const id = await plan('sms');
		await sendDue(world.outbox);
		expect((await rowOf(id)).state).toBe('sent');
	});

	it('is told apart from other messages to the same telephone', async () => {
		const to = '+12025550111';
		await plan('sms', to);
		await sendDue(world.outbox);
		order({ channel: 'sms', kind: 'server-error' });
		const second = await plan('sms', to);
		await sendDue(world.outbox);
		await later();
		expect(await rowOf(second)).toMatchObject({ state: 'sent', attempts: 1 });
		expect(new Set(fakes.store.smsesOf(to).map(({ body }) => body)).size).toBe(2);
	});

	it('stays unknown, and unsent, while the provider cannot be asked', async () => {
		order({ channel: 'sms', kind: 'cut' });
		const id = await plan('sms');
		await sendDue(world.outbox);
		const deaf = openWorld(database, { ...fakes, url: 'http://127.0.0.1:9' });
		world.clock.forward(60);
		deaf.clock.forward(60);
		await reconcileUnknown(deaf.outbox);
		deaf.close();
		expect(await rowOf(id)).toMatchObject({ state: 'unknown', lockedBy: null });
		await later(120);
		expect((await rowOf(id)).state).toBe('sent');
		expect(smsCount()).toBe(1);
	});
});

describe('the list that does not show at once what was taken', () => {
	it('is asked only after the time to settle', async () => {
		const patient = openWorld(database, fakes, { settings: { settleSeconds: 30 } });
		order({ channel: 'sms', kind: 'hidden-cut', seconds: 1 });
		const id = await plan('sms');
		await sendDue(patient.outbox);
		patient.clock.forward(29);
		expect(await reconcileUnknown(patient.outbox)).toBe(0);
		patient.clock.forward(2);
		const isListed = async () => Date.now() >= ([...fakes.store.smses][0]?.listedAt ?? Infinity);
		await expect.poll(isListed, { timeout: 5000 }).toBe(true);
		expect(await reconcileUnknown(patient.outbox)).toBe(1);
		patient.close();
		expect((await rowOf(id)).state).toBe('sent');
		expect(smsCount()).toBe(1);
	});
});

describe('a mail', () => {
	it.each([
		['greylist', 'SMTP 451'],
		['mailbox-full', 'SMTP 452']
	])('is tried again when it is put off (%s)', async (kind, reason) => {
		order({ channel: 'mail', kind });
		const id = await plan('mail');
		await sendDue(world.outbox);
		expect(await rowOf(id)).toMatchObject({ state: 'planned', attempts: 1, lastError: reason });
		await later();
		expect((await rowOf(id)).state).toBe('sent');
		expect(fakes.store.mails).toHaveLength(1);
	});

	it('is given up when there is no such mailbox', async () => {
		const id = await plan('mail', 'no-such-mailbox@example.org');
		await sendDue(world.outbox);
		expect(await rowOf(id)).toMatchObject({ state: 'dead', lastError: 'SMTP 550' });
	});

	it.each(['cut', 'silent'])('whose answer is lost is found in the sent list (%s)', async (kind) => {
		order({ channel: 'mail', kind, seconds: 3 });
		const id = await plan('mail');
		await sendDue(hasty.outbox);
		expect((await rowOf(id)).state).toBe('unknown');
		await later();
		expect(await rowOf(id)).toMatchObject({ state: 'sent', providerId: `<${id}@example.org>` });
		expect(fakes.store.mails).toHaveLength(1);
	});

	it('goes again under the same Message-ID where the mail host has no list', async () => {
		const blind = openWorld(database, fakes, { mailSentListUrl: null });
		order({ channel: 'mail', kind: 'cut' });
		const id = await plan('mail');
		await sendDue(blind.outbox);
		blind.clock.forward(60);
		await reconcileUnknown(blind.outbox);
		blind.clock.forward(60);
		await sendDue(blind.outbox);
		blind.close();
		expect((await rowOf(id)).state).toBe('sent');
		expect(fakes.store.mails.map(({ messageId }) => messageId)).toEqual([
			`<${id}@example.org>`,
			`<${id}@example.org>`
		]);
	});
});

describe('a provider that is down', () => {
	it('is spared after a few failures, tried with a single message, and used again once it answers', async () => {
		const ids = await insertPlainMessages(database.db, { count: 30, siteIds, channel: 'sms' });
		const down = openWorld(
			database,
			{ ...fakes, url: 'http://127.0.0.1:9' },
			{ settings: { concurrency: 5 } }
		);
		await sendDue(down.outbox);
		const rows = await database.db.select().from(messages);
		const tried = rows.filter(({ attempts }) => attempts > 0);
		expect(tried.length).toBeGreaterThanOrEqual(5);
		expect(tried.length).toBeLessThan(15);
		expect(rows.every(({ state, lockedBy }) => state === 'planned' && lockedBy === null)).toBe(true);
		down.clock.forward(2);
		await sendDue(down.outbox);
		const again = (await database.db.select().from(messages)).filter(({ attempts }) => attempts > 0);
		expect(again.length).toBe(tried.length + 1);
		down.close();
		world.clock.forward(60);
		await sendDue(world.outbox);
		world.clock.forward(60);
		await sendDue(world.outbox);
		expect(smsCount()).toBe(ids.length);
		expect(new Set([...fakes.store.smses].map(({ body }) => body)).size).toBe(ids.length);
	});
});

describe('a message that cannot be rendered', () => {
	it('fails alone: the others of its batch are sent', async () => {
		const ids = await insertPlainMessages(database.db, { count: 5, siteIds, channel: 'sms' });
		const bad = ids[2];
		const fragile = openWorld(database, fakes, {
			render: async (db, ctx, rows) => {
				if (rows.some(({ id }) => id === bad)) throw new Error('no wording');
				return world.outbox.render(db, ctx, rows);
			}
		});
		await sendDue(fragile.outbox);
		fragile.close();
		expect(smsCount()).toBe(4);
		expect(await rowOf(bad ?? '')).toMatchObject({ state: 'planned', attempts: 1 });
	});
});
