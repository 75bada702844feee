import { standardOf } from './registry';
import type { Lines, Standard } from './standard';
import type { Assessment, BilirubinUnit, MeasurementAssessment, StandardId } from './types';
import { valueIn } from './units';

/** A line that a value has reached, as its standard compares. */
export type ReachedLine = 'phototherapy' | 'escalation' | 'exchange';

/** Where a value stands against the lines of its own age. */
export interface Place {
	/** The highest line reached; null below all of them. */
	readonly reached: ReachedLine | null;
	/** "3.6 mg/dL below the phototherapy line". */
	readonly says: string;
}

const LINE_OF_ZONE = {
	below: null,
	phototherapy: 'phototherapy',
	escalate: 'escalation',
	exchange: 'exchange'
} as const;

/**
 * What the result means, in the words of the rule that decided: the last step of the trace. Never made from the
 * disposition alone, which does not say where the value stands: phototherapy may be running with a value below the line.
 */
export function resultSays({ trace, disposition }: Pick<Assessment, 'trace' | 'disposition'>): string {
	return trace.at(-1)?.says ?? disposition;
}

/** What a neurotoxicity risk factor changes by this standard: the lines of AAP 2022, none of NICE CG98's. */
export function neurotoxicityRisksSay(standardId: StandardId): string {
	const rule = standardOf(standardId).rules['risk-curve'];
	return rule?.says ?? 'This standard has no lower lines for them: weigh them by clinical judgement.';
}

/** Places a measurement by its standard's own comparison: AAP 2022 counts "equal" as reached, NICE CG98 does not. */
export function placeOf(held: MeasurementAssessment, standardId: StandardId): Place {
	const standard = standardOf(standardId);
	const { measurement, thresholds } = held;
	const total = valueIn(measurement.total, measurement.unit, standard.unit);
	const lines: Lines = { ...thresholds, escalation: thresholds.escalation ?? NaN };
	const reached = LINE_OF_ZONE[standard.weigh(total, lines).zone];
	const line = reached ?? 'phototherapy';
	const difference = standard.weigh(total, { ...lines, phototherapy: lines[line] }).difference;
	return { reached, says: placeWords(difference, line, standard, reached !== null) };
}

/** The same for the measurement that decides; null where none does. */
export function placeOfDeciding(
	assessment: Pick<Assessment, 'standard' | 'measurements' | 'decidingIndex'>
): Place | null {
	const { decidingIndex, measurements, standard } = assessment;
	const held = decidingIndex === null ? undefined : measurements[decidingIndex];
	return held ? placeOf(held, standard) : null;
}

function placeWords(difference: number, line: ReachedLine, standard: Standard, isReached: boolean): string {
	if (difference !== 0)
		return `${size(difference, standard.unit)} ${difference > 0 ? 'below' : 'over'} the ${line} line`;
	return isReached
		? `equal to the ${line} line, which ${standard.title} counts as reached`
		: `equal to the ${line} line; ${standard.title} treats a value over it`;
}

/** A difference that is not nothing is never written as 0. */
function size(difference: number, unit: BilirubinUnit): string {
	const value = Math.abs(difference);
	const digits = unit === 'mg/dL' || value < 1 ? 1 : 0;
	return `${value.toFixed(digits)} ${unit === 'mg/dL' ? 'mg/dL' : 'µmol/L'}`;
}
