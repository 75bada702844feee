import { err, ok, type Result } from '../result';
import { HOUR_MS } from './age';
import { checkGestationalAge } from './check';
import { thresholdsOf } from './explain';
import { standardOf } from './registry';
import { LOW_ALBUMIN_GRAMS_PER_DECILITRE } from './risks';
import type { AssessmentInput, BilirubinUnit, CurvePoint, Refusal, StandardId, Thresholds } from './types';

type LineRequest = Pick<
	AssessmentInput,
	'standard' | 'gestationalAge' | 'neurotoxicityRisks' | 'albuminGramsPerDecilitre'
>;

export interface CurveRequest extends LineRequest {
	readonly fromHour: number;
	readonly untilHour: number;
	readonly stepHours: number;
}

export interface PublishedRange {
	readonly fromHour: number;
	readonly untilHour: number;
	readonly unit: BilirubinUnit;
}

/** The hours of age for which a standard prints lines: charts cut their request to these. */
export function publishedRange(standard: StandardId): PublishedRange {
	const { coverage, unit } = standardOf(standard);
	return { fromHour: coverage.firstAgeMs / HOUR_MS, untilHour: coverage.lastAgeMs / HOUR_MS, unit };
}

/** The lines at one age in hours, in the standard's unit; refused outside what is printed. */
export function thresholdsAt(request: LineRequest, hours: number): Result<Thresholds, readonly Refusal[]> {
	const standard = standardOf(request.standard);
	const refusals = refusalsOf(request, [hours]);
	if (refusals.length > 0) return err(refusals);
	const lines = standard.lines(request.gestationalAge.weeks, isAtRisk(request), hours * HOUR_MS);
	return ok(thresholdsOf(lines, standard));
}

/** The lines at every step from one hour to another, both included; refused outside what is printed. */
export function thresholdCurve(request: CurveRequest): Result<CurvePoint[], readonly Refusal[]> {
	const { fromHour, untilHour, stepHours } = request;
	const refusals = refusalsOf(request, [fromHour, untilHour]);
	if (!(stepHours > 0 && untilHour >= fromHour)) {
		refusals.push({
			code: 'curve-unreadable',
			field: 'stepHours',
			message: 'Give a positive step and an end not before the start.'
		});
	}
	if (refusals.length > 0) return err(refusals);
	const standard = standardOf(request.standard);
	const atRisk = isAtRisk(request);
	const points: CurvePoint[] = [];
	const count = Math.floor((untilHour - fromHour) / stepHours + 1e-9);
	for (let i = 0; i <= count; i++) {
		const hour = fromHour + i * stepHours;
		const { unit: _unit, ...lines } = thresholdsOf(
			standard.lines(request.gestationalAge.weeks, atRisk, hour * HOUR_MS),
			standard
		);
		points.push({ hour, ...lines });
	}
	return ok(points);
}

function isAtRisk({ neurotoxicityRisks, albuminGramsPerDecilitre: albumin }: LineRequest): boolean {
	return (
		neurotoxicityRisks.length > 0 || (albumin !== undefined && albumin < LOW_ALBUMIN_GRAMS_PER_DECILITRE)
	);
}

function refusalsOf(request: LineRequest, hours: readonly number[]): Refusal[] {
	const standard = standardOf(request.standard);
	const { coverage } = standard;
	const refusals: Refusal[] = [];
	checkGestationalAge(request, standard, refusals);
	for (const hour of hours) {
		if (!(hour * HOUR_MS >= coverage.firstAgeMs)) {
			refusals.push({ code: 'age-out-of-range', field: 'hour', message: coverage.beforeFirstAge });
		} else if (hour * HOUR_MS > coverage.lastAgeMs) {
			refusals.push({ code: 'age-out-of-range', field: 'hour', message: coverage.afterLastAge });
		}
	}
	return refusals;
}
