import {
	assess,
	type Assessment,
	type AssessmentInput,
	type BilirubinUnit,
	type Measurement,
	type Method
} from '../../src/lib/domain/guideline/index';

/** Births for the golden tests: born at a fixed instant, everything else said in hours of age. */
export const BORN_AT = new Date('2026-03-01T00:00:00.000Z');

export const at = (hours: number): Date => new Date(BORN_AT.getTime() + Math.round(hours * 3_600_000));

export function value(
	hours: number,
	total: number,
	method: Method = 'serum',
	unit: BilirubinUnit = 'mg/dL'
): Measurement {
	return { at: at(hours), method, total, unit };
}

/** A term newborn by AAP 2022, discharged at 60 hours, without risks, treatment or values. */
export function newborn(changes: Partial<AssessmentInput> = {}): AssessmentInput {
	return {
		standard: 'aap-2022',
		gestationalAge: { weeks: 40, days: 0 },
		bornAt: BORN_AT,
		dischargeAt: at(60),
		neurotoxicityRisks: [],
		jaundiceRisks: [],
		feeding: 'formula',
		bilirubin: [],
		phototherapy: [],
		...changes
	};
}

/** The assessment, where the test expects one. */
export function assessed(changes: Partial<AssessmentInput>): Assessment {
	const result = assess(newborn(changes));
	if (!result.ok) throw new Error(`refused: ${result.error.map(({ message }) => message).join(' ')}`);
	return result.value;
}

/** The codes of the refusal, where the test expects one. */
export function refusedFor(changes: Partial<AssessmentInput>): string[] {
	const result = assess(newborn(changes));
	if (result.ok) throw new Error(`not refused: ${result.value.disposition}`);
	return result.error.map(({ code }) => code);
}

/** A window in hours of age: from, until, test. */
export function windowHours({ window }: Pick<Assessment, 'window'>): [number, number, string] | null {
	if (!window) return null;
	const hours = (instant: Date): number => (instant.getTime() - BORN_AT.getTime()) / 3_600_000;
	return [hours(window.from), hours(window.until), window.test];
}

export const codes = ({ cautions }: Pick<Assessment, 'cautions'>): string[] =>
	cautions.map(({ code }) => code);
