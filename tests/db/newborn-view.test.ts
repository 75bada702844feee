import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { followUps } from '../../src/lib/server/db/schema/follow-up';
import { measurements } from '../../src/lib/server/db/schema/newborn';
import { raiseAlert, settleAlert } from '../../src/lib/server/services/alerts';
import { decide } from '../../src/lib/server/services/decisions';
import { handOver } from '../../src/lib/server/services/discharges';
import { recordMeasurement, strikeMeasurement } from '../../src/lib/server/services/measurements';
import { getMeasures, listMeasuredSites } from '../../src/lib/server/services/measures';
import { getNewbornView } from '../../src/lib/server/services/newborn-view';
import { confirmVisit, markArrived, markMissed } from '../../src/lib/server/services/visits';
import { listWaiting } from '../../src/lib/server/services/waiting';
import { withTx } from '../../src/lib/server/db/tx';
import { openTestDatabase } from '../support/database';
import { must, openWorld } from '../support/follow-up-world';

const database = await openTestDatabase();
beforeEach(database.clean);

const HOUR = 3_600_000;

async function openWithValues() {
	const world = await openWorld(database);
	const { ctx, clock, east, enter } = world;
	const home = async (total: number | null) => {
		const followUpId = await enter();
		must(await handOver(ctx, east.nurse.actor, { followUpId, place: null }));
		if (total === null) return followUpId;
		const measurement = {
			method: 'serum',
			measuredAt: clock.now(),
			total,
			direct: null,
			unit: 'mg/dL'
		} as const;
		must(await recordMeasurement(ctx, east.pediatrician.actor, { followUpId, measurement }));
		return followUpId;
	};
	return { ...world, home };
}

describe('the page of one newborn', () => {
	it('gives the pediatrician every value, the result, and what accepting it comes to', async () => {
		const { ctx, east, home } = await openWithValues();
		const view = must(await getNewbornView(ctx, east.pediatrician.actor, await home(12)));
		expect(view.may).toEqual({
			seeValues: true,
			recordValues: true,
			decide: true,
			settle: true,
			seeThread: true
		});
		expect(view.measurements.map(({ total }) => total)).toEqual([10.9, 12]);
		expect(view.values?.assessment?.disposition).toBe('follow-up');
		expect(view.values?.recommended?.decision?.then).toBe('repeat');
		expect(view.transitions.map(({ kind }) => kind)).toContain('value-recorded');
	});

	it('gives the desk the latest value and nothing clinical besides', async () => {
		const { ctx, east, home } = await openWithValues();
		const followUpId = await home(12);
		const reason = 'Mother is group O and worried.';
		const decision = {
			then: 'check-later',
			at: new Date(ctx.clock.now().getTime() + 99 * HOUR),
			asks: 'Colour?'
		} as const;
		must(await decide(ctx, east.pediatrician.actor, { followUpId, decision, reason }));
		const view = must(await getNewbornView(ctx, east.desk.actor, followUpId));
		expect(view.may).toMatchObject({ seeValues: false, recordValues: false, decide: false, settle: true });
		expect(view.measurements.map(({ total }) => total)).toEqual([12]);
		expect(view.latest?.difference).toBeGreaterThan(0);
		expect([view.values, view.weights, view.decisions]).toEqual([null, [], []]);
		expect(view.transitions.map(({ why }) => why)).not.toContain(reason);
		expect(view.carers).toHaveLength(1);
	});

	it('lets the nurse of the birth unit look at the values, and change nothing', async () => {
		const { ctx, east, home } = await openWithValues();
		const view = must(await getNewbornView(ctx, east.nurse.actor, await home(12)));
		expect(view.may).toEqual({
			seeValues: true,
			recordValues: false,
			decide: false,
			settle: false,
			seeThread: true
		});
		expect(view.mergeTargets).toEqual([]);
	});

	it('does not exist for other sites and for administrators', async () => {
		const { ctx, hospital, home } = await openWithValues();
		const followUpId = await home(12);
		for (const { actor } of [
			hospital.west.pediatrician,
			hospital.west.desk,
			hospital.west.nurse,
			hospital.admin
		]) {
			expect(await getNewbornView(ctx, actor, followUpId)).toEqual({
				ok: false,
				error: { code: 'not_found' }
			});
		}
	});

	it('keeps a struck value in sight, out of the result, and away from the desk', async () => {
		const { ctx, east, home } = await openWithValues();
		const followUpId = await home(19);
		const [wrong] = await database.db.select().from(measurements).where(eq(measurements.total, 19));
		const why = 'Another newborn.';
		must(
			await strikeMeasurement(ctx, east.pediatrician.actor, {
				followUpId,
				measurementId: wrong?.id ?? '',
				why
			})
		);
		const view = must(await getNewbornView(ctx, east.pediatrician.actor, followUpId));
		expect(view.measurements.find(({ id }) => id === wrong?.id)).toMatchObject({ struckBecause: why });
		expect(view.values?.input.bilirubin.map(({ total }) => total)).toEqual([10.9]);
		const desk = must(await getNewbornView(ctx, east.desk.actor, followUpId));
		expect(desk.measurements.map(({ total }) => total)).toEqual([10.9]);
	});

	it('has nothing to accept once the window of the standard has passed', async () => {
		const { ctx, clock, east, home } = await openWithValues();
		const followUpId = await home(12);
		clock.advance({ days: 5 });
		const view = must(await getNewbornView(ctx, east.pediatrician.actor, followUpId));
		expect(view.values?.recommended).toMatchObject({ decision: null, hasPassed: true });
	});
});

