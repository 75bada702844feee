import { convert, publishedRange, thresholdCurve } from '../../domain/guideline';
import type { Assessment, AssessmentInput, CurvePoint } from '../../domain/guideline/types';
import type { HourLineModel } from './model';
import { hourLineSpan } from './span';

export interface HourLineFacts {
	readonly input: Omit<AssessmentInput, 'feeding' | 'jaundiceRisks' | 'dischargeAt'>;
	/** Gives differences, trust and rates; absent, the values are drawn without them. */
	readonly assessment?: Assessment | null;
	readonly window: HourLineModel['window'];
	readonly visits?: HourLineModel['visits'];
	readonly timeZone: string;
	readonly now: Date;
	/** Points of the curve; a table's row needs fewer. */
	readonly stepHours: number;
}

const round = (value: number): number => Math.round(value * 100) / 100;

function curveOf(
	{ input, stepHours }: HourLineFacts,
	span: { fromHour: number; untilHour: number }
): CurvePoint[] {
	const printed = publishedRange(input.standard);
	const fromHour = Math.max(span.fromHour, printed.fromHour);
	const untilHour = Math.min(span.untilHour, printed.untilHour);
	if (untilHour <= fromHour) return [];
	const { standard, gestationalAge, neurotoxicityRisks, albuminGramsPerDecilitre } = input;
	const line = { standard, gestationalAge, neurotoxicityRisks, albuminGramsPerDecilitre };
	// Equal steps that end on the last hour: a curve must not stop short of the picture's edge.
	const steps = Math.ceil((untilHour - fromHour) / stepHours);
	const even = (untilHour - fromHour) / steps;
	const curve = thresholdCurve({ ...line, fromHour, untilHour, stepHours: even });
	return curve.ok ? curve.value : [];
}

/** The hour line of a newborn as the guideline sees it: values in the standard's unit, lines, window, visits. */
export function hourLineOf(facts: HourLineFacts): HourLineModel {
	const { input, assessment, window, visits, timeZone, now } = facts;
	const { unit } = publishedRange(input.standard);
	const measurements = input.bilirubin.map((measurement, i) => {
		const judged = assessment?.measurements[i];
		return {
			at: measurement.at,
			method: measurement.method,
			total: round(convert({ value: measurement.total, unit: measurement.unit }, unit).value),
			...(judged ? { difference: judged.difference, trusted: judged.trusted } : {})
		};
	});
	const drawn = {
		bornAt: input.bornAt,
		timeZone,
		now,
		measurements,
		rates: assessment?.rates,
		window,
		visits,
		phototherapy: input.phototherapy
	};
	const span = hourLineSpan(drawn);
	return { ...drawn, ...span, unit, curve: curveOf(facts, span) };
}
