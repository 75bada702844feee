/** What a site decides for itself; the defaults are common practice, no source, and an administrator can change them. */
export interface SitePolicy {
	/** A family should have confirmed this long before the visit. */
	readonly confirmHoursBefore: number;
	/** After discharge, the desk books within this time. */
	readonly bookHoursAfterDischarge: number;
	/** After the visit's start, an absent newborn is owed a decision. */
	readonly arrivalGraceMinutes: number;
	/** To reach a family that did not come, for windows of up to 24 h, up to 48 h, and longer. */
	readonly reachHours: readonly [number, number, number];
	/** After arrival, a value and a decision are recorded. */
	readonly recordHours: number;
	/** After a value, the pediatrician decides. */
	readonly decideHours: number;
	/** The same, at or above a threshold. */
	readonly decideUrgentMinutes: number;
	/** An unmet due time waits this long at each person before it climbs further. */
	readonly climbMinutes: number;
	/** Local `HH:MM` between which families get no message that can wait. */
	readonly quietFrom: string;
	readonly quietUntil: string;
	/** ISO weekdays without messages that can wait. */
	readonly quietDays: readonly number[];
	/** An SMS not delivered within this time is followed by mail. */
	readonly smsUndeliveredMinutes: number;
	/** Between the rungs of the ladder for a family that does not come or answer. */
	readonly ladderMinutes: number;
	/** First and second person to whom an unmet due time climbs. */
	readonly dutyStaffIds: readonly string[];
	/** What the site does when nobody can be reached, in its own words. */
	readonly welfareCheck: string;
}

export const DEFAULT_POLICY: SitePolicy = {
	confirmHoursBefore: 24,
	bookHoursAfterDischarge: 2,
	arrivalGraceMinutes: 30,
	reachHours: [1, 2, 4],
	recordHours: 4,
	decideHours: 2,
	decideUrgentMinutes: 30,
	climbMinutes: 30,
	quietFrom: '21:00',
	quietUntil: '08:00',
	quietDays: [],
	smsUndeliveredMinutes: 30,
	ladderMinutes: 60,
	dutyStaffIds: [],
	welfareCheck: 'Ask the local community nurse for a welfare check.'
};
