const HOUR = 3_600_000;

/** Words that do not alarm are read within this time (common practice, no source). */
export const READ_WITHIN_HOURS = 2;

/** By when a person must have read words that came in: at once where they alarm. */
export const readBy = (cameAt: Date, isAlarming: boolean): Date =>
	isAlarming ? cameAt : new Date(cameAt.getTime() + READ_WITHIN_HOURS * HOUR);
