import { beforeEach, describe, expect, test } from 'vitest';
import { closedDays, openings } from '../../src/lib/server/db/schema/organisation';
import { systemRandom } from '../../src/lib/server/random';
import { getCalendar } from '../../src/lib/server/services/desk-calendar';
import { handOver } from '../../src/lib/server/services/discharges';
import { getMorning } from '../../src/lib/server/services/morning';
import { cancelVisit, confirmVisit, markArrived, markMissed } from '../../src/lib/server/services/visits';
import { eq } from 'drizzle-orm';
import { openTestDatabase } from '../support/database';
import { must, openWorld, type World } from '../support/follow-up-world';

const database = await openTestDatabase();

describe('the calendar and the morning list', () => {
	let world: World;
	let followUpId: string;
	let startsAt: Date;
	beforeEach(async () => {
		await database.clean();
		world = await openWorld(database);
		followUpId = await world.enter();
		const place = await world.firstPlace(followUpId);
		startsAt = place.startsAt;
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place }));
	});

	const calendar = async (set: { on?: string; forId?: string } = {}) =>
		must(await getCalendar(world.ctx, world.east.desk.actor, set));
	const dayOf = (at: Date) => at.toLocaleDateString('en-CA', { timeZone: 'America/Chicago' });
	const morning = async (at = startsAt) =>
		must(await getMorning(world.ctx, world.east.desk.actor, { on: dayOf(at) }));
	const untilVisit = () =>
		world.clock.advance({ minutes: (startsAt.getTime() - world.clock.now().getTime()) / 60_000 });

	test('counts taken and free places of each day', async () => {
		const { days, on, todayOn } = await calendar();
		expect(days.map((day) => day.on)).toEqual([
			'2026-03-02',
			'2026-03-03',
			'2026-03-04',
			'2026-03-05',
			'2026-03-06',
			'2026-03-07',
			'2026-03-08'
		]);
		expect([on, todayOn]).toEqual(['2026-03-02', '2026-03-02']);
		const day = days.find((one) => one.on === dayOf(startsAt));
		// 08:00 to 18:00, two at once every half hour.
		expect(day).toMatchObject({ taken: 1, free: 39 });
		const time = day?.openings[0]?.times.find((one) => one.startsAt.getTime() === startsAt.getTime());
		expect(time).toMatchObject({ free: 1, taken: [{ followUpId, state: 'booked' }] });
	});

	test('keeps wall-clock times over the change to summer time', async () => {
		const { days } = await calendar({ on: '2026-03-08' });
		const sunday = days.find((day) => day.on === '2026-03-08');
		expect(sunday?.openings[0]?.times[0]?.startsAt.toISOString()).toBe('2026-03-08T13:00:00.000Z');
		const saturday = days.find((day) => day.on === '2026-03-07');
		expect(saturday?.openings[0]?.times[0]?.startsAt.toISOString()).toBe('2026-03-07T14:00:00.000Z');
	});

	test('shows a closed day with its reason, and a visit that still stands on it', async () => {
		await world.ctx.db.insert(closedDays).values({
			id: systemRandom.id(),
			siteId: world.east.clinicId,
			closedOn: dayOf(startsAt),
			reason: 'Water pipe burst'
		});
		const day = (await calendar({ on: dayOf(startsAt) })).days.find((one) => one.on === dayOf(startsAt));
		expect(day).toMatchObject({ closedBecause: 'Water pipe burst', free: 0, taken: 1 });
		expect(day?.openings).toMatchObject([{ hours: null, times: [{ taken: [{ followUpId }] }] }]);
		expect((await morning()).closedBecause).toBe('Water pipe burst');
	});

	test('does not lose a visit whose opening was taken out of use', async () => {
		await world.ctx.db
			.update(openings)
			.set({ isActive: false })
			.where(eq(openings.siteId, world.east.clinicId));
		const day = (await calendar({ on: dayOf(startsAt) })).days.find((one) => one.on === dayOf(startsAt));
		expect(day?.openings).toMatchObject([{ hours: null, times: [{ taken: [{ followUpId }] }] }]);
	});

	test('a cancelled visit leaves the calendar and frees its place', async () => {
		must(await cancelVisit(world.ctx, world.east.desk.actor, { followUpId, why: 'ill' }));
		const day = (await calendar({ on: dayOf(startsAt) })).days.find((one) => one.on === dayOf(startsAt));
		expect(day).toMatchObject({ taken: 0, free: 40 });
		expect((await morning()).rows).toEqual([]);
	});

	test('marks the times inside the window of the newborn that a place is chosen for', async () => {
		const view = await calendar({ forId: followUpId });
		const window = view.choosingFor?.window;
		const times = view.days.flatMap((day) => day.openings.flatMap((opening) => opening.times));
		expect(times.filter((time) => time.isInsideWindow).length).toBeGreaterThan(0);
		for (const time of times) {
			expect(time.isInsideWindow).toBe(
				window ? time.startsAt >= window.from && time.startsAt <= window.until : null
			);
		}
		expect((await calendar()).days[0]?.openings[0]?.times[0]?.isInsideWindow).toBeNull();
	});

	test('does not exist for another clinic’s desk, nor for a nurse', async () => {
		const { west } = world.hospital;
		expect(await getCalendar(world.ctx, west.desk.actor, { forId: followUpId })).toMatchObject({ ok: false });
		expect(await getCalendar(world.ctx, world.east.nurse.actor, {})).toMatchObject({ ok: false });
		const own = must(await getCalendar(world.ctx, west.desk.actor, { clinicId: world.east.clinicId }));
		expect(own.clinic.id).toBe(west.clinicId);
	});

	test('the morning list offers what may be marked at that moment, and no more', async () => {
		expect((await morning()).rows).toMatchObject([
			{ followUpId, state: 'booked', mayConfirm: true, mayArrive: true, mayMiss: false }
		]);
		must(await confirmVisit(world.ctx, world.east.desk.actor, { followUpId, via: 'at-desk' }));
		untilVisit();
		expect((await morning()).rows).toMatchObject([{ state: 'confirmed', mayConfirm: false, mayMiss: true }]);
		must(await markMissed(world.ctx, world.east.desk.actor, { followUpId }));
		expect((await morning()).rows).toMatchObject([{ state: 'missed', mayArrive: true, mayMiss: false }]);
		must(await markArrived(world.ctx, world.east.desk.actor, { followUpId }));
		expect((await morning()).rows).toMatchObject([{ state: 'arrived', mayArrive: false, mayMiss: false }]);
	});
});
