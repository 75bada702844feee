import { DateTime } from 'luxon';
import type { Outcome, Stage } from '../followup/states';
import type { VisitState } from '../followup/visit';
import type { MessageKind } from './kinds';
import { ASKING_STAGES, SILENT_OUTCOMES } from './plan-stages';

/** A follow-up at the moment of sending, as far as one message depends on it. */
export interface HoldFacts {
	readonly stage: Stage;
	readonly outcome: Outcome | null;
	readonly timeZone: string;
	/** The visit that the message is about; null where it is about none, or the visit is gone. */
	readonly visit: {
		readonly state: VisitState;
		readonly startsAt: Date;
		readonly endedAt: Date | null;
	} | null;
	readonly hasOpenVisit: boolean;
	readonly lastCheckInAt: Date | null;
	readonly lastReachedAt: Date | null;
}

const isOpen = (visit: HoldFacts['visit']): boolean =>
	visit?.state === 'booked' || visit?.state === 'confirmed';

/**
 * Why a message must not go out any more, or null where it still holds. Asked at the moment of sending, since between the
 * plan and the sending a visit may have moved and a follow-up may have closed.
 */
export function whyNoLonger(kind: MessageKind, facts: HoldFacts, now: Date): string | null {
	if (facts.outcome !== null && SILENT_OUTCOMES.includes(facts.outcome)) return 'the follow-up is closed';
	switch (kind) {
		case 'visit-booked':
		case 'visit-moved':
		case 'reminder-day-before':
		case 'reminder-morning':
			if (!isOpen(facts.visit)) return 'the visit no longer stands';
			return facts.visit && facts.visit.startsAt <= now ? 'the visit has begun' : null;
		case 'other-time-received':
			return isOpen(facts.visit) ? null : 'the visit no longer stands';
		case 'visit-cancelled':
			return facts.visit?.state === 'cancelled' && !facts.hasOpenVisit ? null : 'there is another visit';
		case 'visit-missed':
			return facts.stage === 'missed' && facts.visit?.state === 'missed' ? null : 'no longer missed';
		case 'visit-missed-again':
			return stillUnreached(facts);
		case 'check-in-ask':
			return stillAsked(facts, now);
		case 'prolonged-check-ask':
			return facts.stage === 'later-check' ? null : 'no later check is waited for';
		case 'follow-up-closed':
			return facts.stage === 'closed' ? null : 'the follow-up is open again';
		default:
			return null;
	}
}

function stillUnreached({ stage, visit, lastReachedAt }: HoldFacts): string | null {
	if (stage !== 'missed' || visit?.state !== 'missed') return 'no longer missed';
	const missedAt = visit.endedAt ?? visit.startsAt;
	return lastReachedAt !== null && lastReachedAt >= missedAt ? 'the family was reached' : null;
}

function stillAsked({ stage, lastCheckInAt, timeZone }: HoldFacts, now: Date): string | null {
	if (!ASKING_STAGES.includes(stage)) return 'nobody asks any more';
	if (lastCheckInAt === null) return null;
	const [answered, today] = [lastCheckInAt, now].map((at) =>
		DateTime.fromJSDate(at, { zone: timeZone }).toISODate()
	);
	return answered === today ? 'answered already today' : null;
}
