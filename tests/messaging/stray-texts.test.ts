import { readFileSync } from 'node:fs';
import { eq } from 'drizzle-orm';
import { afterAll, assert, beforeEach, describe, expect, it } from 'vitest';
import { readDeskJson } from '../../src/lib/schemas/desk-view';
import { alerts } from '../../src/lib/server/db/schema/follow-up';
import {
	messages,
	providerEvents,
	threadEntries,
	watchFindings
} from '../../src/lib/server/db/schema/messaging';
import { carers } from '../../src/lib/server/db/schema/newborn';
import { accessRecords } from '../../src/lib/server/db/schema/staff';
import { strayTexts } from '../../src/lib/server/db/schema/stray-text';
import { withTx } from '../../src/lib/server/db/tx';
import { sendDue } from '../../src/lib/server/outbox/send-due';
import { renderForSending } from '../../src/lib/server/services/message-content';
import { handleWaitingEvents, receiveEvent } from '../../src/lib/server/services/provider-events';
import { getQueue } from '../../src/lib/server/services/queue';
import { assignStray, dismissStray } from '../../src/lib/server/services/stray-settle';
import { getStray, listStrays } from '../../src/lib/server/services/stray-view';
import { getThread } from '../../src/lib/server/services/thread';
import { assignText } from '../../src/lib/server/services/thread-words';
import { watch } from '../../src/lib/server/services/watch';
import { installDefaultWording } from '../../src/lib/server/services/wording';
import { openTestDatabase } from '../support/database';
import { makeHospital, type Hospital } from '../support/factories/hospital';
import { makeOrganisation, makeSite } from '../support/factories/organisation';
import { makeStaff } from '../support/factories/staff';
import { openFakes, openWorld } from './sending-world';

const database = await openTestDatabase();
const fakes = await openFakes();
const world = openWorld(database, fakes, {
	render: renderForSending
});
afterAll(() => world.close());
const { ctx, clock } = world;
const { db } = database;

const STRANGER = '+12025550188';
const HOUR = 3_600_000;
let hospital: Hospital;
let sids = 0;

beforeEach(async () => {
	await database.clean();
	fakes.store.clear();
	fakes.troubles.clear();
	clock.forward(3_600);
	hospital = await makeHospital(db);
	await withTx(db, (tx) => installDefaultWording(tx, ctx, hospital.organisationId));
});

/** A text comes in; the same `sid` again is the same text delivered again. */
async function text(body: string, sid = `SM${String(++sids).padStart(32, '0')}`, from = STRANGER) {
	clock.forward(1);
	await receiveEvent(ctx, { kind: 'inbound', eventKey: sid, payload: { sid, from, body } });
	const [entry] = await db.select().from(threadEntries).where(eq(threadEntries.providerId, sid));
	assert(entry, 'the text is on record');
	return { sid, entryId: entry.id, at: entry.at };
}
const strayOf = async (entryId: string) =>
	(await db.select().from(strayTexts).where(eq(strayTexts.entryId, entryId)))[0];
const texts = () => fakes.store.smsesOf(STRANGER);
const eastDesk = () => hospital.east.desk.actor;
const westDesk = () => hospital.west.desk.actor;
const eastNewborn = () => hospital.east.followUp.followUpId;
const audited = async () =>
	(await db.select().from(accessRecords)).filter(({ action }) => action.startsWith('stray-text.'));

