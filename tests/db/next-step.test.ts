import { sql } from 'drizzle-orm';
import fc from 'fast-check';
import { beforeEach, describe, expect, it } from 'vitest';
import { NEXT_STEP_OF, STAGES } from '../../src/lib/domain/followup/states';
import { alerts, followUps, transitions, visits } from '../../src/lib/server/db/schema/follow-up';
import { isCheckFailure } from '../../src/lib/server/db/tx';
import { climbOverdue } from '../../src/lib/server/services/climb';
import { closeFollowUp, decide, endTreatment, reopenFollowUp } from '../../src/lib/server/services/decisions';
import { handOver } from '../../src/lib/server/services/discharges';
import { recordMeasurement } from '../../src/lib/server/services/measurements';
import {
	bookVisit,
	cancelVisit,
	confirmVisit,
	markArrived,
	markMissed,
	moveVisit
} from '../../src/lib/server/services/visits';
import { eq } from 'drizzle-orm';
import { openTestDatabase } from '../support/database';
import { openWorld, type World } from '../support/follow-up-world';

const database = await openTestDatabase();
beforeEach(database.clean);

const HOUR = 3_600_000;

/** Every use case that moves a follow-up, tried at any moment; refusals are part of the walk. */
const MOVES: Readonly<Record<string, (world: World, id: string) => Promise<unknown>>> = {
	book: async ({ ctx, east, firstPlace }, followUpId) =>
		bookVisit(ctx, east.desk.actor, { followUpId, ...(await firstPlace(followUpId)) }),
	bookByNurse: async ({ ctx, east, firstPlace }, followUpId) =>
		bookVisit(ctx, east.nurse.actor, { followUpId, ...(await firstPlace(followUpId)) }),
	move: async ({ ctx, east, firstPlace }, followUpId) =>
		moveVisit(ctx, east.desk.actor, { followUpId, why: 'asked', ...(await firstPlace(followUpId)) }),
	cancel: ({ ctx, east }, followUpId) => cancelVisit(ctx, east.desk.actor, { followUpId, why: 'asked' }),
	confirm: ({ ctx, east }, followUpId) => confirmVisit(ctx, east.desk.actor, { followUpId, via: 'call' }),
	handOver: ({ ctx, east }, followUpId) => handOver(ctx, east.nurse.actor, { followUpId, place: null }),
	arrive: ({ ctx, east }, followUpId) => markArrived(ctx, east.desk.actor, { followUpId }),
	miss: ({ ctx, east }, followUpId) => markMissed(ctx, east.desk.actor, { followUpId }),
	value: ({ ctx, east, clock }, followUpId) =>
		recordMeasurement(ctx, east.pediatrician.actor, {
			followUpId,
			measurement: { method: 'serum', measuredAt: clock.now(), total: 12, direct: null, unit: 'mg/dL' }
		}),
	repeat: ({ ctx, east, clock }, followUpId) =>
		decide(ctx, east.pediatrician.actor, {
			followUpId,
			reason: 'as examined',
			decision: {
				then: 'repeat',
				window: { from: clock.now(), until: new Date(clock.now().getTime() + 24 * HOUR), test: 'serum' }
			}
		}),
	treat: ({ ctx, east }, followUpId) =>
		decide(ctx, east.pediatrician.actor, { followUpId, reason: 'as examined', decision: { then: 'treat' } }),
	endTreatment: ({ ctx, east, clock }, followUpId) =>
		endTreatment(ctx, east.pediatrician.actor, { followUpId, endedAt: clock.now() }),
	later: ({ ctx, east, clock }, followUpId) =>
		decide(ctx, east.pediatrician.actor, {
			followUpId,
			reason: 'as examined',
			decision: {
				then: 'check-later',
				at: new Date(clock.now().getTime() + 200 * HOUR),
				asks: 'still yellow?'
			}
		}),
	close: ({ ctx, east }, followUpId) =>
		closeFollowUp(ctx, east.pediatrician.actor, { followUpId, outcome: 'jaundice-settled', why: 'well' }),
	closeNotReached: ({ ctx, east }, followUpId) =>
		closeFollowUp(ctx, east.pediatrician.actor, {
			followUpId,
			outcome: 'not-reached',
			why: 'nobody answers'
		}),
	reopen: ({ ctx, east }, followUpId) =>
		reopenFollowUp(ctx, east.pediatrician.actor, { followUpId, why: 'yellow again' }),
	climb: ({ ctx }) => climbOverdue(ctx)
};

