const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

/**
 * A length of time in two units at most, rounded down: "45 min", "3 h 20 min", "26 h", "3 d 4 h".
 * Below 48 hours days are not used, since newborns are counted in hours.
 */
export function formatDuration(milliseconds: number): string {
	const minutes = Math.floor(Math.abs(milliseconds) / MINUTE);
	const hours = Math.floor(minutes / 60);
	if (hours === 0) return `${minutes} min`;
	if (hours < 12) return minutes % 60 === 0 ? `${hours} h` : `${hours} h ${minutes % 60} min`;
	if (hours < 48) return `${hours} h`;
	return hours % 24 === 0 ? `${hours / 24} d` : `${Math.floor(hours / 24)} d ${hours % 24} h`;
}

/** Hours since birth, unrounded. */
export function ageHoursAt(bornAt: Date, at: Date): number {
	return (at.getTime() - bornAt.getTime()) / HOUR;
}

/** "46 h" up to 7 days, then "12 days" or "5 weeks". Rounded down: a newborn is never made older. */
export function formatAge(bornAt: Date, at: Date): string {
	const hours = Math.floor(ageHoursAt(bornAt, at));
	if (hours < 0) return 'not born yet';
	if (hours < 168) return `${hours} h`;
	const days = Math.floor(hours / 24);
	return days < 28 ? `${days} days` : `${Math.floor(days / 7)} weeks`;
}

export type DueState = 'later' | 'soon' | 'late';

/** Where a due time stands: late once it has passed, soon within `soonHours`. */
export function dueState(dueAt: Date, now: Date, soonHours = 2): DueState {
	const left = dueAt.getTime() - now.getTime();
	if (left < 0) return 'late';
	return left <= soonHours * HOUR ? 'soon' : 'later';
}

/** "3 h 20 min left" or "45 min late". */
export function formatTimeLeft(dueAt: Date, now: Date): string {
	const left = dueAt.getTime() - now.getTime();
	return left < 0 ? `${formatDuration(left)} late` : `${formatDuration(left)} left`;
}
