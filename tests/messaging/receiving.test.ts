import { eq } from 'drizzle-orm';
import webhooks from 'twilio/lib/webhooks/webhooks.js';
import { beforeEach, describe, expect, it } from 'vitest';
import { alerts } from '../../src/lib/server/db/schema/follow-up';
import { messages, providerEvents, threadEntries } from '../../src/lib/server/db/schema/messaging';
import { carers } from '../../src/lib/server/db/schema/newborn';
import { readSignedForm, unsignedCalls } from '../../src/lib/server/http/signed-form';
import { handleWaitingEvents, receiveEvent } from '../../src/lib/server/services/provider-events';
import { getThread } from '../../src/lib/server/services/thread';
import { markThreadRead, writeToFamily } from '../../src/lib/server/services/thread-words';
import { fixedClock, testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { makeFollowUp } from '../support/factories/follow-up';
import { book, local, makeFamily, messagesOf, sendDue, visitOf } from './family';

describe('what families and providers tell us', async () => {
	const database = await openTestDatabase();
	beforeEach(() => database.clean());

	const PHONE = '+15125550143';
	let sids = 0;
	async function world() {
		const clock = fixedClock(local('2026-03-03T10:00'));
		const ctx = testContext(database, clock);
		const family = await makeFamily(ctx, { carer: { phone: PHONE, language: 'es' } });
		const text = async (body: string, sid = `SM${String(++sids).padStart(32, '0')}`) => {
			clock.advance({ minutes: 1 });
			await receiveEvent(ctx, { kind: 'inbound', eventKey: sid, payload: { sid, from: PHONE, body } });
			return sid;
		};
		const owed = async (followUpId = family.followUpId) =>
			(await ctx.db.select().from(alerts).where(eq(alerts.followUpId, followUpId))).filter(
				({ settledAt }) => settledAt === null
			);
		return { ctx, clock, family, text, owed };
	}
	const ofKind = <T extends { kind: string }>(rows: readonly T[], kind: string) =>
		rows.filter((row) => row.kind === kind);

	it('a yes confirms the visit, however often it is delivered', async () => {
		const { ctx, family, text, owed } = await world();
		const visitId = await book(ctx, family, local('2026-03-05T09:00'));
		const sid = await text('Sí, gracias');
		await text('Sí, gracias', sid);
		expect(await visitOf(ctx, visitId)).toMatchObject({ state: 'confirmed', confirmedVia: 'sms' });
		expect(await ctx.db.select().from(threadEntries)).toHaveLength(1);
		expect(await owed()).toEqual([]);
	});

	it('another time leaves the visit, tells the desk the wish, and answers', async () => {
		const { ctx, family, text, owed } = await world();
		const visitId = await book(ctx, family, local('2026-03-05T09:00'));
		await text('2 después de las 3');
		expect(await visitOf(ctx, visitId)).toMatchObject({
			state: 'booked',
			otherTimeWish: '2 después de las 3'
		});
		expect(ofKind(await owed(), 'other-time-asked')).toHaveLength(1);
		expect(ofKind(await messagesOf(ctx, family.followUpId), 'other-time-received')).toHaveLength(1);
	});

	it('stop ends texts at once, answers once, moves reminders to mail, and start brings them back', async () => {
		const { ctx, family, text, owed } = await world();
		await book(ctx, family, local('2026-03-05T09:00'));
		await sendDue(ctx, family.followUpId);
		const sid = await text('PARAR');
		await text('PARAR', sid);
		const planned = (await messagesOf(ctx, family.followUpId)).filter(({ state }) => state === 'planned');
		expect(planned.filter(({ channel }) => channel === 'sms').map(({ kind }) => kind)).toEqual([
			'stop-answer'
		]);
		expect(planned.map(({ kind, channel }) => `${kind} ${channel}`)).toContain('reminder-morning mail');
		expect(ofKind(await owed(), 'contact-stopped')).toMatchObject([{ role: 'desk' }]);
		const [answer] = await sendDue(ctx, family.followUpId);
		expect(answer?.result).toMatchObject({ to: PHONE });
		expect(answer?.result.text).toContain('START');

		await text('START');
		const [carer] = await ctx.db.select().from(carers).where(eq(carers.id, family.carerId));
		expect(carer?.smsStoppedAt).toBeNull();
		const again = (await messagesOf(ctx, family.followUpId)).filter(({ state }) => state === 'planned');
		expect(again.map(({ kind, channel }) => `${kind} ${channel}`)).toContain('reminder-morning sms');
	});

	it('words that alarm are put first, owed now by two, and answered with the emergency number at night too', async () => {
		const { ctx, clock, family, text, owed } = await world();
		clock.advance({ hours: 14 });
		await text('no despierta y está flojito');
		expect(ofKind(await owed(), 'alarming-words').map(({ role, dueAt }) => [role, dueAt])).toEqual(
			expect.arrayContaining([
				['desk', clock.now()],
				['pediatrician', clock.now()]
			])
		);
		const [advice] = await sendDue(ctx, family.followUpId);
		expect(advice?.row.kind).toBe('emergency-advice');
		expect(advice?.result.text).toContain('911');
	});

	it('free words are owed to the desk until read or answered; the answer goes out and stands in the thread', async () => {
		const { ctx, family, text, owed } = await world();
		const { followUpId, carerId, desk } = family;
		await text('¿Puedo llevar a su hermana?');
		expect(ofKind(await owed(), 'words-from-family')).toHaveLength(1);
		const written = {
			followUpId,
			carerId,
			channel: 'sms' as const,
			words: 'Claro que sí.',
			key: 'abcdefghij234567'
		};
		expect((await writeToFamily(ctx, desk, written)).ok).toBe(true);
		expect((await writeToFamily(ctx, desk, written)).ok).toBe(true);
		expect(await owed()).toEqual([]);
		const sent = await sendDue(ctx, followUpId);
		expect(sent.map(({ result }) => result.text)).toEqual([
			expect.stringMatching(/^East clinic: Claro que sí\. \(/)
		]);
		const thread = await getThread(ctx, desk, followUpId);
		expect(thread.ok && thread.value).toMatchObject({
			unread: 0,
			lines: [{ from: 'family' }, { from: 'clinic', by: 'East desk', state: 'sent' }]
		});
		expect((await getThread(ctx, family.hospital.west.desk.actor, followUpId)).ok).toBe(false);
		expect((await writeToFamily(ctx, family.hospital.east.nurse.actor, written)).ok).toBe(false);
		await text('Gracias');
		expect(await owed()).toEqual([]);
		expect((await markThreadRead(ctx, desk, followUpId)).ok).toBe(true);
	});

	it('asks the family of twins which newborn is meant, and does what was asked', async () => {
		const { ctx, clock, family, text, owed } = await world();
		const at = { ...family, now: clock.now(), newborn: { givenName: 'Luz' }, carer: { phone: PHONE } };
		const twin = await makeFollowUp(ctx.db, family, at);
		const first = await book(ctx, family, local('2026-03-05T09:00'));
		const second = await book(ctx, { ...family, followUpId: twin.followUpId }, local('2026-03-05T09:30'));
		await text('yes');
		const asked = ofKind(await ctx.db.select().from(messages), 'which-newborn');
		expect(asked).toHaveLength(1);
		const choices = asked[0]?.facts.choices?.split(' ') ?? [];
		const number = choices.indexOf(twin.followUpId) + 1;
		const question = (await sendDue(ctx, asked[0]?.followUpId ?? '')).find(
			({ row }) => row.kind === 'which-newborn'
		);
		expect(question?.result.text).toContain(`${number} = L`);
		await text(String(number));
		expect(await visitOf(ctx, second)).toMatchObject({ state: 'confirmed' });
		expect(await visitOf(ctx, first)).toMatchObject({ state: 'booked' });
		expect([...(await owed()), ...(await owed(twin.followUpId))]).toEqual([]);
		const entries = await ctx.db.select().from(threadEntries);
		expect(entries.map(({ followUpId }) => followUpId)).toEqual([twin.followUpId, twin.followUpId]);
		// Once the first is the only one that waits, a yes can only be about it.
		await text('yes');
		expect(await visitOf(ctx, first)).toMatchObject({ state: 'confirmed' });
	});

	it('delivery reports count once and in any order; one that comes before our own record waits', async () => {
		const { ctx, family } = await world();
		await book(ctx, family, local('2026-03-05T09:00'));
		const [row] = (await messagesOf(ctx, family.followUpId)).filter(({ channel }) => channel === 'sms');
		const report = (status: string) =>
			receiveEvent(ctx, {
				kind: 'delivery',
				eventKey: `SMx:${status}`,
				payload: { sid: 'SMx', status, error: '', message: '' }
			});
		await report('delivered');
		expect((await ctx.db.select().from(providerEvents)).map(({ handledAt }) => handledAt)).toEqual([null]);
		const set = { state: 'sent' as const, providerId: 'SMx', sentAt: ctx.clock.now() };
		await ctx.db
			.update(messages)
			.set(set)
			.where(eq(messages.id, row?.id ?? ''));
		expect(await handleWaitingEvents(ctx)).toBe(1);
		await report('sent');
		await report('sent');
		const [after] = await ctx.db
			.select()
			.from(messages)
			.where(eq(messages.id, row?.id ?? ''));
		expect(after).toMatchObject({ delivery: 'delivered' });
		expect(await ctx.db.select().from(providerEvents)).toHaveLength(2);
	});

	it('believes only what the provider signed over the public address, and counts the rest', async () => {
		const { ctx } = await world();
		const url = `${ctx.config.origin}/webhooks/sms/inbound`;
		const fields = { MessageSid: 'SM1', From: PHONE, Body: 'yes & no' };
		const signature = webhooks.getExpectedTwilioSignature(ctx.config.sms.authToken, url, fields);
		const call = (headers: Record<string, string>, body: Record<string, string> = fields) => ({
			// Behind a proxy the address that we see is not the one that was signed.
			url: new URL('http://10.0.0.7:4310/webhooks/sms/inbound'),
			request: new Request(url, { method: 'POST', headers, body: new URLSearchParams(body) })
		});
		expect(await readSignedForm(ctx, call({ 'x-twilio-signature': signature }))).toEqual(fields);
		const refused = [
			call({}),
			call({ 'x-twilio-signature': 'wrong' }),
			call({ 'x-twilio-signature': signature }, { ...fields, Body: 'no' })
		];
		for (const one of refused) expect(await readSignedForm(ctx, one)).toBeNull();
		const counted = (await unsignedCalls.get()).values.find(
			({ labels }) => labels.webhook === '/webhooks/sms/inbound'
		);
		expect(counted?.value).toBe(3);
	});
});
