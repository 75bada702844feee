import { HOUR_MS } from './age';
import { ESCALATION_BELOW_EXCHANGE_TENTHS } from './editions/aap-2022';
import { AAP_2022_TABLE } from './editions/aap-2022-table';
import type { Lines } from './standard';
import { decodeHourly } from './tables';

export const { firstHour: FIRST_HOUR, lastHour: LAST_HOUR } = AAP_2022_TABLE;

type Risk = 'none' | 'present';
const FIRST_WEEK = 35;
const LAST_WEEK = 40;

/** Row of the phototherapy table: 40 means 40 or more, and with a risk factor 38 means 38 or more. */
export function photoCurve(weeks: number, risk: Risk): string {
	return `photo ${risk} ${Math.min(weeks, risk === 'present' ? 38 : LAST_WEEK)}`;
}

/** For exchange 38 means 38 or more, with or without a risk factor. */
export function exchangeCurve(weeks: number, risk: Risk): string {
	return `exchange ${risk} ${Math.min(weeks, 38)}`;
}

/** By week from 35 to 40, then by hour from 1: one frozen object an hour, so that looking up makes no garbage. */
const NO_RISK = allLines('none');
const AT_RISK = allLines('present');

function allLines(risk: Risk): readonly (readonly Lines[])[] {
	const weeks = Array.from({ length: LAST_WEEK - FIRST_WEEK + 1 }, (_, i) => FIRST_WEEK + i);
	return weeks.map((week) => linesOf(week, risk));
}

function linesOf(weeks: number, risk: Risk): readonly Lines[] {
	const curves: Readonly<Record<string, string>> = AAP_2022_TABLE.curves;
	const exchange = decodeHourly(curves[exchangeCurve(weeks, risk)] ?? '');
	return decodeHourly(curves[photoCurve(weeks, risk)] ?? '').map((tenths, hour) => {
		const top = exchange[hour] ?? NaN;
		return Object.freeze({
			phototherapy: tenths / 10,
			escalation: (top - ESCALATION_BELOW_EXCHANGE_TENTHS) / 10,
			exchange: top / 10
		});
	});
}

/** The lines in mg/dL at the completed hour; throws outside 1 to 336 hours, which callers have refused before. */
export function lines(weeks: number, atRisk: boolean, ageMs: number): Lines {
	const hour = Math.floor(ageMs / HOUR_MS);
	const found = (atRisk ? AT_RISK : NO_RISK)[Math.min(weeks, LAST_WEEK) - FIRST_WEEK]?.[hour - FIRST_HOUR];
	if (!found) throw new RangeError(`no line for ${weeks} weeks at hour ${hour}`);
	return found;
}
