import type { CheckInAnswers } from '../../src/lib/domain/guideline/types';

/** The answers of a newborn who is well at any age: enough feeds and diapers, no yellow, nothing wrong. */
export const WELL: CheckInAnswers = {
	yellowArea: 'none',
	yellowChange: 'same',
	yellowDepth: 'none',
	eyesYellow: 'no',
	feedsIn24Hours: 9,
	wetIn24Hours: 6,
	dirtyIn24Hours: 4,
	hoursSinceWet: 2,
	stoolColour: 'yellow',
	urineColour: 'pale',
	waking: 'wakes-for-feeds',
	suck: 'strong',
	cry: 'normal',
	tone: 'normal',
	breathing: 'normal',
	seizure: false,
	worried: false
};
