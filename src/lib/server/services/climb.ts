import { and, asc, eq, isNull, lte } from 'drizzle-orm';
import type { WorkerActor } from '../../domain/access/roles';
import { climbOf } from '../../domain/followup/due';
import type { Ctx } from '../context';
import { alerts, followUps } from '../db/schema/follow-up';
import { sites } from '../db/schema/organisation';
import { withTx } from '../db/tx';
import { insertTransition, lockFollowUp, saveFollowUp } from '../repos/follow-ups';
import { advance } from './advance';

const BATCH = 100;
const THE_WATCH: WorkerActor = { kind: 'worker', name: 'escalate' };

/** One unmet next step goes to the next person; true where it moved. */
async function climbNextStep(ctx: Ctx, followUpId: string): Promise<boolean> {
	return withTx(ctx.db, async (tx) => {
		const loaded = await lockFollowUp(tx, followUpId);
		const step = loaded?.state.nextStep;
		if (!loaded || !step?.climbAt || step.climbAt > ctx.clock.now()) return false;
		const told = {
			actor: THE_WATCH,
			why: 'The due time was not met.',
			detail: { nextStep: step.kind, dueAt: step.dueAt.toISOString() }
		};
		const done = await advance(tx, ctx, loaded, { kind: 'climbed' }, told);
		if (done.ok) return true;
		await saveFollowUp(
			tx,
			loaded.row,
			{ ...loaded.state, nextStep: { ...step, climbAt: null } },
			ctx.clock.now()
		);
		return false;
	});
}

/** One unsettled alert goes to the next person, and the climb is written into the follow-up's record. */
async function climbAlert(ctx: Ctx, alertId: string): Promise<boolean> {
	return withTx(ctx.db, async (tx) => {
		const [found] = await tx
			.select({ alert: alerts, policy: sites.policy })
			.from(alerts)
			.innerJoin(sites, eq(sites.id, alerts.siteId))
			.where(and(eq(alerts.id, alertId), isNull(alerts.settledAt), lte(alerts.climbAt, ctx.clock.now())))
			.for('update');
		if (!found) return false;
		const above = climbOf(found.alert, found.policy, ctx.clock.now());
		await tx
			.update(alerts)
			.set(above ?? { climbAt: null })
			.where(eq(alerts.id, alertId));
		const loaded = above && (await lockFollowUp(tx, found.alert.followUpId));
		if (!loaded) return false;
		await saveFollowUp(tx, loaded.row, loaded.state, ctx.clock.now());
		await insertTransition(tx, {
			id: ctx.random.id(),
			followUpId: loaded.row.id,
			kind: 'climbed',
			fromStage: loaded.state.stage,
			toStage: loaded.state.stage,
			actor: THE_WATCH,
			why: 'An alert was not settled in time.',
			detail: { alertId, alert: found.alert.kind, climb: above.climb },
			at: ctx.clock.now(),
			sequence: loaded.row.version + 1
		});
		return true;
	});
}

/**
 * Every unmet due time, of next steps and of alerts, goes to the next person; each climb is recorded.
 * Safe in several processes: each row is held while it climbs and looked at again under the lock.
 * @returns how many climbed
 */
export async function climbOverdue(ctx: Ctx): Promise<number> {
	const now = ctx.clock.now();
	const steps = await ctx.db
		.select({ id: followUps.id })
		.from(followUps)
		.where(lte(followUps.nextStepClimbAt, now))
		.orderBy(asc(followUps.nextStepClimbAt))
		.limit(BATCH);
	const waiting = await ctx.db
		.select({ id: alerts.id })
		.from(alerts)
		.where(and(isNull(alerts.settledAt), lte(alerts.climbAt, now)))
		.orderBy(asc(alerts.climbAt))
		.limit(BATCH);
	let climbed = 0;
	for (const { id } of steps) climbed += Number(await climbNextStep(ctx, id));
	for (const { id } of waiting) climbed += Number(await climbAlert(ctx, id));
	return climbed;
}
