import type { AlertKind } from '../domain/followup/alert';
import type { FindingKind } from '../domain/followup/finding';
import type { NextStepKind, Outcome, Stage } from '../domain/followup/states';
import type { VisitKind, VisitState } from '../domain/followup/visit';
import type { CheckInResult, Feeding } from '../domain/guideline/types';

/** The staff's words for the vocabulary of the core; one place, so that every screen says the same. */
export const STAGE_WORDS: Record<Stage, string> = {
	'before-discharge': 'Before discharge',
	'to-book': 'To book',
	booked: 'Booked',
	confirmed: 'Confirmed',
	missed: 'Did not come',
	seen: 'Seen',
	'result-waiting': 'Result waiting',
	'in-treatment': 'In treatment',
	'later-check': 'Later check',
	closed: 'Closed'
};

export const NEXT_STEP_WORDS: Record<NextStepKind, string> = {
	'prepare-discharge': 'Finish the discharge',
	'book-visit': 'Make the visit',
	'get-confirmation': 'Get the family’s confirmation',
	'see-newborn': 'See the newborn',
	'reach-family': 'Reach the family',
	'record-value': 'Record value and decision',
	decide: 'Decide',
	'follow-treatment': 'Record end of treatment or transfer',
	'ask-again-later': 'Ask again later'
};

export const ALERT_WORDS: Record<AlertKind, string> = {
	'check-in-emergency': 'Check-in: emergency',
	'check-in-today': 'Check-in: to be seen today',
	'check-in-call-back': 'Check-in: call back',
	'other-time-asked': 'Family asks for another time',
	'message-undeliverable': 'Message not delivered',
	'contact-stopped': 'Family stopped messages',
	'words-from-family': 'The family wrote',
	'alarming-words': 'Alarming words from the family',
	'outside-window-asked': 'Visit outside the window asked',
	'ladder-step': 'Next try to reach the family',
	'prolonged-jaundice-check': 'Prolonged-jaundice question',
	'direct-fraction-raised': 'Direct fraction raised'
};

export const FINDING_WORDS: Record<FindingKind, string> = {
	'no-next-step': 'Nothing is owed for an open follow-up',
	'step-overdue': 'A next step is overdue',
	'alert-overdue': 'An alert is overdue',
	'stray-text-overdue': 'A text of an unknown number is unread',
	'messages-stuck': 'Messages do not move',
	'worker-silent': 'A worker is silent',
	'tick-troubled': 'A periodic job is in trouble',
	'sender-broken': 'A sender is broken'
};

export const OUTCOME_WORDS: Record<Outcome, string> = {
	'jaundice-settled': 'Jaundice settled',
	'care-transferred': 'Care transferred',
	'moved-away': 'Moved away',
	'not-reached': 'Not reached',
	died: 'Died',
	'entered-twice': 'Entered twice'
};

export const VISIT_KIND_WORDS: Record<VisitKind, string> = {
	check: 'Check (weight and bilirubin)',
	'blood-draw': 'Blood draw',
	'feeding-help': 'Feeding help'
};

export const VISIT_STATE_WORDS: Record<VisitState, string> = {
	booked: 'Not confirmed yet',
	confirmed: 'Confirmed',
	arrived: 'Came',
	missed: 'Did not come',
	cancelled: 'Cancelled',
	moved: 'Moved'
};

export const CHECK_IN_WORDS: Record<CheckInResult, string> = {
	emergency: 'Emergency',
	today: 'To be seen today',
	'call-back': 'Call back',
	'as-planned': 'As planned'
};

export const FEEDING_WORDS: Record<Feeding, string> = { breast: 'Breast', formula: 'Formula', mixed: 'Both' };
