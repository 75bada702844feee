/** The shared state of one sender: its rate, and whether its provider is being spared. */
export interface SenderState {
	readonly pausedUntil: Date | null;
	readonly failuresInARow: number;
	/** Everything granted so far is paid off at the sender's rate by then. */
	readonly rateFreeAt: Date | null;
}

export interface SenderLimits {
	/** Null for no limit. */
	readonly perSecond: number | null;
	/** While the breaker is half open, one call is let through for each such span. */
	readonly probeSeconds: number;
}

/** Failures in a row, by any worker, that open the breaker. */
export const OPENS_AFTER = 5;

export interface Grant {
	/** Calls that may be made now. */
	readonly granted: number;
	readonly next: SenderState;
}

export const isUnbroken = (sender: SenderState): boolean =>
	sender.failuresInARow < OPENS_AFTER && sender.pausedUntil === null;

/**
 * How many of `wanted` calls may be made at `now`. While paused none; with the breaker open and its pause over, a single
 * one to try the provider, and nobody else gets one until its outcome is known or `probeSeconds` have passed. Otherwise as
 * many as the rate allows: a generic cell rate algorithm (ITU-T I.371) whose burst is one second's worth.
 */
export function grantCalls(sender: SenderState, wanted: number, now: Date, limits: SenderLimits): Grant {
	if (sender.pausedUntil !== null && sender.pausedUntil > now) return { granted: 0, next: sender };
	if (sender.failuresInARow >= OPENS_AFTER) {
		const pausedUntil = new Date(now.getTime() + limits.probeSeconds * 1000);
		return { granted: Math.min(1, wanted), next: { ...sender, pausedUntil } };
	}
	const open = { ...sender, pausedUntil: null };
	if (limits.perSecond === null) return { granted: wanted, next: open };
	const spacing = 1000 / limits.perSecond;
	const start = Math.max(sender.rateFreeAt?.getTime() ?? 0, now.getTime());
	const room = Math.floor((now.getTime() + Math.max(1000, spacing) - start) / spacing);
	const granted = Math.max(0, Math.min(wanted, room));
	return { granted, next: { ...open, rateFreeAt: new Date(start + granted * spacing) } };
}

/** What one batch of calls told about the provider; a refusal of a single message is a success of the provider. */
export interface SenderNews {
	readonly successes: number;
	readonly failures: number;
	/** The provider asked for a pause of this length (429, Retry-After). */
	readonly pauseSeconds?: number | undefined;
}

/**
 * The sender after a batch of calls. A success closes the breaker; failures open it for about `openSeconds`, of which the
 * last quarter is drawn by `fraction` (0 to 1), so that workers do not try the provider in step. A pause that the provider
 * asked for is kept whatever else happens.
 */
export function afterCalls(
	sender: SenderState,
	news: SenderNews,
	{
		now,
		fraction,
		openSeconds
	}: { readonly now: Date; readonly fraction: number; readonly openSeconds: number }
): SenderState {
	const wasOpen = sender.failuresInARow >= OPENS_AFTER;
	const failuresInARow =
		news.successes > 0 ? 0 : Math.min(OPENS_AFTER, sender.failuresInARow + news.failures);
	const ends = wasOpen && news.successes > 0 ? [] : [sender.pausedUntil];
	if (news.failures > 0 && failuresInARow >= OPENS_AFTER) {
		ends.push(new Date(now.getTime() + openSeconds * (0.75 + fraction / 4) * 1000));
	}
	if (news.pauseSeconds) ends.push(new Date(now.getTime() + news.pauseSeconds * 1000));
	const pausedUntil = ends.reduce((latest, end) => (end && (!latest || end > latest) ? end : latest), null);
	return { ...sender, failuresInARow, pausedUntil };
}
