/** ISO 8601 date and time with offset: seconds and their fraction may be left out, the offset may not. */
export const INSTANT =
	/^\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])T(?:[01]\d|2[0-3]):[0-5]\d(?::[0-5]\d(?:\.\d{1,9})?)?(?:Z|[+-](?:0\d|1[0-4]):[0-5]\d)$/;

/**
 * Milliseconds since 1970 of an instant in that form; NaN for anything else, and for days a month does not have
 * (which Date.parse would push into the next month).
 */
export function parseInstant(text: string): number {
	return isUsualForm(text) ? parseUsualForm(text) : parseAnyForm(text);
}

function parseAnyForm(text: string): number {
	if (!INSTANT.test(text)) return NaN;
	const ms = Date.parse(text);
	const midnight = new Date(Date.parse(`${text.slice(0, 10)}T00:00:00Z`));
	return midnight.getUTCDate() === Number(text.slice(8, 10)) ? ms : NaN;
}

const DASH = 45;
const PLUS = 43;
const COLON = 58;
const LETTER_T = 84;

/** 2026-03-01T08:30:00+01:00, as most software writes it. Read by hand in a quarter of the time, for the batch. */
function isUsualForm(text: string): boolean {
	return (
		text.length === 25 &&
		text.charCodeAt(4) === DASH &&
		text.charCodeAt(7) === DASH &&
		text.charCodeAt(10) === LETTER_T &&
		text.charCodeAt(13) === COLON &&
		text.charCodeAt(16) === COLON &&
		text.charCodeAt(22) === COLON
	);
}

function parseUsualForm(text: string): number {
	const sign = text.charCodeAt(19);
	if (sign !== PLUS && sign !== DASH) return NaN;
	const days = daysSince1970(
		twoDigits(text, 0) * 100 + twoDigits(text, 2),
		twoDigits(text, 5),
		twoDigits(text, 8)
	);
	const minutes = minutesOfDay(twoDigits(text, 11), twoDigits(text, 14), 23);
	const offset = minutesOfDay(twoDigits(text, 20), twoDigits(text, 23), 14);
	const seconds = twoDigits(text, 17);
	if (!(seconds <= 59)) return NaN;
	return ((days * 1440 + minutes - (sign === PLUS ? offset : -offset)) * 60 + seconds) * 1000;
}

function twoDigits(text: string, at: number): number {
	const tens = text.charCodeAt(at) - 48;
	const ones = text.charCodeAt(at + 1) - 48;
	return tens >= 0 && tens <= 9 && ones >= 0 && ones <= 9 ? tens * 10 + ones : NaN;
}

function minutesOfDay(hours: number, minutes: number, lastHour: number): number {
	return hours <= lastHour && minutes <= 59 ? hours * 60 + minutes : NaN;
}

const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
const DAYS_BEFORE_MONTH = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334];
const DAYS_BEFORE_1970 = 719_162;

/** By the Gregorian calendar; NaN for a day that does not exist. */
function daysSince1970(year: number, month: number, day: number): number {
	const isLeap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
	const monthDays = (MONTH_DAYS[month - 1] ?? NaN) + (isLeap && month === 2 ? 1 : 0);
	if (!(day >= 1 && day <= monthDays)) return NaN;
	const past = year - 1;
	const leapDays = Math.floor(past / 4) - Math.floor(past / 100) + Math.floor(past / 400);
	const beforeMonth = (DAYS_BEFORE_MONTH[month - 1] ?? NaN) + (isLeap && month > 2 ? 1 : 0);
	return past * 365 + leapDays + beforeMonth + day - 1 - DAYS_BEFORE_1970;
}
