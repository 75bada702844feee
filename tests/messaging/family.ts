import { eq } from 'drizzle-orm';
import { DateTime } from 'luxon';
import type { SitePolicy } from '../../src/lib/domain/followup/policy';
import type { Ctx } from '../../src/lib/server/context';
import { visits } from '../../src/lib/server/db/schema/follow-up';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { sites } from '../../src/lib/server/db/schema/organisation';
import { withTx } from '../../src/lib/server/db/tx';
import { renderForSending } from '../../src/lib/server/services/message-content';
import { replanMessages } from '../../src/lib/server/services/message-plan';
import { bookVisit } from '../../src/lib/server/services/visits';
import { installDefaultWording } from '../../src/lib/server/services/wording';
import { makeFollowUp } from '../support/factories/follow-up';
import { makeHospital } from '../support/factories/hospital';

export const ZONE = 'America/Chicago';
export const local = (iso: string): Date => DateTime.fromISO(iso, { zone: ZONE }).toJSDate();

/** A hospital with its wording, and one follow-up whose family has just gone home. */
export async function makeFamily(
	ctx: Ctx,
	set: Parameters<typeof makeFollowUp>[2] & { readonly policy?: SitePolicy } = {}
) {
	const hospital = await makeHospital(ctx.db);
	await withTx(ctx.db, (tx) => installDefaultWording(tx, ctx, hospital.organisationId));
	const { birthSiteId, clinicId, desk, pediatrician } = hospital.east;
	if (set.policy) await ctx.db.update(sites).set({ policy: set.policy }).where(eq(sites.id, clinicId));
	const at = { organisationId: hospital.organisationId, birthSiteId, clinicId };
	const made = await makeFollowUp(ctx.db, at, { now: ctx.clock.now(), ...set });
	return { ...made, ...at, hospital, desk: desk.actor, pediatrician: pediatrician.actor };
}

export type Family = Awaited<ReturnType<typeof makeFamily>>;

export async function book(
	ctx: Ctx,
	{ desk, followUpId }: Pick<Family, 'desk' | 'followUpId'>,
	startsAt: Date
) {
	const booked = await bookVisit(ctx, desk, { followUpId, kind: 'check', startsAt });
	if (!booked.ok) throw new Error(JSON.stringify(booked.error));
	return booked.value.visitId;
}

export const replan = (ctx: Ctx, followUpId: string) =>
	withTx(ctx.db, (tx) => replanMessages(tx, ctx, followUpId));

export const messagesOf = (ctx: Ctx, followUpId: string) =>
	ctx.db.select().from(messages).where(eq(messages.followUpId, followUpId));

export async function visitOf(ctx: Ctx, visitId: string) {
	const [visit] = await ctx.db.select().from(visits).where(eq(visits.id, visitId));
	if (!visit) throw new Error('no such visit');
	return visit;
}

/** Does what a worker does with what is due: renders it and marks it as sent, withdrawn or postponed. */
export async function sendDue(ctx: Ctx, followUpId: string) {
	const now = ctx.clock.now();
	const rows = await messagesOf(ctx, followUpId);
	const due = rows.filter((row) => row.state === 'planned' && row.runAt <= now && row.expiresAt > now);
	const rendered = await renderForSending(ctx.db, ctx, due);
	for (const row of due) {
		const result = rendered.get(row.id);
		if (result === undefined) throw new Error(`${row.kind} was not rendered`);
		const set =
			result.kind === 'send'
				? { state: 'sent' as const, sentAt: now, templateId: result.templateId }
				: result.kind === 'withdraw'
					? { state: 'withdrawn' as const }
					: { runAt: result.until };
		await ctx.db.update(messages).set(set).where(eq(messages.id, row.id));
	}
	return due.flatMap((row) => {
		const result = rendered.get(row.id);
		return result?.kind === 'send' ? [{ row, result }] : [];
	});
}
