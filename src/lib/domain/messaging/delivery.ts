/**
 * What a provider tells about an accepted message, in the order of its life. Reports arrive in any order: a status only
 * ever replaces one of a lower rank, so an old report that comes late changes nothing.
 */
const RANK = {
	accepted: 1,
	scheduled: 1,
	queued: 2,
	sending: 3,
	sent: 4,
	undelivered: 5,
	failed: 5,
	canceled: 5,
	delivered: 6,
	read: 7
} as const;

export type DeliveryStatus = keyof typeof RANK;

const STATUSES: readonly string[] = Object.keys(RANK);

/** The provider's word as a status that we know; null for any other word. */
export function parseDeliveryStatus(word: string): DeliveryStatus | null {
	return isStatus(word) ? word : null;
}

function isStatus(word: string): word is DeliveryStatus {
	return STATUSES.includes(word);
}

/** Statuses that a report of `next` may replace. */
export function replacedBy(next: DeliveryStatus): readonly DeliveryStatus[] {
	return STATUSES.filter(isStatus).filter((status) => RANK[status] < RANK[next]);
}

/** True when the message reached the telephone. */
export const isProven = (status: DeliveryStatus): boolean => RANK[status] >= RANK.delivered;

/** True when the provider has given the message up. */
export const isRefused = (status: DeliveryStatus): boolean => RANK[status] === RANK.failed;

export const REFUSED_STATUSES: readonly DeliveryStatus[] = STATUSES.filter(isStatus).filter(isRefused);
