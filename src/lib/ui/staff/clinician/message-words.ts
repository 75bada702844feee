import type { AttemptChannel, AttemptOutcome } from '../../../domain/followup/attempt';
import type { TransitionKind } from '../../../domain/followup/states';
import type { MessageKind, MessageState } from '../../../domain/messaging/kinds';
import type { Tone } from '../../status/tone';

export const MESSAGE_WORDS: Readonly<Record<MessageKind, string>> = {
	'visit-booked': 'Visit made',
	'visit-moved': 'Visit moved',
	'visit-cancelled': 'Visit cancelled',
	'reminder-day-before': 'Reminder, the day before',
	'reminder-morning': 'Reminder, the same morning',
	'check-in-ask': 'Check-in asked',
	'prolonged-check-ask': 'Asked about lasting jaundice',
	'visit-missed': 'Did not come: first message',
	'visit-missed-again': 'Did not come: further message',
	'answer-received': 'Answer received',
	'other-time-received': 'Wish for another time received',
	'follow-up-closed': 'Follow-up closed',
	'desk-words': 'Words from the desk',
	'help-answer': 'Answer to HELP',
	'stop-answer': 'Answer to STOP',
	'start-answer': 'Answer to START',
	'which-newborn': 'Asked which newborn is meant',
	'emergency-advice': 'Emergency advice',
	'duty-finding': 'Finding for the duty person'
};

export interface Standing {
	readonly label: string;
	readonly tone: Tone;
}

const STATES: Readonly<Record<MessageState, Standing>> = {
	planned: { label: 'Planned', tone: 'done' },
	sending: { label: 'Being sent', tone: 'calm' },
	unknown: { label: 'Being looked up', tone: 'waits' },
	sent: { label: 'Sent', tone: 'calm' },
	withdrawn: { label: 'Withdrawn', tone: 'done' },
	expired: { label: 'Too late, not sent', tone: 'waits' },
	dead: { label: 'Given up', tone: 'late' }
};

/** Where a message stands: its delivery once the provider has told it, else its own state. */
export function messageStanding(state: MessageState, delivery: string | null): Standing {
	if (state !== 'sent' || delivery === null) return STATES[state];
	if (delivery === 'delivered' || delivery === 'read') return { label: 'Delivered', tone: 'done' };
	if (delivery === 'failed' || delivery === 'undelivered' || delivery === 'canceled') {
		return { label: 'Not delivered', tone: 'late' };
	}
	return { label: 'Sent, not yet proven', tone: 'calm' };
}

/** True where a message did not reach the family. */
export const hasFailed = (state: MessageState, delivery: string | null): boolean =>
	messageStanding(state, delivery).tone === 'late';

export const ATTEMPT_CHANNEL_WORDS: Readonly<Record<AttemptChannel, string>> = {
	call: 'Call',
	sms: 'SMS',
	mail: 'Mail',
	'in-person': 'In person'
};

export const ATTEMPT_OUTCOME_WORDS: Readonly<Record<AttemptOutcome, string>> = {
	reached: 'reached',
	'no-answer': 'no answer',
	'left-voicemail': 'left a voice message',
	'wrong-number': 'wrong number',
	refused: 'refused',
	sent: 'sent'
};

export const TRANSITION_WORDS: Readonly<Record<TransitionKind, string>> = {
	entered: 'Entered',
	assessed: 'Held against the standard',
	booked: 'Visit booked',
	moved: 'Visit moved',
	cancelled: 'Visit cancelled',
	confirmed: 'Visit confirmed',
	'handed-over': 'Handed over to the clinic',
	arrived: 'Newborn came',
	missed: 'Did not come',
	'value-recorded': 'Value entered or struck',
	accepted: 'Recommendation accepted',
	overridden: 'Decided otherwise',
	'treatment-ended': 'Phototherapy ended',
	closed: 'Closed',
	reopened: 'Opened again',
	merged: 'Merged',
	climbed: 'Climbed to the next person'
};
