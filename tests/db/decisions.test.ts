import { asc, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { recommendedDecision } from '../../src/lib/domain/followup/recommended';
import type { Decision } from '../../src/lib/domain/followup/transition';
import {
	alerts,
	attempts,
	decisions,
	followUps,
	transitions
} from '../../src/lib/server/db/schema/follow-up';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { phototherapyCourses } from '../../src/lib/server/db/schema/newborn';
import {
	closeFollowUp,
	decide,
	endTreatment,
	mergeFollowUp,
	reopenFollowUp,
	type DecisionAsked
} from '../../src/lib/server/services/decisions';
import { handOver } from '../../src/lib/server/services/discharges';
import { recordMeasurement } from '../../src/lib/server/services/measurements';
import { logAttempt } from '../../src/lib/server/services/attempts';
import { confirmVisit, markMissed } from '../../src/lib/server/services/visits';
import { openTestDatabase } from '../support/database';
import { must, openWorld } from '../support/follow-up-world';

const database = await openTestDatabase();
beforeEach(database.clean);

const HOUR = 3_600_000;

/** A newborn at home whose new value waits for a decision. */
async function openWithValue(total: number) {
	const world = await openWorld(database);
	const followUpId = await world.enter();
	must(await handOver(world.ctx, world.east.nurse.actor, { followUpId, place: null }));
	world.clock.advance({ hours: 20 });
	const { ctx, clock, east } = world;
	const measurement = {
		method: 'serum',
		measuredAt: clock.now(),
		total,
		direct: null,
		unit: 'mg/dL'
	} as const;
	const assessment = must(await recordMeasurement(ctx, east.pediatrician.actor, { followUpId, measurement }));
	const asDecided = (
		decision: Decision,
		more: Partial<DecisionAsked> = {},
		actor = east.pediatrician.actor
	) => decide(ctx, actor, { followUpId, decision, reason: '', ...more });
	const row = async (id = followUpId) => {
		const [found] = await database.db.select().from(followUps).where(eq(followUps.id, id));
		return found;
	};
	const course = async () =>
		(
			await database.db
				.select()
				.from(transitions)
				.where(eq(transitions.followUpId, followUpId))
				.orderBy(asc(transitions.sequence))
		).map(({ kind }) => kind);
	return { ...world, followUpId, assessment, asDecided, row, course, pediatrician: east.pediatrician.actor };
}

describe('accepting', () => {
	it('takes the window of the standard, begins the next round, and keeps input and result with the decision', async () => {
		const { assessment, asDecided, row, course, clock, pediatrician } = await openWithValue(12);
		const { decision } = recommendedDecision(assessment, clock.now());
		expect(decision?.then).toBe('repeat');
		if (!decision) return;
		must(await asDecided(decision));
		expect(await row()).toMatchObject({
			stage: 'to-book',
			round: 2,
			nextStep: 'book-visit',
			nextStepRole: 'desk',
			windowFromAt: assessment.window?.from,
			windowUntilAt: assessment.window?.until
		});
		const [kept] = await database.db.select().from(decisions);
		expect(kept).toMatchObject({
			recommended: 'follow-up',
			chosen: 'repeat',
			isOverride: false,
			decidedBy: pediatrician.staffId,
			edition: assessment.edition
		});
		expect(kept?.assessment).toMatchObject({
			input: { standard: 'aap-2022' },
			result: { disposition: 'follow-up' }
		});
		expect((await course()).at(-1)).toBe('accepted');
	});

	it('of a value over the line starts phototherapy where it is given, once', async () => {
		const { assessment, asDecided, row, clock } = await openWithValue(19);
		const { decision } = recommendedDecision(assessment, clock.now());
		expect(decision).toEqual({ then: 'treat' });
		must(await asDecided({ then: 'treat' }, { setting: 'home' }));
		must(await asDecided({ then: 'treat' }, { setting: 'readmission', reason: 'goes on' }));
		const courses = await database.db.select().from(phototherapyCourses);
		expect(courses).toHaveLength(1);
		expect(courses[0]).toMatchObject({ setting: 'home', startedAt: clock.now(), endedAt: null });
		expect(await row()).toMatchObject({ stage: 'in-treatment', nextStep: 'follow-treatment' });
	});
});

describe('deciding otherwise', () => {
	it('needs a reason, and without one nothing is saved', async () => {
		const { asDecided, row } = await openWithValue(19);
		const before = await row();
		const refused = await asDecided({ then: 'close', outcome: 'jaundice-settled' });
		expect(refused).toMatchObject({ ok: false, error: { code: 'invalid', field: 'reason' } });
		expect(await row()).toEqual(before);
		expect(await database.db.select().from(decisions)).toHaveLength(0);
	});

	it('with a reason is kept as such', async () => {
		const { asDecided, course } = await openWithValue(12);
		must(
			await asDecided({ then: 'close', outcome: 'jaundice-settled' }, { reason: 'Falling for two days.' })
		);
		const [kept] = await database.db.select().from(decisions);
		expect(kept).toMatchObject({ isOverride: true, reason: 'Falling for two days.', chosen: 'close' });
		expect((await course()).at(-1)).toBe('overridden');
	});

	it('a later window than the standard gives is such a decision, an earlier one is not', async () => {
		const { assessment, asDecided, clock } = await openWithValue(12);
		const until = assessment.window?.until ?? clock.now();
		const window = { from: clock.now(), test: 'serum' as const };
		const later = await asDecided({
			then: 'repeat',
			window: { ...window, until: new Date(until.getTime() + HOUR) }
		});
		expect(later).toMatchObject({ ok: false, error: { field: 'reason' } });
		must(await asDecided({ then: 'repeat', window: { ...window, until: new Date(until.getTime() - HOUR) } }));
	});

	it('belongs to the pediatrician of the clinic', async () => {
		const { asDecided, east, hospital } = await openWithValue(12);
		const decision = { then: 'treat' } as const;
		expect(await asDecided(decision, {}, east.desk.actor)).toEqual({
			ok: false,
			error: { code: 'not_allowed' }
		});
		expect(await asDecided(decision, {}, hospital.west.pediatrician.actor)).toEqual({
			ok: false,
			error: { code: 'not_found' }
		});
	});

	it('to check later owes the question at that date', async () => {
		const { asDecided, row, clock } = await openWithValue(12);
		const at = new Date(clock.now().getTime() + 200 * HOUR);
		must(await asDecided({ then: 'check-later', at, asks: 'Still yellow?' }, { reason: 'Well below.' }));
		expect(await row()).toMatchObject({
			stage: 'later-check',
			laterCheckAt: at,
			laterCheckAsks: 'Still yellow?',
			nextStepDueAt: at
		});
	});
});

describe('the end of phototherapy', () => {
	it('sets the window of the repeat value by the rule after treatment', async () => {
		const { asDecided, ctx, followUpId, pediatrician, clock, row } = await openWithValue(19);
		must(await asDecided({ then: 'treat' }));
		clock.advance({ hours: 24 });
		const endedAt = clock.now();
		const wrong = await endTreatment(ctx, pediatrician, {
			followUpId,
			endedAt: new Date(endedAt.getTime() + HOUR)
		});
		expect(wrong).toMatchObject({ ok: false, error: { code: 'invalid', field: 'endedAt' } });
		const measurement = {
			method: 'serum',
			measuredAt: endedAt,
			total: 13,
			direct: null,
			unit: 'mg/dL'
		} as const;
		must(await recordMeasurement(ctx, pediatrician, { followUpId, measurement }));
		must(await asDecided({ then: 'treat' }, { reason: 'until it ends' }));
		must(await endTreatment(ctx, pediatrician, { followUpId, endedAt }));
		const after = await row();
		expect(after).toMatchObject({ stage: 'to-book', nextStep: 'book-visit' });
		expect(after?.windowFromAt?.getTime()).toBeGreaterThanOrEqual(endedAt.getTime());
		const [course] = await database.db.select().from(phototherapyCourses);
		expect(course?.endedAt).toEqual(endedAt);
	});
});

describe('closing, opening again, merging', () => {
	it('closing settles what was open and owes nothing any more', async () => {
		const { ctx, followUpId, pediatrician, row, clock } = await openWithValue(12);
		const measurement = {
			method: 'serum',
			measuredAt: new Date(clock.now().getTime() - HOUR),
			total: 11,
			direct: 3,
			unit: 'mg/dL'
		} as const;
		must(await recordMeasurement(ctx, pediatrician, { followUpId, measurement }));
		const close = (why: string) =>
			closeFollowUp(ctx, pediatrician, { followUpId, outcome: 'care-transferred', why });
		expect(await close(' ')).toMatchObject({ ok: false, error: { code: 'invalid', field: 'why' } });
		must(await close('To the liver team.'));
		expect(await row()).toMatchObject({ stage: 'closed', outcome: 'care-transferred', nextStep: null });
		const [alert] = await database.db.select().from(alerts);
		expect(alert?.settledAt).toEqual(clock.now());
	});

	it('"not reached" needs the whole ladder', async () => {
		const world = await openWorld(database);
		const { ctx, clock, east, enter, firstPlace } = world;
		const followUpId = await enter();
		const place = await firstPlace(followUpId);
		must(await handOver(ctx, east.nurse.actor, { followUpId, place }));
		must(await confirmVisit(ctx, east.desk.actor, { followUpId, via: 'call' }));
		clock.advance({ hours: (place.startsAt.getTime() - clock.now().getTime()) / HOUR + 1 });
		must(await markMissed(ctx, east.desk.actor, { followUpId }));
		const close = () =>
			closeFollowUp(ctx, east.pediatrician.actor, {
				followUpId,
				outcome: 'not-reached',
				why: 'Nobody answers.'
			});
		const tooSoon = { ok: false, error: { code: 'conflict', message: expect.stringContaining('ladder') } };
		expect(await close()).toMatchObject(tooSoon);
		clock.advance({ hours: 6 });
		for (const outcome of ['no-answer', 'left-voicemail'] as const) {
			must(
				await logAttempt(ctx, east.desk.actor, {
					followUpId,
					carerId: null,
					channel: 'call',
					outcome,
					note: ''
				})
			);
		}
		expect(await close()).toMatchObject(tooSoon);
		await ctx.db.update(messages).set({ state: 'sent' }).where(eq(messages.kind, 'visit-missed'));
		must(await close());
		expect(await database.db.select().from(attempts)).toHaveLength(2);
	});

	it('opening again needs a reason and owes the pediatrician a decision', async () => {
		const { ctx, followUpId, pediatrician, row } = await openWithValue(12);
		must(await closeFollowUp(ctx, pediatrician, { followUpId, outcome: 'jaundice-settled', why: 'Well.' }));
		expect(await reopenFollowUp(ctx, pediatrician, { followUpId, why: '' })).toMatchObject({ ok: false });
		must(await reopenFollowUp(ctx, pediatrician, { followUpId, why: 'Yellow again.' }));
		expect(await row()).toMatchObject({
			stage: 'result-waiting',
			nextStep: 'decide',
			outcome: null,
			closedAt: null
		});
	});

	it('merging closes the one entered twice in favour of an open one of the same clinic', async () => {
		const { ctx, followUpId, pediatrician, row, enter, hospital } = await openWithValue(12);
		const merge = (intoId: string) =>
			mergeFollowUp(ctx, pediatrician, { followUpId, intoId, why: 'Same newborn.' });
		expect(await merge(hospital.west.followUp.followUpId)).toMatchObject({
			ok: false,
			error: { field: 'intoId' }
		});
		expect(await merge(followUpId)).toMatchObject({ ok: false, error: { field: 'intoId' } });
		const stays = await enter();
		must(await merge(stays));
		expect(await row()).toMatchObject({ stage: 'closed', outcome: 'entered-twice', mergedIntoId: stays });
		expect((await row(stays))?.stage).not.toBe('closed');
	});
});
