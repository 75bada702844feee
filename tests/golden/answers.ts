import {
	triageCheckIn,
	type CheckInAnswers,
	type CheckInContext,
	type CheckInResult
} from '../../src/lib/domain/guideline/index';
import { at, BORN_AT } from './newborn';

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

/** Asked at an age in hours. */
export const atAge = (hours: number, more: Partial<CheckInContext> = {}): CheckInContext => ({
	bornAt: BORN_AT,
	now: at(hours),
	...more
});

/** Asked eight hours into a day of age, counted from 1. */
export const onDay = (day: number, more: Partial<CheckInContext> = {}): CheckInContext =>
	atAge((day - 1) * 24 + 8, more);

/** What a well newborn's answers ask for once some are changed; on day 4 unless said otherwise. */
export const triage = (changes: Partial<CheckInAnswers>, context = onDay(4)): CheckInResult =>
	triageCheckIn({ ...WELL, ...changes }, context).result;
