import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { insertPlainMessages, insertPlainSites, plainText } from '../../jobs/bench/plain-messages';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { openTestDatabase } from '../support/database';
import { openFakes, openWorld } from './sending-world';

const database = await openTestDatabase();
const fakes = await openFakes();
const world = openWorld(database, fakes);
afterAll(() => world.close());

let siteIds: string[];
beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	fakes.troubles.clear();
	siteIds = await insertPlainSites(database.db, 2);
});

describe('sending what is due', () => {
	it('hands each message to its provider once and records it', async () => {
		const sms = await insertPlainMessages(database.db, { count: 150, siteIds, channel: 'sms' });
		const mail = await insertPlainMessages(database.db, { count: 40, siteIds, channel: 'mail' });
		await sendDue(world.outbox);
		const bodies = [...fakes.store.smses].map(({ body }) => body).sort();
		expect(bodies).toEqual(sms.map(plainText).sort());
		expect(fakes.store.mails.map(({ messageId }) => messageId).sort()).toEqual(
			mail.map((id) => `<${id}@example.org>`).sort()
		);
		const rows = await database.db.select().from(messages);
		expect(new Set(rows.map(({ state }) => state))).toEqual(new Set(['sent']));
		expect(rows.every(({ providerId, lockedBy }) => providerId !== null && lockedBy === null)).toBe(true);
	});
});