describe('a text from a number of no family', () => {
	it('is owed once by the desks within two hours, though it was delivered twice and by two processes', async () => {
		const sid = `SM${'f'.repeat(32)}`;
		const payload = { sid, from: STRANGER, body: 'Can we come an hour later?' };
		const deliver = () => receiveEvent(ctx, { kind: 'inbound', eventKey: sid, payload });
		await Promise.all([deliver(), deliver(), deliver()]);
		const { entryId, at } = await text(payload.body, sid);
		// As after a crash in the middle: the event is taken up again by every worker's tick.
		await db.update(providerEvents).set({ handledAt: null });
		await Promise.all([handleWaitingEvents(ctx), handleWaitingEvents(ctx)]);
		expect(await db.select().from(threadEntries)).toHaveLength(1);
		expect(await db.select().from(strayTexts)).toMatchObject([
			{ entryId, organisationId: hospital.organisationId, settledAt: null }
		]);
		expect((await strayOf(entryId))?.dueAt).toEqual(new Date(at.getTime() + 2 * HOUR));
		expect(await db.select().from(messages)).toEqual([]);
		// Every desk of the organisation sees it, and the JSON that keeps the page fresh says the same.
		for (const actor of [eastDesk(), westDesk()]) {
			const queue = await getQueue(ctx, actor, { limit: 10 });
			expect(queue.strays).toMatchObject([
				{
					phone: STRANGER,
					isAlarming: false,
					advice: 'none',
					texts: [{ words: 'Can we come an hour later?' }]
				}
			]);
			expect(readDeskJson(JSON.stringify(queue))).toMatchObject({ strays: queue.strays });
		}
		expect((await listStrays(ctx, hospital.east.nurse.actor)).numbers).toEqual([]);
	});

	it('that alarms is owed at once, stands first, and gets one emergency advice in its own language', async () => {
		await text('Where do I park?', undefined, '+12025550187');
		const { sid, entryId, at } = await text('no despierta y está flojito');
		expect(await strayOf(entryId)).toMatchObject({ priority: 0, dueAt: at });
		const { numbers } = await listStrays(ctx, eastDesk());
		expect(numbers.map(({ isAlarming, advice }) => [isAlarming, advice])).toEqual([
			[true, 'on-its-way'],
			[false, 'none']
		]);
		const [planned] = await db.select().from(messages);
		expect(planned).toMatchObject({
			kind: 'emergency-advice',
			followUpId: null,
			carerId: null,
			language: 'es'
		});
		expect(JSON.stringify(planned?.facts)).not.toContain('555');

		await sendDue(world.outbox);
		await text('no despierta y está flojito', sid);
		await sendDue(world.outbox);
		expect(texts()).toHaveLength(1);
		expect(texts()[0]?.body).toContain('911');
		expect(texts()[0]?.body).toMatch(/bebé/i);
		expect((await listStrays(ctx, eastDesk())).numbers[0]?.advice).toBe('sent');
	});

	it('of an answering machine that speaks of emergencies is not answered again and again', async () => {
		for (let round = 0; round < 3; round++) await text('Not monitored. In an emergency call 911.');
		await sendDue(world.outbox);
		expect(texts()).toHaveLength(1);
		expect(await db.select().from(strayTexts)).toHaveLength(3);
		clock.forward(11 * 60);
		await text('she is limp');
		await sendDue(world.outbox);
		expect(texts()).toHaveLength(2);
	});

	it('that asks for help is answered in the name of the organisation, and still owed', async () => {
		const { entryId } = await text('HELP');
		await sendDue(world.outbox);
		expect(texts().map(({ body }) => body)).toEqual([
			expect.stringMatching(/^Test Organisation: call \(202\) 555-0110, .* 911/)
		]);
		expect((await strayOf(entryId))?.priority).toBe(5);
	});

	it.each(['STOP', 'Thank you!'])(
		'that says "%s" is owed by nobody and answered with nothing',
		async (words) => {
			await text(words);
			expect(await db.select().from(strayTexts)).toEqual([]);
			expect(await db.select().from(messages)).toEqual([]);
		}
	);

	it('is in the language of the organisation where none can be told, and says when the advice failed', async () => {
		fakes.troubles.order({ channel: 'sms', kind: 'invalid', times: 1, seconds: 0 });
		await text('911');
		await sendDue(world.outbox);
		expect(await db.select().from(messages)).toMatchObject([{ language: 'en', state: 'dead' }]);
		expect((await listStrays(ctx, eastDesk())).numbers[0]?.advice).toBe('not-sent');
	});
});

