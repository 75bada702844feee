import { rungDueAt } from '../followup/ladder';
import { addressed, firstReachable, secondReachable } from './plan-carers';
import { type PlanFacts, type PlannedMessage, type PlanVisit, PRIORITY } from './plan-facts';
import { nextAllowed } from './quiet-hours';

const HOUR = 3_600_000;

/**
 * The messages of the ladder for a family that did not come: the first carer in the same hour; after the first call, the
 * second carer and the first one's mail. Calls and what follows them are people's steps, not messages.
 */
export function planMissed(facts: PlanFacts): PlannedMessage[] {
	if (facts.stage !== 'missed') return [];
	const visit = lastMissed(facts.visits);
	const first = firstReachable(facts.carers);
	if (visit === undefined || first === undefined) return [];
	const missedAt = visit.endedAt ?? visit.startsAt;
	const common = {
		occasion: visit.id,
		expiresAt: new Date(missedAt.getTime() + 24 * HOUR),
		facts: { visitId: visit.id }
	};
	const atOnce = addressed(facts.followUpId, first, 'preferred', {
		...common,
		kind: 'visit-missed',
		priority: PRIORITY.urgent,
		runAt: missedAt
	});
	return [...atOnce, ...again(facts, visit, common)];
}

const later = (a: Date, b: Date): Date => (a > b ? a : b);

/** The ladder's own time for the second carer; the rungs are counted from the start of the missed visit. */
function secondMessageAt({ policy, windowFromAt, windowUntilAt }: PlanFacts, visit: PlanVisit): Date {
	const window =
		windowFromAt && windowUntilAt
			? { from: windowFromAt, until: windowUntilAt, test: 'judgement' as const }
			: null;
	return rungDueAt('message-second-carer', { since: visit.startsAt, policy, window });
}

function again(
	facts: PlanFacts,
	visit: PlanVisit,
	common: Pick<PlannedMessage, 'occasion' | 'expiresAt' | 'facts'>
): PlannedMessage[] {
	const missedAt = visit.endedAt ?? visit.startsAt;
	if (facts.lastReachedAt !== null && facts.lastReachedAt >= missedAt) return [];
	const wanted = later(secondMessageAt(facts, visit), missedAt);
	const allowed = nextAllowed(wanted, { timeZone: facts.timeZone, ...facts.policy });
	// Waiting for the morning is right only while the morning still lies inside the window.
	const isUrgent = facts.windowUntilAt !== null && allowed > facts.windowUntilAt;
	const message = {
		...common,
		kind: 'visit-missed-again' as const,
		priority: isUrgent ? PRIORITY.urgent : PRIORITY.soon,
		runAt: isUrgent ? wanted : allowed
	};
	const first = firstReachable(facts.carers);
	const second = secondReachable(facts.carers);
	return [
		...(second ? addressed(facts.followUpId, second, 'both', message) : []),
		...(first?.canSms ? addressed(facts.followUpId, first, 'mail', message) : [])
	];
}

function lastMissed(visits: readonly PlanVisit[]): PlanVisit | undefined {
	return visits
		.filter(({ state }) => state === 'missed')
		.sort((a, b) => b.startsAt.getTime() - a.startsAt.getTime())[0];
}
