import ICAL from 'ical.js';
import { beforeEach, describe, expect, it } from 'vitest';
import {
	listCalendarFeeds,
	makeCalendarFeed,
	readCalendarFeed,
	readParentCalendar,
	revokeCalendarFeed
} from '../../src/lib/server/services/calendar-feeds';
import { ensureParentLink, findByToken, revokeParentLink } from '../../src/lib/server/services/parent-links';
import { cancelVisit, moveVisit } from '../../src/lib/server/services/visits';
import { withTx } from '../../src/lib/server/db/tx';
import { fixedClock, testContext } from '../support/context';
import { openTestDatabase } from '../support/database';
import { book, local, makeFamily, sendDue } from './family';

function read(ics: string) {
	const calendar = new ICAL.Component(ICAL.parse(ics));
	const events = calendar.getAllSubcomponents('vevent').map((component) => {
		const event = new ICAL.Event(component);
		const text = (name: string) => String(component.getFirstPropertyValue(name) ?? '');
		const startsAt = event.startDate.toJSDate().toISOString();
		return {
			uid: event.uid,
			sequence: event.sequence,
			title: event.summary,
			startsAt,
			status: text('status')
		};
	});
	return { method: String(calendar.getFirstPropertyValue('method') ?? ''), events, ics };
}

describe('calendars', async () => {
	const database = await openTestDatabase();
	beforeEach(() => database.clean());

	it('follow a visit by mail through a move and a cancellation', async () => {
		const clock = fixedClock(local('2026-03-03T10:00'));
		const ctx = testContext(database, clock);
		const family = await makeFamily(ctx);
		const { followUpId, desk } = family;
		const invitation = async () => {
			const mails = (await sendDue(ctx, followUpId)).filter(({ row }) => row.channel === 'mail');
			expect(mails).toHaveLength(1);
			const [file] = mails[0]?.result.attachments ?? [];
			expect(file?.filename).toBe('visit.ics');
			return { ...read(file?.content ?? ''), declared: file?.method };
		};
		const startsAt = local('2026-03-05T09:00');
		await book(ctx, family, startsAt);
		const booked = await invitation();
		expect(booked).toMatchObject({ method: 'REQUEST', declared: 'REQUEST' });
		expect(booked.events[0]).toMatchObject({
			sequence: 0,
			startsAt: startsAt.toISOString(),
			status: 'CONFIRMED'
		});

		clock.advance({ minutes: 5 });
		const later = local('2026-03-05T08:30');
		await moveVisit(ctx, desk, { followUpId, startsAt: later, kind: 'check', why: 'asked' });
		const moved = await invitation();
		expect(moved.method).toBe('REQUEST');
		expect(moved.events[0]).toMatchObject({ uid: booked.events[0]?.uid, startsAt: later.toISOString() });
		expect(moved.events[0]?.sequence).toBeGreaterThan(booked.events[0]?.sequence ?? 0);

		clock.advance({ minutes: 5 });
		await cancelVisit(ctx, desk, { followUpId, why: 'closed' });
		const cancelled = await invitation();
		expect(cancelled).toMatchObject({ method: 'CANCEL', declared: 'CANCEL' });
		expect(cancelled.events[0]).toMatchObject({ uid: booked.events[0]?.uid, status: 'CANCELLED' });
		expect(cancelled.events[0]?.sequence).toBeGreaterThan(moved.events[0]?.sequence ?? 0);
	});

	it('are added by a family from its link, until the link is revoked', async () => {
		const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
		const family = await makeFamily(ctx);
		const { followUpId, carerId } = family;
		await book(ctx, family, local('2026-03-05T09:00'));
		const link = await withTx(ctx.db, (tx) => ensureParentLink(tx, ctx, followUpId, carerId));
		const token = link.url.split('/v/')[1] ?? '';
		expect(token).toHaveLength(22);
		const calendar = read((await readParentCalendar(ctx, token)) ?? '');
		expect(calendar).toMatchObject({ method: 'PUBLISH', events: [{ title: 'East clinic', sequence: 0 }] });
		expect(calendar.ics).not.toContain('Testfamily');
		await withTx(ctx.db, (tx) => revokeParentLink(tx, ctx, followUpId, carerId));
		expect(await readParentCalendar(ctx, token)).toBeNull();
		expect(await findByToken(ctx.db, ctx, token)).toMatchObject({ state: 'ended' });
		const renewed = await withTx(ctx.db, (tx) => ensureParentLink(tx, ctx, followUpId, carerId));
		expect(renewed.url).not.toBe(link.url);
	});

	it('of staff hold time, kind and initials, and end with the link or the role', async () => {
		const ctx = testContext(database, fixedClock(local('2026-03-03T10:00')));
		const family = await makeFamily(ctx);
		const { desk, clinicId, hospital } = family;
		await book(ctx, family, local('2026-03-05T09:00'));
		expect((await makeCalendarFeed(ctx, desk, hospital.west.clinicId)).ok).toBe(false);
		const made = await makeCalendarFeed(ctx, desk, clinicId);
		if (!made.ok) throw new Error('no feed');
		const token = made.value.url.split('/feeds/')[1] ?? '';
		const feed = read((await readCalendarFeed(ctx, token)) ?? '');
		expect(feed.events).toMatchObject([
			{ title: 'Check NT', startsAt: local('2026-03-05T09:00').toISOString() }
		]);
		expect(feed.ics).not.toMatch(/Testfamily|Newborn,/);

		await database.pool.query('delete from staff_roles where staff_id = ?', [desk.staffId]);
		expect(await readCalendarFeed(ctx, token)).toBeNull();
		const [row] = (await listCalendarFeeds(ctx, desk)).feeds;
		expect((await revokeCalendarFeed(ctx, hospital.west.desk.actor, row?.id ?? '')).ok).toBe(false);
		expect((await revokeCalendarFeed(ctx, desk, row?.id ?? '')).ok).toBe(true);
		expect((await listCalendarFeeds(ctx, desk)).feeds).toEqual([]);
	});
});
