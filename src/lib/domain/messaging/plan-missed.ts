import type { SitePolicy } from '../followup/policy';
import { addressed, firstReachable, secondReachable } from './plan-carers';
import { type PlanFacts, type PlannedMessage, type PlanVisit, PRIORITY } from './plan-facts';
import { nextAllowed } from './quiet-hours';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

/**
 * Minutes between two rungs of the ladder: the site's own for a window longer than 48 h, three quarters of it up to 48 h,
 * half of it up to 24 h (common practice, no source: spacing shrinks with the window).
 */
export function rungMinutes(policy: Pick<SitePolicy, 'ladderMinutes'>, windowHours: number | null): number {
	if (windowHours !== null && windowHours <= 24) return policy.ladderMinutes * 0.5;
	if (windowHours !== null && windowHours <= 48) return policy.ladderMinutes * 0.75;
	return policy.ladderMinutes;
}

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
	return [...atOnce, ...again(facts, missedAt, common)];
}

function again(
	facts: PlanFacts,
	missedAt: Date,
	common: Pick<PlannedMessage, 'occasion' | 'expiresAt' | 'facts'>
): PlannedMessage[] {
	const wanted = new Date(missedAt.getTime() + 2 * rungMinutes(facts.policy, windowHours(facts)) * MINUTE);
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

function windowHours({ windowFromAt, windowUntilAt }: PlanFacts): number | null {
	return windowFromAt && windowUntilAt ? (windowUntilAt.getTime() - windowFromAt.getTime()) / HOUR : null;
}
