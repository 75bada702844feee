import type { FollowUpWindow } from '../guideline/types';
import type { AttemptChannel, AttemptOutcome } from './attempt';
import type { SitePolicy } from './policy';

/** The rungs by which a family that does not come or answer is reached, in order (common practice, no source; site policy). */
export const LADDER = [
	{ rung: 'message-first-carer', by: 'worker', says: 'A message to the first carer.' },
	{ rung: 'first-call', by: 'desk', says: 'Call the first carer.' },
	{ rung: 'message-second-carer', by: 'worker', says: 'A message to the second carer, and mail.' },
	{ rung: 'second-call', by: 'desk', says: 'Call again, at another time of day, every number there is.' },
	{ rung: 'pediatrician', by: 'pediatrician', says: 'Nobody was reached: decide how to go on.' },
	{ rung: 'welfare-check', by: 'pediatrician', says: 'Ask for a welfare check, or do as local policy says.' }
] as const;

export type Rung = (typeof LADDER)[number]['rung'];

export interface LadderAttempt {
	readonly at: Date;
	readonly channel: AttemptChannel;
	readonly outcome: AttemptOutcome;
}

const HOUR = 3_600_000;

/** Minutes between rungs: the site's figure, halved where the window is 24 hours or shorter. */
export function ladderSpacingMinutes(policy: SitePolicy, window: FollowUpWindow | null): number {
	const isShort = window !== null && window.until.getTime() - window.from.getTime() <= 24 * HOUR;
	return isShort ? policy.ladderMinutes / 2 : policy.ladderMinutes;
}

/** When a rung is due, counted from the moment the family was found missing. */
export function rungDueAt(
	rung: Rung,
	asked: { readonly since: Date; readonly policy: SitePolicy; readonly window: FollowUpWindow | null }
): Date {
	const index = LADDER.findIndex((step) => step.rung === rung);
	return new Date(asked.since.getTime() + index * ladderSpacingMinutes(asked.policy, asked.window) * 60_000);
}

/** The rungs whose time has come. */
export function rungsDue(asked: {
	readonly since: Date;
	readonly now: Date;
	readonly policy: SitePolicy;
	readonly window: FollowUpWindow | null;
}): Rung[] {
	return LADDER.map((step) => step.rung).filter((rung) => rungDueAt(rung, asked) <= asked.now);
}

/**
 * True when the whole ladder was climbed: a message was sent, two calls were tried without reaching anybody, and
 * every rung has come due. Only then may a pediatrician close with "not reached".
 */
export function isLadderDone(asked: {
	readonly since: Date;
	readonly now: Date;
	readonly policy: SitePolicy;
	readonly window: FollowUpWindow | null;
	readonly attempts: readonly LadderAttempt[];
	readonly hasMessageSent: boolean;
}): boolean {
	const since = asked.attempts.filter((attempt) => attempt.at >= asked.since);
	const calls = since.filter((attempt) => attempt.channel === 'call');
	const isReached = since.some((attempt) => attempt.outcome === 'reached');
	return (
		asked.hasMessageSent && calls.length >= 2 && !isReached && rungDueAt('welfare-check', asked) <= asked.now
	);
}
