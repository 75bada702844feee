import { beforeEach, describe, expect, test } from 'vitest';
import { getCallPanel } from '../../src/lib/server/services/call-panel';
import { getQueue } from '../../src/lib/server/services/queue';
import { raiseAlert, settleAlert } from '../../src/lib/server/services/alerts';
import { logAttempt } from '../../src/lib/server/services/attempts';
import { closeFollowUp } from '../../src/lib/server/services/decisions';
import { handOver } from '../../src/lib/server/services/discharges';
import { bookVisit, confirmVisit, markMissed } from '../../src/lib/server/services/visits';
import { withTx } from '../../src/lib/server/db/tx';
import { readDeskJson } from '../../src/lib/schemas/desk-view';
import { openTestDatabase } from '../support/database';
import { must, openWorld, type World } from '../support/follow-up-world';

const database = await openTestDatabase();

describe('the front desk’s queue', () => {
	let world: World;
	beforeEach(async () => {
		await database.clean();
		world = await openWorld(database);
	});

	const queue = (limit = 100, group?: 'needs-visit' | 'not-confirmed' | 'did-not-come' | 'needs-call') =>
		getQueue(world.ctx, world.east.desk.actor, { limit, group });
	const atHome = async (place: 'with-visit' | 'without') => {
		const followUpId = await world.enter();
		const chosen = place === 'with-visit' ? await world.firstPlace(followUpId) : null;
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: chosen }));
		return followUpId;
	};
	const groupsOf = async (followUpId: string) =>
		(await queue()).rows.find((row) => row.followUpId === followUpId)?.groups ?? null;
	const raise = (followUpId: string, kind: 'check-in-call-back' | 'check-in-emergency', dedupeKey: string) =>
		withTx(world.ctx.db, (tx) =>
			raiseAlert(tx, world.ctx, {
				followUpId,
				kind,
				role: 'desk',
				siteId: world.east.clinicId,
				dueAt: new Date(world.clock.now().getTime() + 3_600_000),
				detail: 'Fewer feeds than the day asks.',
				dedupeKey
			})
		);

	test('follows a newborn from hand-over to missed', async () => {
		const followUpId = await world.enter();
		expect(await groupsOf(followUpId), 'the nurse still owes it').toBeNull();
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
		expect(await groupsOf(followUpId)).toEqual(['needs-visit']);
		const { desk } = world.east;
		const place = await world.firstPlace(followUpId);
		must(await bookVisit(world.ctx, desk.actor, { followUpId, ...place }));
		expect(await groupsOf(followUpId)).toEqual(['not-confirmed']);
		must(await confirmVisit(world.ctx, desk.actor, { followUpId, via: 'call' }));
		expect(await groupsOf(followUpId), 'nothing is owed until the visit').toBeNull();
		const untilVisit = (place.startsAt.getTime() - world.clock.now().getTime()) / 60_000;
		world.clock.advance({ minutes: untilVisit + 31 });
		expect(await groupsOf(followUpId), 'nobody marked it').toEqual(['did-not-come']);
		must(await markMissed(world.ctx, desk.actor, { followUpId }));
		expect(await groupsOf(followUpId)).toEqual(['did-not-come']);
	});

	test('brings in a confirmed newborn whose family answered, and lets it go when that is settled', async () => {
		const followUpId = await atHome('with-visit');
		must(await confirmVisit(world.ctx, world.east.desk.actor, { followUpId, via: 'call' }));
		await raise(followUpId, 'check-in-call-back', 'one');
		const { rows, counts } = await queue(100, 'needs-call');
		expect(rows.map((row) => row.followUpId)).toEqual([followUpId]);
		expect(counts['needs-call']).toBe(1);
		const alertId = rows[0]?.alerts[0]?.id ?? '';
		must(await settleAlert(world.ctx, world.east.desk.actor, { alertId, how: 'Called, feeds better.' }));
		expect(await groupsOf(followUpId)).toBeNull();
	});

	test('brings in a closed newborn whose family writes after the end, and only then', async () => {
		const followUpId = await atHome('with-visit');
		const { pediatrician } = world.east;
		const end = { followUpId, outcome: 'care-transferred', why: 'Seen elsewhere.' } as const;
		must(await closeFollowUp(world.ctx, pediatrician.actor, end));
		expect(await groupsOf(followUpId)).toBeNull();
		await raise(followUpId, 'check-in-emergency', 'after the end');
		const { rows } = await queue();
		expect(rows[0]).toMatchObject({ followUpId, stage: 'closed', nextStep: null, groups: ['needs-call'] });
		must(await getCallPanel(world.ctx, world.east.desk.actor, followUpId));
	});

	test('puts an emergency first and counts every newborn once', async () => {
		const calm = await atHome('without');
		const urgent = await atHome('with-visit');
		await raise(urgent, 'check-in-emergency', 'two');
		const { rows, all, total } = await queue();
		expect(rows[0]?.followUpId).toBe(urgent);
		expect(rows.map((row) => row.followUpId)).toContain(calm);
		expect(new Set(rows.map((row) => row.followUpId)).size).toBe(rows.length);
		expect([all, total]).toEqual([rows.length, rows.length]);
	});

	test('shows a clinic’s newborns to that clinic’s desk only', async () => {
		const followUpId = await atHome('without');
		const west = await getQueue(world.ctx, world.hospital.west.desk.actor, { limit: 100 });
		expect(west.rows.map((row) => row.followUpId)).not.toContain(followUpId);
		const asked = await getQueue(world.ctx, world.hospital.west.desk.actor, {
			limit: 100,
			clinicId: world.east.clinicId
		});
		expect(asked.rows.map((row) => row.followUpId)).not.toContain(followUpId);
		const nurse = await getQueue(world.ctx, world.east.nurse.actor, { limit: 100 });
		expect(nurse).toMatchObject({ rows: [], all: 0, clinics: [] });
	});

	test('shows the latest value and no other, and survives the way to the browser', async () => {
		const measured = (hoursAgo: number, total: number) => ({
			method: 'serum' as const,
			measuredAt: new Date(world.clock.now().getTime() - hoursAgo * 3_600_000),
			total,
			direct: null,
			unit: 'mg/dL' as const
		});
		const followUpId = await world.enter({ measurements: [measured(20, 6.1), measured(4, 10.9)] });
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
		const view = await queue();
		const row = view.rows.find((one) => one.followUpId === followUpId);
		expect(row?.hourLine.measurements?.map(({ total }) => total)).toEqual([10.9]);
		expect(JSON.stringify(view)).not.toContain('6.1,');
		expect(readDeskJson(JSON.stringify(view))).toEqual(view);
	});

	test('shows no more rows than asked for, and says how many there are', async () => {
		for (let i = 0; i < 3; i++) await atHome('without');
		const { rows, total } = await queue(2, 'needs-visit');
		expect(rows).toHaveLength(2);
		expect(total).toBeGreaterThanOrEqual(3);
	});
});

