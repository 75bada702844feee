/** What the watch finds: something owed by nobody, or not moving. */
export const FINDING_KINDS = [
	'no-next-step',
	'step-overdue',
	'alert-overdue',
	'stray-text-overdue',
	'messages-stuck',
	'worker-silent',
	'tick-troubled',
	'sender-broken'
] as const;
export type FindingKind = (typeof FINDING_KINDS)[number];