describe('waiting for a pediatrician', () => {
	it('lists a value at the line first, then by due time, and what others owe not at all', async () => {
		const { ctx, clock, east, hospital, home } = await openWithValues();
		await home(null);
		const earlier = await home(11);
		clock.advance({ hours: 1 });
		const later = await home(11.5);
		clock.advance({ minutes: 5 });
		const atLine = await home(20);
		const rows = await listWaiting(ctx, east.pediatrician.actor);
		expect(rows.map(({ followUpId }) => followUpId)).toEqual([atLine, earlier, later]);
		expect(rows[0]?.owed[0]).toMatchObject({ what: { is: 'step', kind: 'decide' }, rank: 0 });
		expect(rows[0]?.assessment?.difference).toBeLessThan(0);
		expect(await listWaiting(ctx, hospital.west.pediatrician.actor)).toEqual([]);
		expect(await listWaiting(ctx, east.desk.actor)).toEqual([]);
	});

	it('lists an alert beside the step it belongs to, until it is settled', async () => {
		const { ctx, east, home } = await openWithValues();
		const followUpId = await home(null);
		const alert = {
			followUpId,
			kind: 'check-in-emergency',
			role: 'pediatrician',
			siteId: east.clinicId,
			dueAt: ctx.clock.now(),
			detail: 'The baby is limp.',
			dedupeKey: 'k'
		} as const;
		await withTx(ctx.db, (tx) => raiseAlert(tx, ctx, alert));
		const [row] = await listWaiting(ctx, east.pediatrician.actor);
		expect(row?.owed).toMatchObject([
			{ what: { kind: 'check-in-emergency' }, why: 'The baby is limp.', rank: 0 }
		]);
		must(
			await settleAlert(ctx, east.pediatrician.actor, { alertId: row?.owed[0]?.id ?? '', how: 'Called.' })
		);
		expect(await listWaiting(ctx, east.pediatrician.actor)).toEqual([]);
	});

	it('lists what has climbed to this person by name, whoever owed it first', async () => {
		const { ctx, east, home } = await openWithValues();
		const followUpId = await home(null);
		const { staffId } = east.pediatrician.actor;
		await database.db
			.update(followUps)
			.set({ nextStepStaffId: staffId, nextStepClimb: 1 })
			.where(eq(followUps.id, followUpId));
		const [row] = await listWaiting(ctx, east.pediatrician.actor);
		expect(row?.owed).toMatchObject([{ what: { kind: 'book-visit' }, isByName: true }]);
	});
});

describe('measures', () => {
	it('are counted from what happened, for the clinic and for the birth unit', async () => {
		const { ctx, clock, east, enter, firstPlace } = await openWithValues();
		const kept = await enter();
		const missed = await enter();
		const place = await firstPlace(kept);
		for (const followUpId of [kept, missed])
			must(await handOver(ctx, east.nurse.actor, { followUpId, place }));
		must(await confirmVisit(ctx, east.desk.actor, { followUpId: kept, via: 'call' }));
		clock.advance({ hours: (place.startsAt.getTime() - clock.now().getTime()) / HOUR + 0.5 });
		must(await markArrived(ctx, east.desk.actor, { followUpId: kept }));
		must(await markMissed(ctx, east.desk.actor, { followUpId: missed }));
		const measurement = {
			method: 'serum',
			measuredAt: clock.now(),
			total: 22,
			direct: null,
			unit: 'mg/dL'
		} as const;
		must(await recordMeasurement(ctx, east.pediatrician.actor, { followUpId: kept, measurement }));
		clock.advance({ days: 3 });
		const forClinic = await getMeasures(ctx, east.pediatrician.actor, { siteId: east.clinicId, days: 30 });
		expect(forClinic?.measures).toMatchObject({
			seenInsideWindow: { count: 1, of: 2 },
			confirmed: { count: 1, of: 2 },
			missed: { count: 1, of: 2 },
			reachedAfterMissed: { count: 0, of: 1 },
			atOrOverLine: { count: 1, of: 1 }
		});
		expect(forClinic?.measures.hoursToFirstVisit).toHaveLength(1);
		// The follow-up that the hospital was made with is open too, and due by the real clock, which is later.
		expect(forClinic).toMatchObject({ open: 3, overdue: 2 });
		const forUnit = await getMeasures(ctx, east.nurse.actor, { siteId: east.birthSiteId, days: 30 });
		expect(forUnit?.measures.seenInsideWindow).toEqual({ count: 1, of: 2 });
	});

	it('of a site that is not one’s own are not given; an administrator sees all sites', async () => {
		const { ctx, east, hospital } = await openWithValues();
		expect(await getMeasures(ctx, east.desk.actor, { siteId: hospital.west.clinicId, days: 7 })).toBeNull();
		expect(await listMeasuredSites(ctx, hospital.admin.actor)).toHaveLength(4);
		expect(await listMeasuredSites(ctx, east.desk.actor)).toMatchObject([{ id: east.clinicId }]);
	});
});