describe('It is about …', () => {
	it('puts all of the number into the thread, with its alerts, its answer and a line in the record', async () => {
		const first = await text('Is this the baby clinic?');
		await text('STOP');
		const last = await text('he is limp');
		await sendDue(world.outbox);
		const done = await assignStray(ctx, eastDesk(), { entryId: last.entryId, followUpId: eastNewborn() });
		expect(done.ok).toBe(true);

		expect((await db.select().from(threadEntries)).map(({ followUpId }) => followUpId)).toEqual(
			Array(3).fill(eastNewborn())
		);
		const owed = await db.select().from(alerts);
		expect(owed.map(({ kind, role, dueAt }) => [kind, role, dueAt])).toEqual(
			expect.arrayContaining([
				['words-from-family', 'desk', new Date(first.at.getTime() + 2 * HOUR)],
				['alarming-words', 'desk', last.at],
				['alarming-words', 'pediatrician', last.at]
			])
		);
		expect(owed).toHaveLength(3);
		expect(owed.find(({ kind }) => kind === 'words-from-family')?.detail).toBe(
			'From a number that is not on record; the thread shows it. The family wrote: Is this the baby clinic?'
		);
		const settled = { settledAs: 'assigned', settledBy: eastDesk().staffId, followUpId: eastNewborn() };
		expect(await db.select().from(strayTexts)).toMatchObject([settled, settled]);
		expect((await listStrays(ctx, eastDesk())).numbers).toEqual([]);
		expect(await audited()).toMatchObject([
			{
				action: 'stray-text.assigned',
				followUpId: eastNewborn(),
				staffId: eastDesk().staffId,
				detail: '2 texts'
			}
		]);
		const thread = await getThread(ctx, eastDesk(), eastNewborn());
		expect(thread.ok && thread.value.lines).toMatchObject([
			{ from: 'family', who: '(202) 555-0188', words: 'Is this the baby clinic?' },
			{ from: 'family', words: 'STOP' },
			{ from: 'family', words: 'he is limp', isAlarming: true, isUnassigned: false },
			{ from: 'clinic', kind: 'emergency-advice', state: 'sent', words: expect.stringContaining('911') }
		]);
	});

	it('is refused for a newborn of another clinic, without saying whether there is one', async () => {
		const { entryId } = await text('Can we come later?');
		const other = hospital.west.followUp.followUpId;
		const refused = await assignStray(ctx, eastDesk(), { entryId, followUpId: other });
		const unknown = await assignStray(ctx, eastDesk(), { entryId, followUpId: 'thereisnosuchone' });
		expect(refused).toMatchObject({ ok: false, error: { code: 'invalid', field: 'followUpId' } });
		expect(unknown).toEqual(refused);
		expect((await strayOf(entryId))?.settledAt).toBeNull();
		expect((await db.select().from(threadEntries))[0]?.followUpId).toBeNull();
		expect(await db.select().from(alerts)).toEqual([]);
	});

	it('tells the second of two people at once who was first, and changes nothing for them', async () => {
		const { entryId } = await text('My son is yellow');
		const both = await Promise.all([
			assignStray(ctx, eastDesk(), { entryId, followUpId: eastNewborn() }),
			dismissStray(ctx, westDesk(), { entryId, seenId: entryId, why: 'Wrong number' })
		]);
		const refused = both.filter(({ ok }) => !ok);
		expect(refused).toHaveLength(1);
		expect(refused[0]).toMatchObject({
			error: { code: 'conflict', message: expect.stringMatching(/^(East|West) desk .* before you/) }
		});
		const isAssigned = both[0].ok;
		expect(await strayOf(entryId)).toMatchObject({
			settledAs: isAssigned ? 'assigned' : 'not-ours',
			settledBy: isAssigned ? eastDesk().staffId : westDesk().staffId
		});
		expect(await db.select().from(alerts)).toHaveLength(isAssigned ? 1 : 0);
		expect(await audited()).toHaveLength(1);
		const page = await getStray(ctx, eastDesk(), entryId);
		expect(page.ok && page.value).toMatchObject({ number: null, settled: { by: expect.any(String) } });
	});

	it('is said in the thread too, once the number has become a carer’s', async () => {
		const { entryId } = await text('Can we come later?');
		const [carer] = await db
			.select()
			.from(carers)
			.where(eq(carers.newbornId, hospital.east.followUp.newbornId));
		await db
			.update(carers)
			.set({ phone: STRANGER })
			.where(eq(carers.id, carer?.id ?? ''));
		expect((await assignText(ctx, eastDesk(), { followUpId: eastNewborn(), entryId })).ok).toBe(true);
		expect(await strayOf(entryId)).toMatchObject({ settledAs: 'assigned', followUpId: eastNewborn() });
		expect(await db.select().from(alerts)).toMatchObject([{ kind: 'words-from-family' }]);
	});
});

