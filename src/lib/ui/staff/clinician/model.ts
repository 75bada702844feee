import { convert, publishedRange, thresholdCurve } from '../../../domain/guideline';
import type {
	Assessment,
	AssessmentInput,
	BilirubinUnit,
	CheckInResult,
	CurvePoint,
	Measurement,
	PhototherapySetting,
	WindowTest
} from '../../../domain/guideline/types';
import type { VisitKind, VisitState } from '../../../domain/followup/visit';
import type { HourLineMeasurement, HourLineMessage, HourLineModel } from '../../hour-line/model';
import { hourLineSpan } from '../../hour-line/span';

/** What lies on one newborn's hour line, as the pages of the pediatrician know it. */
export interface HourLineFacts {
	readonly input: AssessmentInput;
	readonly assessment: Assessment | null;
	readonly timeZone: string;
	readonly now: Date;
	readonly round: number;
	readonly window: { readonly from: Date; readonly until: Date; readonly test?: WindowTest } | null;
	readonly visits: readonly {
		readonly startsAt: Date;
		readonly kind: VisitKind;
		readonly state: VisitState;
		readonly round: number;
	}[];
	readonly checkIns: readonly { readonly at: Date; readonly result: CheckInResult }[];
	readonly messages?: readonly HourLineMessage[];
	readonly phototherapy: readonly {
		readonly startedAt: Date;
		readonly endedAt: Date | null;
		readonly setting: PhototherapySetting;
	}[];
	readonly siteName?: string;
	/** Hours between two points of the threshold lines; small pictures need fewer. */
	readonly stepHours?: number;
}

/** A measurement in the standard's unit, with its distance to the line where the standard gives one. */
function measured(one: Measurement, unit: BilirubinUnit, assessment: Assessment | null): HourLineMeasurement {
	const held = assessment?.measurements.find(
		({ measurement }) => measurement.at.getTime() === one.at.getTime() && measurement.method === one.method
	);
	return {
		at: one.at,
		method: one.method,
		total: convert({ value: one.total, unit: one.unit }, unit).value,
		...(held ? { difference: held.difference, trusted: held.trusted } : {})
	};
}

/** The threshold lines where the standard prints them; none for a newborn it does not cover. */
function curveOf(input: AssessmentInput, stepHours: number): readonly CurvePoint[] {
	const { fromHour, untilHour } = publishedRange(input.standard);
	const curve = thresholdCurve({ ...input, fromHour: Math.ceil(fromHour), untilHour, stepHours });
	return curve.ok ? curve.value : [];
}

/** The hour line of a newborn: values against the lines, window, visits, messages, check-ins, phototherapy. */
export function hourLineOf(facts: HourLineFacts): HourLineModel {
	const { input, assessment, now, timeZone } = facts;
	const { unit } = publishedRange(input.standard);
	const measurements = [...input.bilirubin]
		.sort((a, b) => a.at.getTime() - b.at.getTime())
		.map((one) => measured(one, unit, assessment));
	const isMet = facts.visits.some(({ state, round }) => state === 'arrived' && round === facts.round);
	const marks = {
		bornAt: input.bornAt,
		timeZone,
		now,
		measurements,
		rates: assessment?.rates ?? [],
		window: facts.window ? { ...facts.window, met: isMet } : null,
		visits: facts.visits.map(({ startsAt, kind, state }) => ({
			at: startsAt,
			kind,
			state,
			...(facts.siteName ? { siteName: facts.siteName } : {})
		})),
		checkIns: facts.checkIns,
		messages: facts.messages ?? [],
		phototherapy: facts.phototherapy.map(({ startedAt, endedAt, setting }) => ({
			from: startedAt,
			setting,
			...(endedAt ? { to: endedAt } : {})
		}))
	};
	return { ...marks, ...hourLineSpan(marks), unit, curve: curveOf(input, facts.stepHours ?? 1) };
}
