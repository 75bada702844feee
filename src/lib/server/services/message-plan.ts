import { prolongedJaundiceChecks } from '../../domain/guideline/index';
import type { MessageKind } from '../../domain/messaging/kinds';
import { DERIVED_KINDS, planMessages } from '../../domain/messaging/plan';
import type { PlanFacts, PlannedMessage } from '../../domain/messaging/plan-facts';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import {
	loadPlanRows,
	lockFollowUp,
	type CarerRow,
	type FollowUpRow,
	type NewbornRow
} from '../repos/message-facts';
import {
	insertMessages,
	listMessages,
	replanMessage,
	withdrawMessages,
	type MessageRow,
	type NewMessage
} from '../repos/messages';
import { ensureParentLinks } from './parent-links';

/** Which channels are open to a carer now. */
export const canSms = (carer: CarerRow): boolean =>
	carer.phone !== null && carer.consentsToSms && carer.smsStoppedAt === null;
export const canMail = (carer: CarerRow): boolean =>
	carer.email !== null && carer.consentsToMail && carer.mailStoppedAt === null;

/**
 * Derives the plan of messages from the follow-up as it is now and brings the outbox into line: adds what is new,
 * withdraws what no longer holds, leaves alone what was sent or is being sent. Call it at the end of every change of a
 * follow-up, in the same transaction.
 */
export async function replanMessages(tx: Tx, ctx: Ctx, followUpId: string): Promise<void> {
	const followUp = await lockFollowUp(tx, followUpId);
	if (followUp === null) return;
	const existing = await listMessages(tx, followUpId);
	const facts = await loadPlanFacts(tx, followUp, existing);
	if (facts === null) return;
	const now = ctx.clock.now();
	const plan = planMessages(facts, now);
	await ensureParentLinks(tx, ctx, followUp, [...new Set(plan.map(({ carerId }) => carerId))]);
	await addOrUpdate(tx, ctx, { followUp, plan, existing, now });
	await withdrawMessages(tx, noLongerHolds(plan, existing), 'no longer holds', now);
}

/** The facts of the plan, read from the database; null for a follow-up without a newborn, which cannot be. */
export async function loadPlanFacts(
	tx: Tx,
	followUp: FollowUpRow,
	existing: readonly MessageRow[]
): Promise<PlanFacts | null> {
	const rows = await loadPlanRows(tx, followUp);
	if (rows === null) return null;
	const told = toldVisitIds(existing);
	return {
		followUpId: followUp.id,
		stage: followUp.stage,
		outcome: followUp.outcome,
		closedAt: followUp.closedAt,
		bornAt: rows.newborn.bornAt,
		prolongedCheckDays: prolongedCheckDays(followUp, rows.newborn),
		dischargedAt: followUp.handedOverAt ?? followUp.plannedDischargeAt,
		windowFromAt: followUp.windowFromAt,
		windowUntilAt: followUp.windowUntilAt,
		laterCheckAt: followUp.laterCheckAt,
		lastReachedAt: rows.lastReachedAt,
		timeZone: rows.clinic.timeZone,
		policy: rows.clinic.policy,
		carers: rows.carers.map((carer) => ({ ...carer, canSms: canSms(carer), canMail: canMail(carer) })),
		visits: rows.visits.map((visit) => ({ ...visit, isTold: told.has(visit.id) })),
		checkIns: rows.checkIns
	};
}

function prolongedCheckDays({ standard }: FollowUpRow, newborn: NewbornRow): number[] {
	const { bornAt, feeding, gestationWeeks: weeks, gestationDays: days } = newborn;
	const checks = prolongedJaundiceChecks({ standard, bornAt, feeding, gestationalAge: { weeks, days } });
	return checks.map(({ ageDays }) => ageDays);
}

const TELLING: readonly MessageKind[] = ['visit-booked', 'visit-moved'];

/** Visits about which a message left us, or may have. */
function toldVisitIds(existing: readonly MessageRow[]): Set<string> {
	const left = existing.filter(
		({ kind, state, callBeganAt }) =>
			TELLING.includes(kind) &&
			(state === 'sent' || state === 'sending' || state === 'unknown' || callBeganAt !== null)
	);
	return new Set(left.map(({ occasion }) => occasion));
}

interface Change {
	readonly followUp: FollowUpRow;
	readonly plan: readonly PlannedMessage[];
	readonly existing: readonly MessageRow[];
	readonly now: Date;
}

async function addOrUpdate(tx: Tx, ctx: Ctx, { followUp, plan, existing, now }: Change): Promise<void> {
	const byKey = new Map(existing.map((row) => [row.dedupeKey, row]));
	const added: NewMessage[] = [];
	for (const message of plan) {
		const row = byKey.get(message.dedupeKey);
		if (row === undefined) {
			added.push(toRow(message, { id: ctx.random.id(), followUp, now }));
		} else if (
			row.state === 'withdrawn' ||
			(row.state === 'planned' && differs(row, message, followUp.clinicId))
		) {
			await replanMessage(tx, row.id, row.state, { ...message, siteId: followUp.clinicId }, now);
		}
	}
	await insertMessages(tx, added);
}

/** A retry moves `runAt` on by itself: a message that was tried keeps its time. */
function differs(row: MessageRow, message: PlannedMessage, siteId: string): boolean {
	if (row.attempts > 0) return false;
	return (
		row.runAt.getTime() !== message.runAt.getTime() ||
		row.expiresAt.getTime() !== message.expiresAt.getTime() ||
		row.priority !== message.priority ||
		row.language !== message.language ||
		row.siteId !== siteId
	);
}

function toRow(
	message: PlannedMessage,
	{ id, followUp, now }: { id: string; followUp: FollowUpRow; now: Date }
): NewMessage {
	return {
		...message,
		facts: { ...message.facts },
		id,
		followUpId: followUp.id,
		siteId: followUp.clinicId,
		state: 'planned',
		createdAt: now,
		updatedAt: now
	};
}

/**
 * Waiting messages of a derived kind that the plan no longer asks for. One that goes to another channel or carer in place
 * of a message that did not arrive (`fallbackOfId`) holds as long as its kind and occasion do.
 */
function noLongerHolds(plan: readonly PlannedMessage[], existing: readonly MessageRow[]): string[] {
	const keys = new Set(plan.map(({ dedupeKey }) => dedupeKey));
	const occasions = new Set(plan.map(({ kind, occasion }) => `${kind}:${occasion}`));
	return existing
		.filter(({ state, kind }) => state === 'planned' && DERIVED_KINDS.includes(kind))
		.filter((row) =>
			row.facts.insteadOf === undefined
				? !keys.has(row.dedupeKey)
				: !occasions.has(`${row.kind}:${row.occasion}`)
		)
		.map(({ id }) => id);
}
