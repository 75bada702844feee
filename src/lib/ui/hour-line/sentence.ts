import { ageHoursAt, formatAge, formatTimeLeft } from '../../format/duration';
import { formatDayTime, formatSpan } from '../../format/time';
import { formatBilirubin, formatDifference, methodLabel } from '../../format/values';
import { isPastWindow } from './geometry';
import type { HourLineMeasurement, HourLineModel, HourLineVisit } from './model';
import { ENGLISH, type HourLineWords } from './words';

const STANDING = new Set<HourLineVisit['state']>(['booked', 'confirmed', 'arrived', 'missed']);

/** The visit that matters now: the latest one that was neither cancelled nor moved. */
export function standingVisit(model: HourLineModel): HourLineVisit | undefined {
	return latestOf(model.visits?.filter((visit) => STANDING.has(visit.state)));
}

/** The latest mark, in whatever order they were given. */
function latestOf<Mark extends { readonly at: Date }>(marks: readonly Mark[] | undefined): Mark | undefined {
	return (marks ?? []).reduce<Mark | undefined>(
		(latest, mark) => (latest && latest.at > mark.at ? latest : mark),
		undefined
	);
}

/** "TSB 9.1 mg/dL at 40 h, 4.2 mg/dL below the line". */
export function measurementSentence(model: HourLineModel, measurement: HourLineMeasurement): string {
	const value = formatBilirubin({ value: measurement.total, unit: model.unit });
	const hours = Math.floor(ageHoursAt(model.bornAt, measurement.at));
	const against =
		measurement.difference === undefined ? '' : `, ${formatDifference(measurement.difference, model.unit)}`;
	const doubt = measurement.trusted === false ? ', not to be decided on' : '';
	return `${methodLabel(measurement.method)} ${value} at ${hours} h${against}${doubt}`;
}

function windowSentence(model: HourLineModel): string[] {
	const { window, now, timeZone } = model;
	if (!window) return [];
	const span = formatSpan(window.from, window.until, { timeZone });
	if (window.met) return [`Window ${span}, met`];
	if (isPastWindow(model))
		return [`Window ${span} has passed without a visit, ${formatTimeLeft(window.until, now)}`];
	if (now.getTime() < window.from.getTime()) return [`Window ${span}, not open yet`];
	return [`Window ${span}, ${formatTimeLeft(window.until, now)}`];
}

/** What the picture says, in one line for staff: age, last value, window, visit, last check-in. */
export function hourLineSentence(model: HourLineModel, words: HourLineWords = ENGLISH): string {
	const style = { timeZone: model.timeZone };
	const last = latestOf(model.measurements);
	const visit = standingVisit(model);
	const checkIn = latestOf(model.checkIns);
	const parts = [
		`Age ${formatAge(model.bornAt, model.now)}`,
		last ? measurementSentence(model, last) : 'No bilirubin value yet',
		...windowSentence(model),
		visit ? `Visit ${formatDayTime(visit.at, style)}, ${words.visitStates[visit.state]}` : 'No visit booked',
		...(checkIn ? [`Last check-in ${words.checkInResults[checkIn.result]}`] : [])
	];
	return `${parts.join('. ')}.`;
}

/** The same for a family: the visit and nothing clinical. */
export function plainSentence(model: HourLineModel, words: HourLineWords): string {
	const visit = standingVisit(model);
	if (!visit) return words.nothing;
	const at = formatDayTime(visit.at, { timeZone: model.timeZone, locale: words.locale, audience: 'family' });
	const place = visit.siteName ? `, ${visit.siteName}` : '';
	return `${words.visit}: ${at}${place} (${words.visitStates[visit.state]}).`;
}
