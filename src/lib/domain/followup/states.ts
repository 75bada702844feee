/** The vocabulary of a follow-up's life. */

export const STAGES = [
	'before-discharge',
	'to-book',
	'booked',
	'confirmed',
	'missed',
	'seen',
	'result-waiting',
	'in-treatment',
	'later-check',
	'closed'
] as const;
export type Stage = (typeof STAGES)[number];
export type OpenStage = Exclude<Stage, 'closed'>;

export const NEXT_STEPS = [
	'prepare-discharge',
	'book-visit',
	'get-confirmation',
	'see-newborn',
	'reach-family',
	'record-value',
	'decide',
	'follow-treatment',
	'ask-again-later'
] as const;
export type NextStepKind = (typeof NEXT_STEPS)[number];

/** Each open stage owes exactly one kind of next step. */
export const NEXT_STEP_OF: Readonly<Record<OpenStage, NextStepKind>> = {
	'before-discharge': 'prepare-discharge',
	'to-book': 'book-visit',
	booked: 'get-confirmation',
	confirmed: 'see-newborn',
	missed: 'reach-family',
	seen: 'record-value',
	'result-waiting': 'decide',
	'in-treatment': 'follow-treatment',
	'later-check': 'ask-again-later'
};

export const OUTCOMES = [
	'jaundice-settled',
	'care-transferred',
	'moved-away',
	'not-reached',
	'died',
	'entered-twice'
] as const;
export type Outcome = (typeof OUTCOMES)[number];

export const TRANSITIONS = [
	'entered',
	'assessed',
	'booked',
	'moved',
	'cancelled',
	'confirmed',
	'handed-over',
	'arrived',
	'missed',
	'value-recorded',
	'accepted',
	'overridden',
	'treatment-ended',
	'closed',
	'reopened',
	'merged',
	'climbed'
] as const;
export type TransitionKind = (typeof TRANSITIONS)[number];