describe('the call panel', () => {
	let world: World;
	beforeEach(async () => {
		await database.clean();
		world = await openWorld(database);
	});

	test('offers the places inside the window, apart from those outside it', async () => {
		const followUpId = await world.enter();
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
		const panel = must(await getCallPanel(world.ctx, world.east.desk.actor, followUpId));
		const { window } = (await world.state(followUpId)).state;
		expect(window).not.toBeNull();
		expect(panel.aims).toEqual(['make-visit']);
		expect(panel.places.inside.length).toBeGreaterThan(0);
		expect(panel.places.outside.length).toBeGreaterThan(0);
		for (const { startsAt } of panel.places.inside) {
			expect(window && startsAt >= window.from && startsAt <= window.until).toBe(true);
		}
		for (const { startsAt } of panel.places.outside) {
			expect(window && startsAt >= window.from && startsAt <= window.until).toBe(false);
		}
		expect(panel.may).toEqual({ log: true, manage: true, settle: true, approve: false });
	});

	test('shows the ladder and the calls once a family is missing', async () => {
		const followUpId = await world.enter();
		const place = await world.firstPlace(followUpId);
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place }));
		world.clock.advance({ minutes: (place.startsAt.getTime() - world.clock.now().getTime()) / 60_000 + 90 });
		const { desk } = world.east;
		must(await markMissed(world.ctx, desk.actor, { followUpId }));
		const call = {
			followUpId,
			carerId: null,
			channel: 'call',
			outcome: 'no-answer',
			note: 'rang long'
		} as const;
		must(await logAttempt(world.ctx, desk.actor, call));
		const panel = must(await getCallPanel(world.ctx, desk.actor, followUpId));
		expect(panel.aims).toContain('did-not-come');
		expect(panel.ladder.find(({ rung }) => rung === 'first-call')).toMatchObject({
			isDue: true,
			isTried: true
		});
		expect(panel.attempts[0]).toMatchObject({
			outcome: 'no-answer',
			note: 'rang long',
			staffName: desk.actor.name
		});
		expect(panel.row.lastContact).toMatchObject({ kind: 'attempt', outcome: 'no-answer' });
	});

	test('does not exist for another clinic, nor for a nurse', async () => {
		const followUpId = await world.enter();
		for (const actor of [
			world.hospital.west.desk.actor,
			world.east.nurse.actor,
			world.hospital.admin.actor
		]) {
			const panel = await getCallPanel(world.ctx, actor, followUpId);
			expect(panel).toEqual({ ok: false, error: { code: 'not_found' } });
		}
	});
});
