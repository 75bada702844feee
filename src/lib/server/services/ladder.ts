import { and, eq, max } from 'drizzle-orm';
import { LADDER, rungDueAt, rungsDue } from '../../domain/followup/ladder';
import type { SitePolicy } from '../../domain/followup/policy';
import type { FollowUpWindow } from '../../domain/guideline/types';
import type { Ctx } from '../context';
import { followUps, visits } from '../db/schema/follow-up';
import { sites } from '../db/schema/organisation';
import { withTx } from '../db/tx';
import type { FollowUpRow } from '../repos/follow-ups';
import { raiseAlert } from './alerts';

interface Missing {
	readonly followUp: FollowUpRow;
	readonly policy: SitePolicy;
	readonly since: Date;
}

async function listMissing(ctx: Ctx): Promise<Missing[]> {
	const rows = await ctx.db
		.select({ followUp: followUps, policy: sites.policy, since: max(visits.startsAt) })
		.from(followUps)
		.innerJoin(sites, eq(sites.id, followUps.clinicId))
		.innerJoin(visits, and(eq(visits.followUpId, followUps.id), eq(visits.state, 'missed')))
		.where(eq(followUps.stage, 'missed'))
		.groupBy(followUps.id, sites.id);
	return rows.flatMap(({ since, ...row }) => (since ? [{ ...row, since }] : []));
}

async function raiseRungs(ctx: Ctx, { followUp, policy, since }: Missing): Promise<void> {
	const window: FollowUpWindow | null =
		followUp.windowFromAt && followUp.windowUntilAt
			? {
					from: followUp.windowFromAt,
					until: followUp.windowUntilAt,
					test: followUp.windowTest ?? 'judgement'
				}
			: null;
	const asked = { since, now: ctx.clock.now(), policy, window };
	const due = new Set(rungsDue(asked));
	const owed = LADDER.flatMap((step) => (due.has(step.rung) && step.by !== 'worker' ? [step] : []));
	await withTx(ctx.db, async (tx) => {
		for (const { rung, by, says } of owed) {
			await raiseAlert(tx, ctx, {
				followUpId: followUp.id,
				kind: 'ladder-step',
				role: by,
				siteId: followUp.clinicId,
				dueAt: rungDueAt(rung, asked),
				detail: rung === 'welfare-check' ? policy.welfareCheck : says,
				dedupeKey: `ladder ${followUp.id} ${since.getTime()} ${rung}`
			});
		}
	});
}

/** Raises the calls and decisions of the ladder whose time has come, for every family that did not come; once each. */
export async function raiseLadderSteps(ctx: Ctx): Promise<number> {
	const missing = await listMissing(ctx);
	for (const one of missing) await raiseRungs(ctx, one);
	return missing.length;
}
