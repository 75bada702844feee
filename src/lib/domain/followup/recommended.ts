import type { Assessment, FollowUpWindow } from '../guideline/types';
import { isUrgentDisposition, type Decision } from './transition';

const HOUR = 3_600_000;
/** "As soon as it can be taken" has no printed number of hours: common practice, no source. */
export const SOON_HOURS = 4;

export interface RecommendedDecision {
	/** Null where the standard leaves it to clinical judgement, or its window has passed. */
	readonly decision: Decision | null;
	/** True where the window is ours, since the standard prints none. */
	readonly isOurWindow: boolean;
	readonly hasPassed: boolean;
}

const soon = (now: Date): FollowUpWindow => ({
	from: now,
	until: new Date(now.getTime() + SOON_HOURS * HOUR),
	test: 'serum'
});

/**
 * What accepting the standard's result comes to. Treatment for a value at a line; else to be seen in its window;
 * where it asks for serum without naming hours, within four hours.
 */
export function recommendedDecision(assessment: Assessment, now: Date): RecommendedDecision {
	const { disposition, window } = assessment;
	if (isUrgentDisposition(disposition))
		return { decision: { then: 'treat' }, isOurWindow: false, hasPassed: false };
	if (disposition === 'judgement' && !window) return { decision: null, isOurWindow: false, hasPassed: false };
	if (window && window.until <= now) return { decision: null, isOurWindow: false, hasPassed: true };
	return {
		decision: { then: 'repeat', window: window ?? soon(now) },
		isOurWindow: window === null,
		hasPassed: false
	};
}

/** A result in one word, to tell whether what was accepted is still what the standard gives. */
export const shownResult = ({ disposition, window, difference }: Assessment): string =>
	`${disposition} ${window ? window.until.toISOString() : 'no window'} ${difference ?? 'no value'}`;
