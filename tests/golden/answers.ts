import {
	triageCheckIn,
	type CheckInAnswers,
	type CheckInContext,
	type CheckInResult
} from '../../src/lib/domain/guideline/index';
import { WELL } from '../support/well-newborn';
import { at, BORN_AT } from './newborn';

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
