import { HOUR_MS } from './age';
import { NICE_CG98_TABLE } from './editions/nice-cg98-table';
import * as edition from './editions/nice-cg98';
import type { Lines, StopAsked } from './standard';
import { decodePoints, valueAt, type Curve } from './tables';

export const FIRST_WEEK = 23;
const CURVES: Readonly<Record<string, string>> = NICE_CG98_TABLE.curves;
const PHOTO = pointsOf('photo');
const EXCHANGE = pointsOf('exchange');

function pointsOf(table: 'photo' | 'exchange'): readonly Curve[] {
	return Array.from({ length: 16 }, (_, i) => decodePoints(CURVES[`${table} ${FIRST_WEEK + i}`] ?? ''));
}

/** 38 means 38 weeks or more. */
export const rowOf = (weeks: number): number => Math.min(weeks, 38);
export const rounded = (value: number): number => Math.round(value * 10) / 10;

/** The lines in µmol/L, to 0.1; throws below 23 weeks, which callers have refused before. */
export function lines(weeks: number, _atRisk: boolean, ageMs: number): Lines {
	const photo = PHOTO[rowOf(weeks) - FIRST_WEEK];
	const exchange = EXCHANGE[rowOf(weeks) - FIRST_WEEK];
	if (!photo || !exchange) throw new RangeError(`no line for ${weeks} weeks`);
	const hours = ageMs / HOUR_MS;
	return {
		phototherapy: rounded(valueAt(photo, hours)),
		escalation: NaN,
		exchange: rounded(valueAt(exchange, hours))
	};
}

/** The value in µmol/L at or below which stopping is an option: 50 under the line of that age. Null past the last age. */
export function stopLevel({ weeks, ageMs }: StopAsked): number | null {
	if (!(ageMs >= 0 && ageMs <= edition.LAST_AGE_DAYS * 24 * HOUR_MS)) return null;
	return rounded(lines(weeks, false, ageMs).phototherapy - edition.STOP_BELOW_LINE_MICROMOLES);
}
