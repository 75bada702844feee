import { rateOf } from './explain';
import { decide } from './decide';
import { standardOf } from './registry';
import type { AssessmentInput, RateOfRise } from './types';

/**
 * Rate of rise between any two measurements of a checked input, by their places in `input.bilirubin`; null when they
 * are not two, or lie at one instant. The earlier one comes first whatever the order asked.
 */
export function rateOfRise(input: AssessmentInput, oneIndex: number, otherIndex: number): RateOfRise | null {
	const standard = standardOf(input.standard);
	const { readings, case: known } = decide(input, standard);
	const [earlier, later] = readings.filter(({ index }) => index === oneIndex || index === otherIndex);
	if (!earlier || !later || earlier.atMs === later.atMs) return null;
	return rateOf(earlier, later, standard, known);
}
