export const ATTEMPT_CHANNELS = ['call', 'sms', 'mail', 'in-person'] as const;
export type AttemptChannel = (typeof ATTEMPT_CHANNELS)[number];

export const ATTEMPT_OUTCOMES = [
	'reached',
	'no-answer',
	'left-voicemail',
	'wrong-number',
	'refused',
	'sent'
] as const;
export type AttemptOutcome = (typeof ATTEMPT_OUTCOMES)[number];
