import type { MissingThing } from '$lib/domain/followup/discharge-missing';

/** What is missing, in the nurse's words and as short as a mark. */
export const MISSING_WORDS: Record<MissingThing, string> = {
	value: 'bilirubin value',
	'serum-value': 'TSB to confirm',
	decision: 'decision about treatment',
	'birth-weight': 'birth weight',
	carer: 'family',
	'reachable-carer': 'telephone or e-mail',
	consent: 'consent to messages',
	visit: 'visit',
	'hand-over': 'hand-over'
};
