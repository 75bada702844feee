import { DAY_MS } from './age';
import { liverFinding } from './liver';
import { standardOf } from './registry';
import type { AssessmentInput, DirectFractionFinding } from './types';

type Asked = Pick<AssessmentInput, 'standard' | 'gestationalAge' | 'feeding' | 'bornAt'>;

/** One date on which the family is asked whether the newborn is still jaundiced. */
export interface ProlongedJaundiceCheck {
	readonly at: Date;
	readonly ageDays: number;
	/** What the standard asks at this age, for a clinician to read. */
	readonly says: string;
	readonly source: string;
}

/** All dates of the prolonged-jaundice question, by standard, feeding and gestational age, in order. */
export function prolongedJaundiceChecks(asked: Asked): readonly ProlongedJaundiceCheck[] {
	const standard = standardOf(asked.standard);
	return standard.prolonged(asked).map(({ days, rule }) => ({
		at: new Date(asked.bornAt.getTime() + days * DAY_MS),
		ageDays: days,
		says: standard.rules[rule]?.says ?? '',
		source: standard.rules[rule]?.source ?? ''
	}));
}

/** The first of those dates after an instant; null when all have passed. */
export function nextProlongedJaundiceCheckAt(asked: Asked, after: Date): Date | null {
	return prolongedJaundiceChecks(asked).find(({ at }) => at.getTime() > after.getTime())?.at ?? null;
}

/** The liver question alone, at any age, also past the end of the lines, where `assess` refuses. */
export function directFraction(
	input: Asked & Pick<AssessmentInput, 'bilirubin' | 'now'>
): DirectFractionFinding {
	return liverFinding(input, standardOf(input.standard));
}
