import { DateTime } from 'luxon';
import { addressed, firstReachable, type Reach } from './plan-carers';
import { type PlanCarer, type PlanFacts, type PlannedMessage, type PlanVisit, PRIORITY } from './plan-facts';
import { lastAllowedBefore, nextAllowed, type QuietHours } from './quiet-hours';

const HOUR = 3_600_000;
/** Local time of the reminder on the day before; common practice, no source. */
const DAY_BEFORE_HOUR = 10;
/** A reminder nearer than this to the booking would say the same thing twice. */
const APART_HOURS = 3;
/** Less than this before the visit a reminder helps nobody. */
const USEFUL_HOURS = 1;

const plusHours = (at: Date, hours: number): Date => new Date(at.getTime() + hours * HOUR);

/** Messages about visits: booked, moved, cancelled, the day before, the morning of, another time asked for. */
export function planVisits(facts: PlanFacts): PlannedMessage[] {
	const carer = firstReachable(facts.carers);
	if (carer === undefined) return [];
	const quiet: QuietHours = { timeZone: facts.timeZone, ...facts.policy };
	return facts.visits.flatMap((visit) => {
		const about = new AboutVisit(facts, visit, carer, quiet);
		if (visit.state === 'cancelled') return about.cancelled();
		if (visit.state !== 'booked' && visit.state !== 'confirmed') return [];
		return [...about.made(), ...about.dayBefore(), ...about.morning(), ...about.otherTime()];
	});
}

class AboutVisit {
	constructor(
		private readonly facts: PlanFacts,
		private readonly visit: PlanVisit,
		private readonly carer: PlanCarer,
		private readonly quiet: QuietHours
	) {}

	/** "Moved" only to a family that was told of the earlier time; to any other it is simply booked. */
	made(): PlannedMessage[] {
		const { visit } = this;
		const isMoved = this.facts.visits.some(
			(other) => other.id !== visit.id && other.calendarUid === visit.calendarUid && other.isTold
		);
		return this.message(isMoved ? 'visit-moved' : 'visit-booked', 'both', visit.bookedAt);
	}

	/** Only where the family was told of the visit; a follow-up with another open visit gets that one's message. */
	cancelled(): PlannedMessage[] {
		const hasOther = this.facts.visits.some(
			(other) => other.state === 'booked' || other.state === 'confirmed'
		);
		if (!this.visit.isTold || this.visit.endedAt === null || hasOther) return [];
		return this.message('visit-cancelled', 'both', this.visit.endedAt);
	}

	dayBefore(): PlannedMessage[] {
		const wanted = this.local()
			.minus({ days: 1 })
			.set({ hour: DAY_BEFORE_HOUR, minute: 0, second: 0, millisecond: 0 });
		return this.reminder('reminder-day-before', lastAllowedBefore(wanted.toJSDate(), this.quiet));
	}

	/** As early on the day itself as the site allows; none where that is too near to the visit. */
	morning(): PlannedMessage[] {
		const [hour = 8, minute = 0] = this.quiet.quietUntil.split(':').map(Number);
		const wanted = this.local()
			.set({ hour: Math.max(hour, 7), minute, second: 0, millisecond: 0 })
			.toJSDate();
		if (nextAllowed(wanted, this.quiet).getTime() !== wanted.getTime()) return [];
		return this.reminder('reminder-morning', wanted);
	}

	otherTime(): PlannedMessage[] {
		const askedAt = this.visit.otherTimeAskedAt;
		if (askedAt === null) return [];
		return addressed(this.facts.followUpId, this.carer, 'preferred', {
			kind: 'other-time-received',
			occasion: `${this.visit.id}-${askedAt.getTime()}`,
			priority: PRIORITY.answer,
			runAt: askedAt,
			expiresAt: plusHours(askedAt, 2),
			facts: { visitId: this.visit.id }
		});
	}

	private local(): DateTime {
		return DateTime.fromJSDate(this.visit.startsAt, { zone: this.facts.timeZone });
	}

	private reminder(kind: 'reminder-day-before' | 'reminder-morning', runAt: Date): PlannedMessage[] {
		const { bookedAt, startsAt } = this.visit;
		if (runAt < plusHours(bookedAt, APART_HOURS) || runAt > plusHours(startsAt, -USEFUL_HOURS)) return [];
		return addressed(this.facts.followUpId, this.carer, 'preferred', {
			kind,
			occasion: this.visit.id,
			priority: kind === 'reminder-morning' ? PRIORITY.soon : PRIORITY.ordinary,
			runAt,
			expiresAt: plusHours(startsAt, -USEFUL_HOURS / 2),
			facts: { visitId: this.visit.id }
		});
	}

	/** At once; where quiet hours would hold it until less than two hours are left, it is urgent. */
	private message(
		kind: 'visit-booked' | 'visit-moved' | 'visit-cancelled',
		reach: Reach,
		at: Date
	): PlannedMessage[] {
		const { startsAt, id } = this.visit;
		const allowed = nextAllowed(at, this.quiet);
		const isUrgent = allowed > plusHours(startsAt, -2);
		const isSoon = startsAt <= plusHours(at, 24);
		return addressed(this.facts.followUpId, this.carer, reach, {
			kind,
			occasion: id,
			priority: isUrgent
				? PRIORITY.urgent
				: isSoon || kind !== 'visit-booked'
					? PRIORITY.soon
					: PRIORITY.ordinary,
			runAt: isUrgent ? at : allowed,
			expiresAt: startsAt,
			facts: { visitId: id }
		});
	}
}
