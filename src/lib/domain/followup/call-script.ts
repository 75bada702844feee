import { ALERT_URGENCY, type AlertKind } from './alert';
import type { LadderAttempt, Rung } from './ladder';
import { LADDER, rungDueAt } from './ladder';
import type { SitePolicy } from './policy';
import type { FollowUpWindow } from '../guideline/types';
import type { Stage } from './states';

/** What a call has to bring about, the most pressing first; the words are in the page's own list. */
export const CALL_AIMS = [
	'emergency-answer',
	'seen-today',
	'did-not-come',
	'not-marked',
	'answer-call-back',
	'family-wrote',
	'other-time',
	'make-visit',
	'get-confirmation',
	'check-number',
	'later-check'
] as const;
export type CallAim = (typeof CALL_AIMS)[number];

const AIM_OF_ALERT: Readonly<Partial<Record<AlertKind, CallAim>>> = {
	'check-in-emergency': 'emergency-answer',
	'alarming-words': 'emergency-answer',
	'check-in-today': 'seen-today',
	'check-in-call-back': 'answer-call-back',
	'words-from-family': 'family-wrote',
	'other-time-asked': 'other-time',
	'message-undeliverable': 'check-number',
	'contact-stopped': 'check-number',
	'prolonged-jaundice-check': 'later-check'
};

function aimsOfStage(stage: Stage, visitAt: Date | null, now: Date): CallAim[] {
	if ((stage === 'booked' || stage === 'confirmed') && visitAt && visitAt < now) return ['not-marked'];
	if (stage === 'missed') return ['did-not-come'];
	if (stage === 'to-book') return ['make-visit'];
	if (stage === 'booked') return ['get-confirmation'];
	return stage === 'later-check' ? ['later-check'] : [];
}

/** What to speak about in one call, from the stage and the open alerts, each once and the most pressing first. */
export function callAims(asked: {
	readonly stage: Stage;
	readonly visitAt: Date | null;
	readonly alertKinds: readonly AlertKind[];
	readonly now: Date;
}): CallAim[] {
	const byUrgency = [...asked.alertKinds].sort((a, b) => ALERT_URGENCY[a] - ALERT_URGENCY[b]);
	const aims = new Set([
		...byUrgency.flatMap((kind) => AIM_OF_ALERT[kind] ?? []),
		...aimsOfStage(asked.stage, asked.visitAt, asked.now)
	]);
	return CALL_AIMS.filter((aim) => aims.has(aim));
}

export interface LadderRow {
	readonly rung: Rung;
	readonly by: 'worker' | 'desk' | 'pediatrician';
	readonly says: string;
	readonly dueAt: Date;
	readonly isDue: boolean;
	/** A call that counts for this rung was tried. */
	readonly isTried: boolean;
}

/** The ladder as the desk sees it: each rung, when it is due, and which calls were tried since the family was missing. */
export function ladderRows(asked: {
	readonly since: Date;
	readonly now: Date;
	readonly policy: SitePolicy;
	readonly window: FollowUpWindow | null;
	readonly attempts: readonly LadderAttempt[];
}): LadderRow[] {
	const calls = asked.attempts.filter(({ at, channel }) => at >= asked.since && channel === 'call').length;
	const needed: Partial<Record<Rung, number>> = { 'first-call': 1, 'second-call': 2 };
	return LADDER.map(({ rung, by, says }) => {
		const dueAt = rungDueAt(rung, asked);
		return { rung, by, says, dueAt, isDue: dueAt <= asked.now, isTried: calls >= (needed[rung] ?? Infinity) };
	});
}
