import { convert, publishedRange, thresholdCurve, thresholdsAt } from '../../domain/guideline';
import type { CurvePoint, FollowUpWindow } from '../../domain/guideline/types';
import { ageHoursAt } from '../../format/duration';
import type { HourLineMeasurement, HourLineModel } from '../../ui/hour-line/model';
import { hourLineSpan } from '../../ui/hour-line/span';
import type { FollowUpRow } from '../repos/follow-ups';
import type { MeasurementRow, NewbornRow, PhototherapyRow } from '../repos/newborns';

export interface HourLineFacts {
	readonly followUp: FollowUpRow;
	readonly newborn: NewbornRow;
	readonly timeZone: string;
	readonly now: Date;
	readonly window: (FollowUpWindow & { readonly met: boolean }) | null;
	/** The desk sees the latest value and no other. */
	readonly latest: MeasurementRow | null;
	readonly phototherapy: readonly PhototherapyRow[];
	readonly visits: NonNullable<HourLineModel['visits']>;
	readonly messages: NonNullable<HourLineModel['messages']>;
	readonly checkIns: NonNullable<HourLineModel['checkIns']>;
}

/** A picture as wide as a table's row needs no more points of the curve. */
const CURVE_STEP_HOURS = 12;
const round = (value: number) => Math.round(value * 100) / 100;

function lineRequest({ followUp, newborn }: HourLineFacts) {
	return {
		standard: followUp.standard,
		gestationalAge: { weeks: newborn.gestationWeeks, days: newborn.gestationDays },
		neurotoxicityRisks: newborn.neurotoxicityRisks,
		albuminGramsPerDecilitre: newborn.albuminGramsPerDecilitre ?? undefined
	};
}

function curveOf(facts: HourLineFacts, span: { fromHour: number; untilHour: number }): CurvePoint[] {
	const printed = publishedRange(facts.followUp.standard);
	const fromHour = Math.max(span.fromHour, printed.fromHour);
	const untilHour = Math.min(span.untilHour, printed.untilHour);
	if (untilHour <= fromHour) return [];
	const curve = thresholdCurve({ ...lineRequest(facts), fromHour, untilHour, stepHours: CURVE_STEP_HOURS });
	return curve.ok ? curve.value : [];
}

function latestOf(facts: HourLineFacts): HourLineMeasurement[] {
	const { latest, newborn, followUp } = facts;
	if (!latest) return [];
	const { unit } = publishedRange(followUp.standard);
	const total = round(convert({ value: latest.total, unit: latest.unit }, unit).value);
	const lines = thresholdsAt(lineRequest(facts), ageHoursAt(newborn.bornAt, latest.measuredAt));
	const difference = lines.ok ? { difference: round(lines.value.phototherapy - total) } : {};
	return [{ at: latest.measuredAt, method: latest.method, total, ...difference }];
}

/** The hour line as the desk sees it: window, visits, contacts, and the latest value only. */
export function deskHourLine(facts: HourLineFacts): HourLineModel {
	const { newborn, timeZone, now, window, visits, messages, checkIns } = facts;
	const phototherapy = facts.phototherapy.map((course) => ({
		from: course.startedAt,
		to: course.endedAt ?? undefined,
		setting: course.setting
	}));
	const shown = {
		bornAt: newborn.bornAt,
		timeZone,
		now,
		measurements: latestOf(facts),
		window,
		visits,
		messages,
		checkIns,
		phototherapy
	};
	const span = hourLineSpan(shown);
	return {
		...shown,
		...span,
		unit: publishedRange(facts.followUp.standard).unit,
		curve: curveOf(facts, span)
	};
}
