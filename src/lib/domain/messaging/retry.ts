/** A message is given up after this many failed calls; with the pauses below that is most of a day. */
export const MAX_ATTEMPTS = 14;
/** A message that was claimed this often without any outcome keeps killing its worker, and is given up. */
export const MAX_CLAIMS = 200;

const FIRST_PAUSE_SECONDS = 10;
const LONGEST_PAUSE_SECONDS = 2 * 3600;

/**
 * Seconds until the next try after `attempts` failures (1 or more): doubling from 10 s to 2 h, of which the second half is
 * drawn by `fraction` (0 to 1), so that messages that failed together do not come back together.
 * A provider's own wish (`retryAfterSeconds`) is never undercut.
 * Example: after the third failure 20 s to 40 s.
 */
export function pauseSeconds({ attempts, fraction, retryAfterSeconds = 0 }: RetryFacts): number {
	const full = Math.min(FIRST_PAUSE_SECONDS * 2 ** Math.max(0, attempts - 1), LONGEST_PAUSE_SECONDS);
	const jittered = full / 2 + (full / 2) * fraction;
	return retryAfterSeconds > jittered ? retryAfterSeconds + fraction : jittered;
}

export interface RetryFacts {
	/** Failed calls so far, the last one included if it counts. */
	readonly attempts: number;
	readonly fraction: number;
	readonly retryAfterSeconds?: number | undefined;
}

export type AfterFailure =
	| { readonly kind: 'again'; readonly runAt: Date }
	| { readonly kind: 'give-up'; readonly why: 'too-many-attempts' | 'too-late' };

/** What becomes of a message after a failed call: tried again, or given up because it was tried enough or would be late. */
export function afterFailure(
	facts: RetryFacts & { readonly claims: number; readonly now: Date; readonly expiresAt: Date }
): AfterFailure {
	if (facts.attempts >= MAX_ATTEMPTS || facts.claims >= MAX_CLAIMS)
		return { kind: 'give-up', why: 'too-many-attempts' };
	const runAt = new Date(facts.now.getTime() + pauseSeconds(facts) * 1000);
	return runAt < facts.expiresAt ? { kind: 'again', runAt } : { kind: 'give-up', why: 'too-late' };
}
