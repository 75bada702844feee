import { and, eq, isNull, sql } from 'drizzle-orm';
import { can } from '../../domain/access/can';
import type { Role, StaffActor } from '../../domain/access/roles';
import type { AlertKind } from '../../domain/followup/alert';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { alerts, followUps } from '../db/schema/follow-up';
import { newborns } from '../db/schema/newborn';
import { withTx } from '../db/tx';
import { conflict, notAllowed, notFound, type AppError } from '../errors';

export interface NewAlert {
	readonly followUpId: string;
	readonly kind: AlertKind;
	readonly role: Role;
	readonly siteId: string;
	readonly dueAt: Date;
	readonly detail: string;
	/** What raised it; the same key again is the same alert. */
	readonly dedupeKey: string;
}

/** Raises an alert once: who owes it and by when are never empty. */
export async function raiseAlert(tx: Tx, ctx: Ctx, alert: NewAlert): Promise<void> {
	await tx
		.insert(alerts)
		.values({ ...alert, id: ctx.random.id(), climbAt: alert.dueAt, raisedAt: ctx.clock.now() })
		.onDuplicateKeyUpdate({ set: { id: sql`${alerts.id}` } });
}

/** Marks an alert as settled, by whom and how. */
export async function settleAlert(
	ctx: Ctx,
	actor: StaffActor,
	{ alertId, how }: { readonly alertId: string; readonly how: string }
): Promise<Result<{ followUpId: string }, AppError>> {
	return withTx(ctx.db, async (tx) => {
		const [found] = await tx
			.select({
				alert: alerts,
				birthSiteId: followUps.birthSiteId,
				clinicId: followUps.clinicId,
				organisationId: newborns.organisationId
			})
			.from(alerts)
			.innerJoin(followUps, eq(followUps.id, alerts.followUpId))
			.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
			.where(eq(alerts.id, alertId))
			.for('update');
		if (!found || !can(actor, 'follow-up.view', found)) return err(notFound);
		if (!can(actor, 'alert.settle', found)) return err(notAllowed);
		if (found.alert.settledAt) return err(conflict('Somebody settled this a moment ago.'));
		await tx
			.update(alerts)
			.set({ settledAt: ctx.clock.now(), settledBy: actor.staffId, settledHow: how, climbAt: null })
			.where(eq(alerts.id, alertId));
		return ok({ followUpId: found.alert.followUpId });
	});
}

/** Settles what no longer holds of one kind, for instance the wish for another time once the visit has moved. */
export async function settleAlertsOf(
	tx: Tx,
	ctx: Ctx,
	asked: { readonly followUpId: string; readonly kind: AlertKind; readonly how: string }
): Promise<void> {
	await tx
		.update(alerts)
		.set({ settledAt: ctx.clock.now(), settledHow: asked.how, climbAt: null })
		.where(
			and(eq(alerts.followUpId, asked.followUpId), eq(alerts.kind, asked.kind), isNull(alerts.settledAt))
		);
}

/** Settles everything that is still open, when a follow-up closes. */
export async function settleAllAlerts(tx: Tx, ctx: Ctx, followUpId: string, how: string): Promise<void> {
	await tx
		.update(alerts)
		.set({ settledAt: ctx.clock.now(), settledHow: how, climbAt: null })
		.where(and(eq(alerts.followUpId, followUpId), isNull(alerts.settledAt)));
}
