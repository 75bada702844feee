/** ISO 8601 date and time with offset: seconds and their fraction may be left out, the offset may not. */
export const INSTANT =
	/^\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])T(?:[01]\d|2[0-3]):[0-5]\d(?::[0-5]\d(?:\.\d{1,9})?)?(?:Z|[+-](?:0\d|1[0-4]):[0-5]\d)$/;

/**
 * Milliseconds since 1970 of an instant in that form; NaN for anything else, and for days a month does not have
 * (which Date.parse would push into the next month).
 */
export function parseInstant(text: string): number {
	if (!INSTANT.test(text)) return NaN;
	const ms = Date.parse(text);
	const day = (text.charCodeAt(8) - 48) * 10 + text.charCodeAt(9) - 48;
	if (day <= 28) return ms;
	const midnight = new Date(Date.parse(`${text.slice(0, 10)}T00:00:00Z`));
	return midnight.getUTCDate() === day ? ms : NaN;
}