async function expectSound({ ctx, state }: World, followUpId: string): Promise<void> {
	const { row } = await state(followUpId);
	const open = await ctx.db
		.select()
		.from(visits)
		.where(sql`${visits.followUpId} = ${followUpId} and ${visits.isOpen} = 1`);
	const history = await ctx.db
		.select()
		.from(transitions)
		.where(eq(transitions.followUpId, followUpId))
		.orderBy(transitions.sequence);
	expect(history.at(-1)?.toStage).toBe(row.stage);
	for (const [i, step] of history.slice(1).entries()) expect(step.fromStage).toBe(history[i]?.toStage);
	if (row.stage === 'closed') {
		const owed = await ctx.db
			.select()
			.from(alerts)
			.where(sql`${alerts.followUpId} = ${followUpId} and ${alerts.settledAt} is null`);
		expect({ nextStep: row.nextStep, open, owed }).toEqual({ nextStep: null, open: [], owed: [] });
		return;
	}
	expect(row.nextStep).toBe(NEXT_STEP_OF[row.stage]);
	expect(row.nextStepDueAt).toBeInstanceOf(Date);
	if (row.stage === 'booked' || row.stage === 'confirmed') expect(open).toHaveLength(1);
	if (row.stage === 'to-book' || row.stage === 'missed') expect(open).toHaveLength(0);
}

describe('the next step', () => {
	it('is refused by the database itself where it is missing or too many', async () => {
		const world = await openWorld(database);
		const id = await world.enter();
		const attempt = (columns: string) =>
			world.ctx.db.execute(sql.raw(`update follow_ups set ${columns} where id = '${id}'`)).then(
				() => 'accepted',
				(error: unknown) => (isCheckFailure(error) ? 'refused by the check' : String(error))
			);
		for (const column of ['next_step', 'next_step_role', 'next_step_site_id', 'next_step_due_at']) {
			expect(await attempt(`${column} = null`)).toBe('refused by the check');
		}
		expect(await attempt(`stage = 'closed'`)).toBe('refused by the check');
		expect(await attempt(`stage = 'closed', outcome = 'died', closed_at = now(3)`)).toBe(
			'refused by the check'
		);
		expect(await attempt(`round = 2`)).toBe('accepted');
	});

	const walks = fc.array(fc.tuple(fc.constantFrom(...Object.keys(MOVES)), fc.constantFrom(0, 1, 5, 20)), {
		minLength: 10,
		maxLength: 30
	});

	/** Goes through the moves in the database, sound after each; tells the stages it came through. */
	async function walk(world: World, steps: readonly (readonly [string, number])[]): Promise<string[]> {
		const id = await world.enter();
		const reached: string[] = [];
		for (const [name, hours] of steps) {
			world.clock.advance({ hours });
			await MOVES[name]?.(world, id).catch((error: unknown) => {
				if (!(error instanceof Error && error.message.includes('place in the window'))) throw error;
			});
			await expectSound(world, id);
			reached.push((await world.state(id)).row.stage);
		}
		return reached;
	}

	async function countLost(world: World): Promise<number> {
		const [row] = await world.ctx.db
			.select({ lost: sql<number>`count(*)` })
			.from(followUps)
			.where(sql`(${followUps.stage} <> 'closed') <> (${followUps.nextStep} is not null)`);
		return Number(row?.lost);
	}

	it('is there, exactly once, after any sequence of what people and the worker do', async () => {
		const world = await openWorld(database);
		await fc.assert(
			fc.asyncProperty(walks, async (steps) => void (await walk(world, steps))),
			{ numRuns: 20 }
		);
		expect(await countLost(world)).toBe(0);
	});

	it('is there in walks that come through nearly every stage', async () => {
		const world = await openWorld(database);
		const reached = new Set<string>();
		// Of one seed, so that luck does not decide which stages are met.
		for (const steps of fc.sample(walks, { numRuns: 25, seed: 20_260_302 })) {
			for (const stage of await walk(world, steps)) reached.add(stage);
		}
		expect(reached.size).toBeGreaterThanOrEqual(STAGES.length - 2);
		expect(await countLost(world)).toBe(0);
	});
});
