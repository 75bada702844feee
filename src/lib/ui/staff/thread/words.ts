import type { MessageKind, MessageState } from '../../../domain/messaging/kinds';
import type { Tone } from '../../status/tone';

/** Kinds of messages in words for staff. */
export const MESSAGE_KIND_WORDS: Readonly<Record<MessageKind, string>> = {
	'visit-booked': 'Visit booked',
	'visit-moved': 'Visit moved',
	'visit-cancelled': 'Visit cancelled',
	'reminder-day-before': 'Reminder, day before',
	'reminder-morning': 'Reminder, same morning',
	'check-in-ask': 'Morning questions',
	'prolonged-check-ask': 'Questions about lasting jaundice',
	'visit-missed': 'Visit missed',
	'visit-missed-again': 'Visit missed, second message',
	'answer-received': 'Answers received',
	'other-time-received': 'Other time asked for',
	'follow-up-closed': 'Follow-up closed',
	'desk-words': 'Words of staff',
	'help-answer': 'Answer to HELP',
	'stop-answer': 'Answer to STOP',
	'start-answer': 'Answer to START',
	'which-newborn': 'Which newborn is meant',
	'emergency-advice': 'Emergency advice',
	'duty-finding': 'Finding of the watch'
};

/** What a text was understood as, where that says more than the words. */
export const UNDERSTOOD_WORDS: Readonly<Record<string, string>> = {
	confirm: 'Understood as: comes to the visit',
	'other-time': 'Understood as: wants another time',
	stop: 'Understood as: no more texts',
	start: 'Understood as: texts again',
	help: 'Understood as: asks for help',
	choice: 'Understood as: an answer by number'
};

interface Fate {
	readonly tone: Tone;
	readonly label: string;
}

const STATES: Readonly<Record<MessageState, Fate>> = {
	planned: { tone: 'calm', label: 'Waits for its time' },
	sending: { tone: 'calm', label: 'Being sent' },
	unknown: { tone: 'waits', label: 'Asking whether it was sent' },
	sent: { tone: 'calm', label: 'Sent' },
	withdrawn: { tone: 'calm', label: 'Withdrawn' },
	expired: { tone: 'waits', label: 'Too late, not sent' },
	dead: { tone: 'late', label: 'Could not be sent' }
};

/** What became of a message, as far as it is known. */
export function fateOf(state: MessageState, delivery: string | null): Fate {
	if (state !== 'sent') return STATES[state];
	if (delivery === 'delivered' || delivery === 'read') return { tone: 'done', label: 'Arrived' };
	if (delivery === 'undelivered' || delivery === 'failed') return { tone: 'late', label: 'Did not arrive' };
	return STATES.sent;
}
