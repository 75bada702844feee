import type { Role } from '../access/roles';
import { ALERT_URGENCY, type AlertKind } from './alert';
import type { Stage } from './states';

/** Why a newborn stands in the front desk's queue; several may hold at once. In the order of a desk's day. */
export const QUEUE_GROUPS = [
	'needs-call',
	'did-not-come',
	'needs-visit',
	'not-confirmed',
	'undelivered'
] as const;
export type QueueGroup = (typeof QUEUE_GROUPS)[number];

export interface QueueAlert {
	readonly id: string;
	readonly kind: AlertKind;
	readonly role: Role;
	readonly climb: number;
	readonly dueAt: Date;
	readonly detail: string;
}

/** What decides whether and where a newborn stands in the queue. */
export interface QueueFacts {
	readonly followUpId: string;
	readonly stage: Stage;
	readonly isHandedOver: boolean;
	/** Null once it is closed: then only an alert brings it in, for a family may write after the end. */
	readonly nextStepDueAt: Date | null;
	readonly windowUntilAt: Date | null;
	/** Start of the open visit. */
	readonly visitAt: Date | null;
	/** Every unsettled alert of the follow-up. */
	readonly alerts: readonly QueueAlert[];
}

const HOUR = 3_600_000;
/** A later check comes into the queue this long before it is due, so that the desk can choose its hour. */
const LATER_CHECK_AHEAD = 24 * HOUR;
const UNDELIVERED: readonly AlertKind[] = ['message-undeliverable', 'contact-stopped'];
/** Stages in which the window still says how much time is left. */
const WINDOW_COUNTS: readonly Stage[] = ['before-discharge', 'to-book', 'booked', 'confirmed', 'missed'];

/** True while the window of the present round still has to be met. */
export const windowCounts = (stage: Stage): boolean => WINDOW_COUNTS.includes(stage);

/** The desk's own alerts, those that climbed past it included: a climb does not take them off the desk. */
export const owedByDesk = ({ role, climb }: Pick<QueueAlert, 'role' | 'climb'>): boolean =>
	role === 'desk' || climb > 0;

/** True where the visit has begun and nobody has said whether the newborn came, past the grace that policy gives. */
const isUnmarked = ({ stage, visitAt, nextStepDueAt }: QueueFacts, now: Date): boolean =>
	visitAt !== null &&
	visitAt < now &&
	(stage === 'booked' || (stage === 'confirmed' && nextStepDueAt !== null && nextStepDueAt <= now));

/** The groups in which a newborn stands; none means that the desk owes nothing now. */
export function queueGroupsOf(facts: QueueFacts, now: Date): QueueGroup[] {
	const { stage, alerts, nextStepDueAt } = facts;
	const own = alerts.filter(owedByDesk);
	const isLaterCheckNear =
		stage === 'later-check' &&
		nextStepDueAt !== null &&
		nextStepDueAt.getTime() - now.getTime() <= LATER_CHECK_AHEAD;
	const holds: Record<QueueGroup, boolean> = {
		'needs-call': isLaterCheckNear || own.some(({ kind }) => !UNDELIVERED.includes(kind)),
		'did-not-come': stage === 'missed' || isUnmarked(facts, now),
		'needs-visit': stage === 'to-book' && facts.isHandedOver,
		'not-confirmed': stage === 'booked' && !isUnmarked(facts, now),
		undelivered: own.some(({ kind }) => UNDELIVERED.includes(kind))
	};
	return QUEUE_GROUPS.filter((group) => holds[group]);
}

/** The latest due time of later checks that the queue shows. */
export const laterChecksUntil = (now: Date): Date => new Date(now.getTime() + LATER_CHECK_AHEAD);

/** The next step counts as the desk's own only in these stages; in others somebody else owes it. */
const isDesksStep = ({ stage, isHandedOver }: QueueFacts): boolean =>
	(stage === 'to-book' && isHandedOver) ||
	stage === 'booked' ||
	stage === 'confirmed' ||
	stage === 'missed' ||
	stage === 'later-check';

/** The first time by which the desk owes something: its next step, or one of its alerts. */
export function firstDueAt(facts: QueueFacts): Date {
	const dues = facts.alerts.filter(owedByDesk).map(({ dueAt }) => dueAt);
	const { nextStepDueAt } = facts;
	if (nextStepDueAt && (isDesksStep(facts) || dues.length === 0)) dues.push(nextStepDueAt);
	return new Date(Math.min(...dues.map((due) => due.getTime())));
}

/** When the time of this newborn ends: the window's end, or, where no window counts, the first due time. */
export const timeEndsAt = (facts: QueueFacts): Date =>
	(windowCounts(facts.stage) ? facts.windowUntilAt : null) ?? firstDueAt(facts);

function rank(facts: QueueFacts, now: Date): number {
	if (facts.alerts.some((alert) => owedByDesk(alert) && ALERT_URGENCY[alert.kind] === 0)) return 0;
	return firstDueAt(facts) < now ? 1 : 2;
}

/**
 * The order of the queue: emergencies, then what is overdue, then the rest; within each by the time left in the
 * newborn's window, then by the due time. Total, so that a refresh never swaps two rows without a reason.
 * Example: due in 1 h with 20 h left in the window stands before due in 30 min with 40 h left.
 */
export function inQueueOrder<T extends QueueFacts>(rows: readonly T[], now: Date): T[] {
	const keyed = rows.map((row) => ({
		row,
		keys: [rank(row, now), timeEndsAt(row).getTime(), firstDueAt(row).getTime()]
	}));
	keyed.sort((a, b) => {
		for (const [i, key] of a.keys.entries()) {
			const difference = key - (b.keys[i] ?? 0);
			if (difference !== 0) return difference;
		}
		return a.row.followUpId < b.row.followUpId ? -1 : 1;
	});
	return keyed.map(({ row }) => row);
}