describe('Not one of ours', () => {
	it('settles what was seen with its reason, and leaves what came meanwhile', async () => {
		const first = await text('Cheap tyres!');
		const second = await text('Cheap tyres, today only!');
		const asked = { entryId: first.entryId, seenId: first.entryId, why: 'Advertising' };
		expect((await dismissStray(ctx, westDesk(), asked)).ok).toBe(true);
		expect(await strayOf(first.entryId)).toMatchObject({
			settledAs: 'not-ours',
			reason: 'Advertising',
			settledBy: westDesk().staffId,
			followUpId: null
		});
		expect((await strayOf(second.entryId))?.settledAt).toBeNull();
		expect(await audited()).toMatchObject([
			{ action: 'stray-text.not-ours', detail: 'Advertising', staffId: westDesk().staffId }
		]);
		expect(await dismissStray(ctx, eastDesk(), asked)).toMatchObject({
			ok: false,
			error: {
				code: 'conflict',
				message: expect.stringContaining('West desk marked this text as not one of ours')
			}
		});
	});
});

describe('another organisation', () => {
	it('neither sees nor settles it', async () => {
		const organisationId = await makeOrganisation(db, { createdAt: new Date(Date.now() + 60_000) });
		const siteId = await makeSite(db, { organisationId, kind: 'clinic' });
		const { actor } = await makeStaff(db, { organisationId, roles: [{ role: 'desk', siteId }] });
		const { entryId } = await text('he is limp');
		expect((await getQueue(ctx, actor, { limit: 10 })).strays).toEqual([]);
		const notFound = { ok: false, error: { code: 'not_found' } };
		expect(await getStray(ctx, actor, entryId)).toEqual(notFound);
		expect(await assignStray(ctx, actor, { entryId, followUpId: eastNewborn() })).toEqual(notFound);
		expect(await dismissStray(ctx, actor, { entryId, seenId: entryId, why: 'x' })).toEqual(notFound);
		expect(
			await dismissStray(ctx, hospital.east.nurse.actor, { entryId, seenId: entryId, why: 'x' })
		).toEqual(notFound);
		expect((await strayOf(entryId))?.settledAt).toBeNull();
	});
});

describe('the watch', () => {
	const found = async () =>
		(await db.select().from(watchFindings)).filter(
			({ kind, settledAt }) => kind === 'stray-text-overdue' && settledAt === null
		);

	it('finds a text past its time, in words and without its number, until it is settled', async () => {
		const { entryId } = await text('Can we come an hour later?');
		clock.forward(2 * 3_600 + 29 * 60);
		await watch(ctx);
		expect(await found()).toEqual([]);
		clock.forward(60);
		await watch(ctx);
		await watch(ctx);
		expect(await found()).toMatchObject([
			{
				subject: entryId,
				detail: expect.stringContaining('A text from a number of no family was to be read by')
			}
		]);
		expect((await found())[0]?.detail).not.toContain('555');
		expect((await db.select().from(messages)).filter(({ kind }) => kind === 'duty-finding')).not.toEqual([]);
		await dismissStray(ctx, eastDesk(), { entryId, seenId: entryId, why: 'Wrong number' });
		await watch(ctx);
		expect(await found()).toEqual([]);
	});

	it('finds an alarming one after ten minutes', async () => {
		await text('he is limp');
		clock.forward(10 * 60);
		await watch(ctx);
		expect(await found()).toMatchObject([{ detail: expect.stringContaining('with alarming words') }]);
	});
});

it('texts that came before anybody owed them are owed by the migration', async () => {
	const waits = await text('Can we come an hour later?');
	const alarms = await text('he is limp');
	await text('STOP');
	await db.delete(strayTexts);
	await database.pool.query(readFileSync('drizzle/0008_owe_earlier_stray_texts.sql', 'utf8'));
	const owed = await db.select().from(strayTexts);
	expect(owed.map(({ entryId, priority, dueAt }) => [entryId, priority, dueAt])).toEqual(
		expect.arrayContaining([
			[waits.entryId, 5, new Date(waits.at.getTime() + 2 * HOUR)],
			[alarms.entryId, 0, alarms.at]
		])
	);
	expect(owed).toHaveLength(2);
});
