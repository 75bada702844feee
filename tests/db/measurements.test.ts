import { eq, ne } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import type { MeasurementFacts } from '../../src/lib/domain/followup/discharge';
import { alerts, followUps } from '../../src/lib/server/db/schema/follow-up';
import { measurements, weights } from '../../src/lib/server/db/schema/newborn';
import { handOver } from '../../src/lib/server/services/discharges';
import { recordMeasurement, strikeMeasurement } from '../../src/lib/server/services/measurements';
import { openTestDatabase } from '../support/database';
import { must, openWorld } from '../support/follow-up-world';

const database = await openTestDatabase();
beforeEach(database.clean);

const MINUTE = 60_000;

/** A newborn at home; its clinic's pediatrician may enter values. */
async function openAtHome() {
	const world = await openWorld(database);
	const followUpId = await world.enter();
	must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
	world.clock.advance({ hours: 20 });
	const enter = (
		set: Partial<MeasurementFacts> = {},
		actor = world.east.pediatrician.actor,
		weightGrams?: number
	) =>
		recordMeasurement(world.ctx, actor, {
			followUpId,
			weightGrams,
			measurement: {
				method: 'serum',
				measuredAt: world.clock.now(),
				total: 12,
				direct: null,
				unit: 'mg/dL',
				...set
			}
		});
	const row = async () => {
		const [found] = await database.db.select().from(followUps).where(eq(followUps.id, followUpId));
		expect(found).toBeDefined();
		return found;
	};
	return { ...world, followUpId, enterValue: enter, row };
}

describe('a new value', () => {
	it('puts the decision before the pediatrician within the policy of the clinic', async () => {
		const { enterValue, row, clock, east } = await openAtHome();
		const assessment = must(await enterValue({ total: 12 }, undefined, 3_310));
		expect(assessment.disposition).toBe('follow-up');
		expect(await row()).toMatchObject({
			stage: 'result-waiting',
			nextStep: 'decide',
			nextStepRole: 'pediatrician',
			nextStepSiteId: east.clinicId,
			nextStepDueAt: new Date(clock.now().getTime() + 120 * MINUTE)
		});
		const [weight] = await database.db.select().from(weights);
		expect(weight).toMatchObject({ grams: 3_310, recordedBy: east.pediatrician.actor.staffId });
	});

	it('leaves half an hour at or over the line', async () => {
		const { enterValue, row, clock } = await openAtHome();
		expect(must(await enterValue({ total: 19 })).disposition).toBe('phototherapy');
		expect((await row())?.nextStepDueAt).toEqual(new Date(clock.now().getTime() + 30 * MINUTE));
	});

	it('asks about the liver beside the decision, once, when the direct part is raised', async () => {
		const { enterValue, clock } = await openAtHome();
		must(await enterValue({ direct: 2.4 }));
		clock.advance({ hours: 1 });
		must(await enterValue({ direct: 2.6 }));
		const raised = await database.db.select().from(alerts).where(eq(alerts.kind, 'direct-fraction-raised'));
		expect(raised).toHaveLength(1);
		expect(raised[0]).toMatchObject({ role: 'pediatrician', settledAt: null });
	});

	it('is refused with a sentence, and nothing is saved, when it cannot be true', async () => {
		const { enterValue, row, clock } = await openAtHome();
		const before = await row();
		const future = await enterValue({ measuredAt: new Date(clock.now().getTime() + 60 * MINUTE) });
		expect(future).toMatchObject({
			ok: false,
			error: { code: 'invalid', message: expect.stringContaining('future') }
		});
		const otherUnit = await enterValue({ total: 205, unit: 'umol/L' });
		expect(otherUnit).toMatchObject({
			ok: false,
			error: { code: 'invalid', message: expect.stringContaining('one unit') }
		});
		expect(await database.db.select().from(measurements)).toHaveLength(1);
		expect(await row()).toEqual(before);
	});

	it('belongs to the pediatrician of the clinic: others are refused, and strangers learn nothing', async () => {
		const { enterValue, east, hospital } = await openAtHome();
		for (const { actor } of [east.desk, east.nurse]) {
			expect(await enterValue({}, actor)).toEqual({ ok: false, error: { code: 'not_allowed' } });
		}
		for (const { actor } of [hospital.west.pediatrician, hospital.admin]) {
			expect(await enterValue({}, actor)).toEqual({ ok: false, error: { code: 'not_found' } });
		}
		expect(await database.db.select().from(measurements)).toHaveLength(1);
	});
});

describe('striking a value', () => {
	async function withTwo() {
		const world = await openAtHome();
		must(await world.enterValue({ total: 19 }));
		const all = await database.db.select().from(measurements);
		const wrong = all.find(({ total }) => total === 19);
		expect(wrong).toBeDefined();
		const strike = (why: string, actor = world.east.pediatrician.actor, measurementId = wrong?.id ?? '') =>
			strikeMeasurement(world.ctx, actor, { followUpId: world.followUpId, measurementId, why });
		return { ...world, strike, wrongId: wrong?.id ?? '' };
	}

	it('keeps it on record with the reason, and has what it led to decided anew without haste', async () => {
		const { strike, row, wrongId, clock } = await withTwo();
		must(await strike('Belongs to the twin.'));
		const [kept] = await database.db.select().from(measurements).where(eq(measurements.id, wrongId));
		expect(kept).toMatchObject({
			status: 'entered-in-error',
			struckBecause: 'Belongs to the twin.',
			total: 19
		});
		expect(await row()).toMatchObject({
			stage: 'result-waiting',
			nextStepDueAt: new Date(clock.now().getTime() + 120 * MINUTE)
		});
	});

	it('needs a reason, and cannot be done twice', async () => {
		const { strike } = await withTwo();
		expect(await strike('  ')).toMatchObject({ ok: false, error: { code: 'invalid', field: 'why' } });
		must(await strike('Wrong newborn.'));
		expect(await strike('Wrong newborn.')).toEqual({ ok: false, error: { code: 'not_found' } });
	});

	it('does not reach a value of another newborn', async () => {
		const { strike, ctx, enter, row } = await withTwo();
		await enter();
		const own = (await row())?.newbornId ?? '';
		const [other] = await ctx.db.select().from(measurements).where(ne(measurements.newbornId, own));
		expect(other).toBeDefined();
		expect(await strike('Wrong.', undefined, other?.id)).toEqual({ ok: false, error: { code: 'not_found' } });
	});
});
