import { err, ok, type Result } from '../result';
import { check } from './check';
import { decide } from './decide';
import { explain } from './explain';
import { standardOf } from './registry';
import type { Assessment, AssessmentInput, Refusal } from './types';

/**
 * `assess` for a record that goes on past the published hours, as a follow-up of prolonged jaundice does: values
 * within the figures are held against them, later ones open the liver question and leave the rest to judgement.
 * Refuses whatever `assess` refuses for another reason than the age of a value.
 */
export function assessAtAnyAge(input: AssessmentInput): Result<Assessment, readonly Refusal[]> {
	const standard = standardOf(input.standard);
	const refusals = check(input, standard, { pastTheLines: true });
	if (refusals.length > 0) return err(refusals);
	return ok(explain(decide(input, standard), standard));
}
