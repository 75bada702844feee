import { err, ok, type Result } from '../result';
import { check, type CheckOptions } from './check';
import { decide } from './decide';
import { explain } from './explain';
import { standardOf } from './registry';
import type { Assessment, AssessmentInput, Refusal } from './types';

/**
 * Holds a newborn's bilirubin against the chosen standard: lines, difference, what follows and why. Refuses an
 * input the standard does not cover or that cannot be true, with what to do instead. Pure: `now` is an input.
 *
 * A newborn of 40 weeks with 13.5 mg/dL in serum at 48 hours (line 17.0): difference 3.5, follow-up, serum or
 * transcutaneous bilirubin between 24 and 48 hours after that value.
 */
export function assess(
	input: AssessmentInput,
	options: CheckOptions = {}
): Result<Assessment, readonly Refusal[]> {
	const standard = standardOf(input.standard);
	const refusals = check(input, standard, options);
	if (refusals.length > 0) return err(refusals);
	return ok(explain(decide(input, standard), standard));
}
