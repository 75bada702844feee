import { DAY_MS } from './age';
import type { Standard } from './standard';
import type { AssessmentInput, Measurement, Refusal } from './types';
import { valueIn } from './units';

/** Plausible limits of any newborn, wider than a standard's coverage; ours, to catch slips of the pen. */
export const PLAUSIBLE = {
	lastWeek: 44,
	lowestMilligramsPerDecilitre: 0.1,
	highestMilligramsPerDecilitre: 60,
	albuminFrom: 0.5,
	albuminUntil: 7,
	dischargeAfterDays: 365,
	bornFromYear: 2000,
	measurements: 100
} as const;

const BORN_FROM_MS = Date.UTC(PLAUSIBLE.bornFromYear, 0, 1);

/** The latest instant that may have happened; absent, the future is not looked at. */
export interface CheckOptions {
	readonly notAfter?: Date;
	/** Lets values through that are older than the standard's last published age; `decide` holds them against no line. */
	readonly pastTheLines?: boolean;
}

/** Everything that keeps an input from being assessed, each with its field and what to do; empty when nothing does. */
export function check(
	input: AssessmentInput,
	standard: Standard,
	options: CheckOptions = {}
): readonly Refusal[] {
	const refusals: Refusal[] = [];
	const notAfterMs = (options.notAfter ?? input.now)?.getTime() ?? Infinity;
	if (Number.isNaN(notAfterMs)) {
		refuse(
			refusals,
			'instant-unreadable',
			'now',
			'Give the instant of asking as a date and time that exist.'
		);
		return refusals;
	}
	const bornMs = input.bornAt.getTime();
	checkGestationalAge(input, standard, refusals);
	checkBirth(input, notAfterMs, refusals);
	if (!Number.isNaN(bornMs)) {
		const lastAgeMs = options.pastTheLines ? Infinity : standard.coverage.lastAgeMs;
		const context = { bornMs, notAfterMs, lastAgeMs, standard, refusals };
		for (let i = 0; i < input.bilirubin.length; i++) {
			const measurement = input.bilirubin[i];
			if (measurement) checkMeasurement(measurement, i, context);
		}
		if (input.phototherapy.length > 0) checkPhototherapy(input, notAfterMs, refusals);
	}
	if (input.bilirubin.length > 1) checkTogether(input.bilirubin, refusals);
	const albumin = input.albuminGramsPerDecilitre;
	if (albumin !== undefined && !(albumin >= PLAUSIBLE.albuminFrom && albumin <= PLAUSIBLE.albuminUntil)) {
		refuse(
			refusals,
			'albumin-implausible',
			'albuminGramsPerDecilitre',
			`Albumin is given in g/dL, from ${PLAUSIBLE.albuminFrom} to ${PLAUSIBLE.albuminUntil}. Check the value and its unit (30 g/L is 3.0 g/dL).`
		);
	}
	return refusals;
}

function refuse(refusals: Refusal[], code: string, field: string, message: string): void {
	refusals.push({ code, field, message });
}

/** Gestational age inside the standard's coverage; also asked before a chart is drawn. */
export function checkGestationalAge(
	{ gestationalAge }: Pick<AssessmentInput, 'gestationalAge'>,
	{ coverage }: Standard,
	refusals: Refusal[]
): void {
	const { weeks, days } = gestationalAge;
	if (!Number.isInteger(weeks) || !Number.isInteger(days) || days < 0 || days > 6) {
		refuse(
			refusals,
			'gestational-age-unreadable',
			'gestationalAge',
			'Give completed weeks and 0 to 6 days, for example 38+4.'
		);
	} else if (weeks < coverage.firstWeek) {
		refuse(refusals, 'gestational-age-out-of-range', 'gestationalAge', coverage.belowWeeks);
	} else if (weeks > PLAUSIBLE.lastWeek) {
		refuse(
			refusals,
			'gestational-age-implausible',
			'gestationalAge',
			`More than ${PLAUSIBLE.lastWeek} completed weeks is not plausible. Check the dates of the pregnancy.`
		);
	}
}

function checkBirth(input: AssessmentInput, notAfterMs: number, refusals: Refusal[]): void {
	const bornMs = input.bornAt.getTime();
	const dischargeMs = input.dischargeAt.getTime();
	if (Number.isNaN(bornMs)) {
		refuse(refusals, 'instant-unreadable', 'bornAt', 'Give date and time of birth with the offset from UTC.');
		return;
	}
	if (bornMs < BORN_FROM_MS) {
		refuse(
			refusals,
			'birth-implausible',
			'bornAt',
			`Birth before ${PLAUSIBLE.bornFromYear} is not plausible. Check the date.`
		);
	}
	if (bornMs > notAfterMs) {
		refuse(
			refusals,
			'birth-in-the-future',
			'bornAt',
			'Birth lies in the future. Correct the date or time of birth.'
		);
	}
	if (Number.isNaN(dischargeMs)) {
		refuse(
			refusals,
			'instant-unreadable',
			'dischargeAt',
			'Give date and time of discharge, or of the planned discharge, with the offset.'
		);
	} else if (dischargeMs < bornMs) {
		refuse(
			refusals,
			'discharge-before-birth',
			'dischargeAt',
			'Discharge lies before birth. Correct whichever is wrong.'
		);
	} else if (dischargeMs - bornMs > PLAUSIBLE.dischargeAfterDays * DAY_MS) {
		refuse(
			refusals,
			'discharge-implausible',
			'dischargeAt',
			'Discharge lies more than a year after birth. Check both dates.'
		);
	}
}

