export const ALERT_KINDS = [
	'check-in-emergency',
	'check-in-today',
	'check-in-call-back',
	'other-time-asked',
	'message-undeliverable',
	'contact-stopped',
	'words-from-family',
	'alarming-words',
	'outside-window-asked',
	'ladder-step',
	'prolonged-jaundice-check',
	'direct-fraction-raised'
] as const;
export type AlertKind = (typeof ALERT_KINDS)[number];

/** Worst first; the order in which a desk should take them. */
export const ALERT_URGENCY: Readonly<Record<AlertKind, number>> = {
	'check-in-emergency': 0,
	'alarming-words': 0,
	'check-in-today': 1,
	'direct-fraction-raised': 1,
	'ladder-step': 2,
	'check-in-call-back': 2,
	'message-undeliverable': 3,
	'other-time-asked': 3,
	'contact-stopped': 3,
	'outside-window-asked': 3,
	'words-from-family': 4,
	'prolonged-jaundice-check': 4
};
