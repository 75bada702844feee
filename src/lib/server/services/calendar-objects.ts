import ical, {
	ICalAttendeeRole,
	ICalAttendeeStatus,
	ICalCalendarMethod,
	ICalEventStatus,
	type ICalCalendar
} from 'ical-generator';

/** One visit as a calendar knows it: the same `uid` through every move, a higher `sequence` with each change. */
export interface CalendarVisit {
	readonly uid: string;
	readonly sequence: number;
	readonly startsAt: Date;
	readonly endsAt: Date;
	readonly isCancelled: boolean;
	/** Shown in the calendar: the clinic to a family; kind and initials to staff. */
	readonly title: string;
	readonly place: string;
	/** The family's page. */
	readonly url?: string | undefined;
}

const PRODUCT = { company: 'Fadewell', product: 'Visits', language: 'EN' };

function addVisit(calendar: ICalCalendar, visit: CalendarVisit, now: Date) {
	return calendar.createEvent({
		id: visit.uid,
		sequence: visit.sequence,
		stamp: now,
		// Instants in UTC: a calendar shows them in its own zone and no rule of daylight saving can go stale.
		start: visit.startsAt,
		end: visit.endsAt,
		summary: visit.title,
		location: visit.place,
		url: visit.url ?? null,
		status: visit.isCancelled ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED
	});
}

export interface Invitation {
	readonly visit: CalendarVisit;
	readonly from: { readonly name: string; readonly email: string };
	readonly to: string;
	readonly now: Date;
}

/** Part of a mail that puts the visit into the family's calendar, moves it there, or takes it out (RFC 5546). */
export function visitInvitation({ visit, from, to, now }: Invitation): {
	method: 'REQUEST' | 'CANCEL';
	content: string;
} {
	const method = visit.isCancelled ? ICalCalendarMethod.CANCEL : ICalCalendarMethod.REQUEST;
	const calendar = ical({ prodId: PRODUCT, method });
	const event = addVisit(calendar, visit, now);
	event.organizer(from);
	event.createAttendee({
		email: to,
		role: ICalAttendeeRole.REQ,
		status: ICalAttendeeStatus.NEEDSACTION,
		// Families answer on their page or by text; nobody reads replies of a calendar.
		rsvp: false
	});
	return { method: visit.isCancelled ? 'CANCEL' : 'REQUEST', content: calendar.toString() };
}

/** One visit to be added to a calendar by hand. */
export function publishedVisit(visit: CalendarVisit, now: Date): string {
	const calendar = ical({ prodId: PRODUCT, method: ICalCalendarMethod.PUBLISH });
	addVisit(calendar, visit, now);
	return calendar.toString();
}

const FEED_MINUTES = 15;

/** Many visits, for a calendar that asks again from time to time. */
export function visitFeed(name: string, visits: readonly CalendarVisit[], now: Date): string {
	const calendar = ical({
		prodId: PRODUCT,
		name,
		method: ICalCalendarMethod.PUBLISH,
		ttl: 60 * FEED_MINUTES
	});
	for (const visit of visits) addVisit(calendar, visit, now);
	return calendar.toString();
}
