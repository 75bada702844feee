import type { MessageState } from '$lib/domain/messaging/kinds';

export const MESSAGE_STATE_WORDS: Readonly<Record<MessageState, string>> = {
	planned: 'Planned',
	sending: 'Being sent',
	unknown: 'Sent, answer lost: the provider is asked',
	sent: 'Sent',
	withdrawn: 'Withdrawn: no longer true',
	expired: 'Expired: too late to be of use',
	dead: 'Given up'
};

/** How long ago, in the largest unit that fits: "12 s ago", "3 h ago". */
export function ago(at: Date, now: Date): string {
	const seconds = Math.max(0, Math.round((now.getTime() - at.getTime()) / 1000));
	if (seconds < 90) return `${seconds} s ago`;
	if (seconds < 90 * 60) return `${Math.round(seconds / 60)} min ago`;
	if (seconds < 48 * 3600) return `${Math.round(seconds / 3600)} h ago`;
	return `${Math.round(seconds / 86_400)} days ago`;
}
