import type { MessageKind } from './kinds';
import { addressed, firstReachable } from './plan-carers';
import { planCheckIns } from './plan-check-ins';
import type { PlanFacts, PlannedMessage } from './plan-facts';
import { PRIORITY } from './plan-facts';
import { planMissed } from './plan-missed';
import { SILENT_OUTCOMES } from './plan-stages';
import { planVisits } from './plan-visits';
import { nextAllowed } from './quiet-hours';

/** Kinds that the plan derives; every other kind answers something once and is no business of the plan. */
export const DERIVED_KINDS: readonly MessageKind[] = [
	'visit-booked',
	'visit-moved',
	'visit-cancelled',
	'reminder-day-before',
	'reminder-morning',
	'check-in-ask',
	'prolonged-check-ask',
	'visit-missed',
	'visit-missed-again',
	'answer-received',
	'other-time-received',
	'follow-up-closed'
];

const HOUR = 3_600_000;

/**
 * The whole plan of messages of one follow-up, derived from its facts alone and never kept by hand.
 * What is too late at `now` is left out, so that nothing old is made up for.
 * Example: a visit booked for Thursday 10:20 gives a confirmation now, a reminder on Wednesday at 10:00, one on
 * Thursday morning, and a check-in on each morning before.
 */
export function planMessages(facts: PlanFacts, now: Date): PlannedMessage[] {
	if (facts.outcome !== null && SILENT_OUTCOMES.includes(facts.outcome)) return [];
	const all = [...planVisits(facts), ...planCheckIns(facts), ...planMissed(facts), ...planClosed(facts)];
	return all.filter((message) => message.expiresAt > now);
}

function planClosed(facts: PlanFacts): PlannedMessage[] {
	const carer = firstReachable(facts.carers);
	if (facts.stage !== 'closed' || facts.closedAt === null || carer === undefined) return [];
	const quiet = { timeZone: facts.timeZone, ...facts.policy };
	const runAt = nextAllowed(new Date(facts.closedAt.getTime() + HOUR), quiet);
	return addressed(facts.followUpId, carer, 'preferred', {
		kind: 'follow-up-closed',
		// A follow-up that is opened again may be closed again: each closing is an occasion of its own.
		occasion: `closed-${facts.closedAt.getTime()}`,
		priority: PRIORITY.canWait,
		runAt,
		expiresAt: new Date(runAt.getTime() + 72 * HOUR),
		facts: {}
	});
}
