import type { Result } from '../result';
import { ageHours } from './age';
import { assess } from './assess';
import { publishedRange } from './curve';
import { directFraction } from './prolonged';
import type { Assessment, AssessmentInput, Caution, Refusal, TraceStep } from './types';

const SOURCE = 'The published figures of the standard in force end at this age';

const PAST_THE_LINES: Caution = {
	code: 'past-the-lines',
	severity: 'warning',
	text: 'The latest value lies past the last published hour, so no line applies to it. A clinician decides; measure total and direct (or conjugated) bilirubin while jaundice lasts.',
	source: SOURCE
};

function step(input: AssessmentInput, lastHour: number): TraceStep {
	const latest = Math.max(...input.bilirubin.map(({ at }) => ageHours(input.bornAt, at)));
	return {
		rule: 'past-the-lines',
		says: 'A value past the last published hour is held against no line: clinical judgement.',
		inputs: { 'age in hours': Math.floor(latest), 'last published hour': lastHour },
		output: 'judgement, no window',
		source: SOURCE,
		confidence: 'our reading'
	};
}

/** The newborn has a later value than any line covers: what is known stays, and judgement decides. */
function judged(known: Assessment, input: AssessmentInput, lastHour: number): Assessment {
	return {
		...known,
		ageHours: null,
		thresholds: null,
		difference: null,
		decidingIndex: null,
		disposition: 'judgement',
		window: null,
		directFraction: directFraction(input),
		cautions: [PAST_THE_LINES, ...known.cautions],
		trace: [...known.trace, step(input, lastHour)]
	};
}

/**
 * `assess` for a record that goes on past the published hours, as a follow-up of prolonged jaundice does: values
 * within the figures are held against them, later ones open the liver question and leave the rest to judgement.
 * Refuses whatever `assess` refuses for another reason.
 */
export function assessAtAnyAge(input: AssessmentInput): Result<Assessment, readonly Refusal[]> {
	const { untilHour } = publishedRange(input.standard);
	const covered = input.bilirubin.filter(({ at }) => ageHours(input.bornAt, at) <= untilHour);
	if (covered.length === input.bilirubin.length) return assess(input);
	const known = assess({ ...input, bilirubin: covered });
	return known.ok ? { ok: true, value: judged(known.value, input, untilHour) } : known;
}
