export const CHANNELS = ['sms', 'mail'] as const;
export type Channel = (typeof CHANNELS)[number];

export const MESSAGE_KINDS = [
	'visit-booked',
	'visit-moved',
	'visit-cancelled',
	'reminder-day-before',
	'reminder-morning',
	'check-in-ask',
	'prolonged-check-ask',
	'visit-missed',
	'visit-missed-again',
	'answer-received',
	'other-time-received',
	'follow-up-closed',
	'desk-words',
	'help-answer',
	'stop-answer',
	'start-answer',
	'which-newborn',
	'emergency-advice',
	'duty-finding'
] as const;
export type MessageKind = (typeof MESSAGE_KINDS)[number];

/**
 * planned: waits for its time. sending: claimed by a worker under a lease. unknown: a call began and no outcome was
 * stored, so the provider is asked before anything else. sent: the provider accepted it. withdrawn: no longer holds.
 * expired: too late to be of use. dead: given up, with an alert that somebody owns.
 */
export const MESSAGE_STATES = [
	'planned',
	'sending',
	'unknown',
	'sent',
	'withdrawn',
	'expired',
	'dead'
] as const;
export type MessageState = (typeof MESSAGE_STATES)[number];