interface MeasurementContext {
	readonly bornMs: number;
	readonly notAfterMs: number;
	readonly lastAgeMs: number;
	readonly standard: Standard;
	readonly refusals: Refusal[];
}

function checkMeasurement(measurement: Measurement, index: number, context: MeasurementContext): void {
	checkInstant(measurement, index, context);
	checkValue(measurement, index, context.refusals);
}

function checkInstant(measurement: Measurement, index: number, context: MeasurementContext): void {
	const { bornMs, notAfterMs, lastAgeMs, standard, refusals } = context;
	const atMs = measurement.at.getTime();
	const ageMs = atMs - bornMs;
	if (ageMs >= standard.coverage.firstAgeMs && ageMs <= lastAgeMs && atMs <= notAfterMs) return;
	const field = `bilirubin[${index}].at`;
	if (Number.isNaN(atMs))
		refuse(refusals, 'instant-unreadable', field, 'Give date and time of sampling with the offset from UTC.');
	else if (ageMs < 0) {
		refuse(
			refusals,
			'measurement-before-birth',
			field,
			'The measurement lies before birth. Correct whichever is wrong.'
		);
	} else if (atMs > notAfterMs) {
		refuse(
			refusals,
			'measurement-in-the-future',
			field,
			'The measurement lies in the future. Correct its date or time.'
		);
	} else if (ageMs < standard.coverage.firstAgeMs) {
		refuse(refusals, 'age-out-of-range', field, standard.coverage.beforeFirstAge);
	} else refuse(refusals, 'age-out-of-range', field, standard.coverage.afterLastAge);
}

function checkValue({ total, direct, unit }: Measurement, index: number, refusals: Refusal[]): void {
	const { lowestMilligramsPerDecilitre: lowest, highestMilligramsPerDecilitre: highest } = PLAUSIBLE;
	const milligrams = valueIn(total, unit, 'mg/dL');
	if (!(milligrams >= lowest && milligrams <= highest)) {
		refuse(
			refusals,
			'total-implausible',
			`bilirubin[${index}].total`,
			`Total bilirubin must be from ${lowest} to ${highest} mg/dL (${Math.ceil(lowest * 17.1)} to ${Math.round(highest * 17.1)} µmol/L). Check the value and its unit.`
		);
	}
	if (direct === undefined) return;
	if (!(direct >= 0)) {
		refuse(
			refusals,
			'direct-implausible',
			`bilirubin[${index}].direct`,
			'Direct bilirubin cannot be below 0. Check the value.'
		);
	} else if (direct > total) {
		refuse(
			refusals,
			'direct-above-total',
			`bilirubin[${index}].direct`,
			'Direct bilirubin cannot be above the total. Check which value is which.'
		);
	}
}

function checkTogether(bilirubin: readonly Measurement[], refusals: Refusal[]): void {
	if (bilirubin.length > PLAUSIBLE.measurements) {
		refuse(
			refusals,
			'too-many-measurements',
			'bilirubin',
			`At most ${PLAUSIBLE.measurements} measurements of one newborn.`
		);
		return;
	}
	for (let i = 1; i < bilirubin.length; i++) {
		const later = bilirubin[i];
		for (let k = 0; later && k < i; k++) {
			const other = bilirubin[k];
			if (other?.at.getTime() !== later.at.getTime()) continue;
			refuse(
				refusals,
				'two-values-at-one-instant',
				`bilirubin[${i}].at`,
				`Two values at one instant (also bilirubin[${k}]). Keep the right one, or give each its own minute: the later one decides.`
			);
		}
		if (later && later.unit !== bilirubin[0]?.unit) {
			refuse(
				refusals,
				'mixed-units',
				`bilirubin[${i}].unit`,
				'All values of a newborn must be in one unit. Convert them, and check that none was typed under the wrong unit.'
			);
		}
	}
}

function checkPhototherapy(input: AssessmentInput, notAfterMs: number, refusals: Refusal[]): void {
	input.phototherapy.forEach((course, i) => {
		const fromMs = course.from.getTime();
		const toMs = course.to?.getTime() ?? Infinity;
		const at = `phototherapy[${i}]`;
		if (Number.isNaN(fromMs) || Number.isNaN(toMs)) {
			refuse(refusals, 'instant-unreadable', at, 'Give date and time with the offset from UTC.');
		} else if (fromMs < input.bornAt.getTime()) {
			refuse(
				refusals,
				'phototherapy-before-birth',
				`${at}.from`,
				'Phototherapy begins before birth. Correct whichever is wrong.'
			);
		} else if (toMs <= fromMs) {
			refuse(
				refusals,
				'phototherapy-ends-before-it-begins',
				`${at}.to`,
				'The end must lie after the beginning.'
			);
		} else if (fromMs > notAfterMs || (toMs !== Infinity && toMs > notAfterMs)) {
			refuse(
				refusals,
				'phototherapy-in-the-future',
				at,
				'Phototherapy lies in the future. Leave out `to` while it is running.'
			);
		}
		if (course.setting === 'birth-stay' && fromMs > input.dischargeAt.getTime()) {
			refuse(
				refusals,
				'phototherapy-setting',
				`${at}.setting`,
				'This course begins after discharge, so it was not in the birth stay. Say readmission or home.'
			);
		}
		for (let k = 0; k < i; k++) {
			const other = input.phototherapy[k];
			if (!other || fromMs >= (other.to?.getTime() ?? Infinity) || other.from.getTime() >= toMs) continue;
			refuse(
				refusals,
				'phototherapy-overlaps',
				at,
				`This course overlaps phototherapy[${k}]. Give each course once; only the last may be without an end.`
			);
		}
	});
}
