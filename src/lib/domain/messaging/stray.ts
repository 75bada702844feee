import { PRIORITY } from './plan-facts';
import type { Meaning, Understood } from './words';

/** How a stray text was settled: put into a newborn's thread, or none of the organisation's families. */
export const STRAY_SETTLED_AS = ['assigned', 'not-ours'] as const;
export type StraySettledAs = (typeof STRAY_SETTLED_AS)[number];

export type StrayAnswerKind = 'emergency-advice' | 'help-answer';

export interface StrayAsks {
	/** A person has to find out whose words these are. */
	readonly isOwed: boolean;
	readonly answer: StrayAnswerKind | null;
}

/** Nothing goes to an unknown number that could be stopped, and thanks ask for nothing. */
const OWED_BY_NOBODY: readonly Meaning[] = ['stop', 'thanks'];

/**
 * What a text from a number of no family asks of us. A lone "help" gets the help answer and is still owed: it may be a cry.
 * Example: `strayAsks(understand('she will not wake up'))` is owed, and answered with the emergency advice.
 */
export function strayAsks({ means, isAlarming }: Pick<Understood, 'means' | 'isAlarming'>): StrayAsks {
	if (isAlarming) return { isOwed: true, answer: 'emergency-advice' };
	return { isOwed: !OWED_BY_NOBODY.includes(means), answer: means === 'help' ? 'help-answer' : null };
}

/** Alarming texts stand before the others; the numbers are those of the outbox. */
export const strayPriority = (isAlarming: boolean): number =>
	isAlarming ? PRIORITY.urgent : PRIORITY.ordinary;

/**
 * A number gets each automatic answer once in this time (common practice, no source): an answering machine that speaks of
 * emergencies would otherwise write back to our advice for ever.
 */
export const ANSWER_AGAIN_MINUTES = 10;

/** Nobody stands above the desk for a text without a site, so the watch speaks up this long after the due time. */
export const STRAY_GRACE_MINUTES = { alarming: 10, ordinary: 30 } as const;

const MINUTE = 60_000;

/** True where a stray text is so long past its due time that the watch has to say so. */
export function isStrayBeyond(
	{ dueAt, isAlarming }: { readonly dueAt: Date; readonly isAlarming: boolean },
	now: Date
): boolean {
	const grace = isAlarming ? STRAY_GRACE_MINUTES.alarming : STRAY_GRACE_MINUTES.ordinary;
	return now.getTime() - dueAt.getTime() >= grace * MINUTE;
}
