import { beforeEach, describe, expect, test } from 'vitest';
import { getCallPanel } from '../../src/lib/server/services/call-panel';
import { approveOutsideWindow, askOutsideWindow } from '../../src/lib/server/services/outside-window';
import { handOver } from '../../src/lib/server/services/discharges';
import { bookVisit } from '../../src/lib/server/services/visits';
import { openTestDatabase } from '../support/database';
import { must, openWorld, type World } from '../support/follow-up-world';

const database = await openTestDatabase();

describe('a visit outside the window', () => {
	let world: World;
	let followUpId: string;
	beforeEach(async () => {
		await database.clean();
		world = await openWorld(database);
		followUpId = await world.enter();
		must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
	});

	const panel = async () => must(await getCallPanel(world.ctx, world.east.desk.actor, followUpId));
	const outside = async () => {
		const place = (await panel()).places.outside.at(-1);
		if (!place) throw new Error('The clinic has a place outside the window.');
		return { startsAt: place.startsAt, kind: place.kind };
	};
	const ask = async (why = 'Both parents work until Friday.') =>
		askOutsideWindow(world.ctx, world.east.desk.actor, { followUpId, why, ...(await outside()) });

	test('is asked for, owed by the pediatrician with a due time, and books nothing', async () => {
		must(await ask());
		const { asked, row } = await panel();
		expect(asked).toHaveLength(1);
		expect(asked[0]).toMatchObject({ role: 'pediatrician', visitKind: 'check' });
		expect(asked[0]?.detail).toContain('Both parents work until Friday.');
		expect(asked[0]?.dueAt.getTime()).toBeGreaterThan(world.clock.now().getTime());
		expect(row.visit).toBeNull();
		expect(row.stage).toBe('to-book');
	});

	test('is not booked by the desk, asked or not', async () => {
		must(await ask());
		const place = await outside();
		const tried = await bookVisit(world.ctx, world.east.desk.actor, {
			followUpId,
			...place,
			outsideWindowWhy: 'asked'
		});
		expect(tried).toMatchObject({ ok: false, error: { code: 'invalid' } });
		const [asked] = (await panel()).asked;
		const approved = await approveOutsideWindow(world.ctx, world.east.desk.actor, {
			alertId: asked?.id ?? '',
			why: 'me'
		});
		expect(approved).toEqual({ ok: false, error: { code: 'not_allowed' } });
	});

	test('is booked when the pediatrician approves, with the reason, and the question is settled', async () => {
		const place = await outside();
		must(await ask());
		const [asked] = (await panel()).asked;
		const { pediatrician } = world.east;
		must(
			await approveOutsideWindow(world.ctx, pediatrician.actor, {
				alertId: asked?.id ?? '',
				why: 'Low risk.'
			})
		);
		const after = await panel();
		expect(after.row.visit).toMatchObject({ startsAt: place.startsAt, isOutsideWindow: true });
		expect(after.asked).toEqual([]);
		expect(after.settled[0]?.settledHow).toBe('Approved: Low risk.');
		const again = await approveOutsideWindow(world.ctx, pediatrician.actor, {
			alertId: asked?.id ?? '',
			why: 'twice'
		});
		expect(again).toMatchObject({ ok: false, error: { code: 'conflict' } });
	});

	test('moves the visit that stands', async () => {
		const inside = await world.firstPlace(followUpId);
		must(await bookVisit(world.ctx, world.east.desk.actor, { followUpId, ...inside }));
		const place = await outside();
		must(await ask());
		const [asked] = (await panel()).asked;
		must(
			await approveOutsideWindow(world.ctx, world.east.pediatrician.actor, {
				alertId: asked?.id ?? '',
				why: 'Value low.'
			})
		);
		expect((await panel()).row.visit).toMatchObject({ startsAt: place.startsAt, isOutsideWindow: true });
	});

	test('is refused: inside the window, no such place, asked twice, another clinic’s pediatrician', async () => {
		const inside = await world.firstPlace(followUpId);
		const desk = world.east.desk.actor;
		const why = 'because';
		expect(await askOutsideWindow(world.ctx, desk, { followUpId, why, ...inside })).toMatchObject({
			error: { code: 'invalid', message: expect.stringContaining('inside the window') }
		});
		const place = await outside();
		const odd = new Date(place.startsAt.getTime() + 60_000);
		expect(
			await askOutsideWindow(world.ctx, desk, { followUpId, why, kind: place.kind, startsAt: odd })
		).toMatchObject({
			error: { code: 'invalid', message: expect.stringContaining('not free') }
		});
		must(await ask());
		expect(await ask()).toMatchObject({ error: { code: 'conflict' } });
		const [asked] = (await panel()).asked;
		const west = world.hospital.west.pediatrician.actor;
		expect(await approveOutsideWindow(world.ctx, west, { alertId: asked?.id ?? '', why })).toEqual({
			ok: false,
			error: { code: 'not_found' }
		});
	});
});
