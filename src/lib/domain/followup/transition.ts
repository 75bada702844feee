import type { Disposition, FollowUpWindow } from '../guideline/types';
import { err, ok, type Result } from '../result';
import { climbOf, nextStepOf, type DueContext } from './due';
import type { FollowUpState, OpenVisit } from './state';
import type { OpenStage, Outcome, Stage, TransitionKind } from './states';

/** What a pediatrician decides about a value or a visit. */
export type Decision =
	| { readonly then: 'repeat'; readonly window: FollowUpWindow }
	| { readonly then: 'treat' }
	| { readonly then: 'check-later'; readonly at: Date; readonly asks: string }
	| { readonly then: 'close'; readonly outcome: Outcome };

export type FollowUpEvent =
	| { readonly kind: 'assessed'; readonly disposition: Disposition; readonly window: FollowUpWindow | null }
	| { readonly kind: 'booked'; readonly visit: OpenVisit }
	| { readonly kind: 'moved'; readonly visit: OpenVisit }
	| { readonly kind: 'cancelled' }
	| { readonly kind: 'confirmed' }
	| { readonly kind: 'handed-over'; readonly isAgainstAdvice: boolean }
	| { readonly kind: 'arrived' }
	| { readonly kind: 'missed' }
	| { readonly kind: 'value-recorded'; readonly isUrgent: boolean }
	| { readonly kind: 'accepted'; readonly decision: Decision }
	| { readonly kind: 'overridden'; readonly decision: Decision; readonly reason: string }
	| { readonly kind: 'treatment-ended'; readonly window: FollowUpWindow }
	| { readonly kind: 'closed'; readonly outcome: Outcome; readonly isLadderDone: boolean }
	| { readonly kind: 'reopened' }
	| { readonly kind: 'merged'; readonly intoId: string }
	| { readonly kind: 'climbed' };

export interface TransitionRefusal {
	readonly code:
		'not-from-here' | 'reason-missing' | 'ladder-not-done' | 'discharge-not-ready' | 'nobody-above';
	readonly message: string;
}

const OPEN: readonly Stage[] = [
	'before-discharge',
	'to-book',
	'booked',
	'confirmed',
	'missed',
	'seen',
	'result-waiting',
	'in-treatment',
	'later-check'
];
const AT_HOME = OPEN.filter((stage) => stage !== 'before-discharge');

/** Stages that owe something more pressing than the visit, which may stand beside it all the same. */
const VISIT_STANDS_BY: readonly Stage[] = ['before-discharge', 'result-waiting'];

/** The stages from which each transition is legal; every other pair is refused. */
export const LEGAL_FROM: Readonly<Record<Exclude<TransitionKind, 'entered'>, readonly Stage[]>> = {
	assessed: ['before-discharge', 'to-book', 'booked', 'confirmed'],
	booked: ['to-book', 'missed', 'later-check'],
	moved: ['booked', 'confirmed', ...VISIT_STANDS_BY],
	cancelled: ['booked', 'confirmed', ...VISIT_STANDS_BY],
	confirmed: ['booked', ...VISIT_STANDS_BY],
	'handed-over': ['before-discharge', 'to-book', 'booked', 'confirmed'],
	arrived: ['booked', 'confirmed', 'missed', 'result-waiting'],
	missed: ['booked', 'confirmed', 'result-waiting'],
	'value-recorded': AT_HOME,
	accepted: AT_HOME,
	overridden: AT_HOME,
	// A value taken under treatment waits for a decision, and the end of treatment may be that decision.
	'treatment-ended': ['in-treatment', 'result-waiting'],
	closed: OPEN,
	reopened: ['closed'],
	merged: OPEN,
	climbed: OPEN
};

const NEEDS_VISIT: readonly TransitionKind[] = ['moved', 'cancelled', 'confirmed', 'arrived', 'missed'];
const WINDOW_DISPOSITIONS: readonly Disposition[] = ['follow-up', 'judgement'];

/** True where the standard lets the newborn go home with a follow-up. */
export const allowsDischarge = (disposition: Disposition | null): boolean =>
	disposition !== null && WINDOW_DISPOSITIONS.includes(disposition);

/** True where the disposition asks for treatment or escalation now. */
export const isUrgentDisposition = (disposition: Disposition): boolean =>
	disposition === 'phototherapy' || disposition === 'escalate' || disposition === 'exchange';

type Changes = Partial<Omit<FollowUpState, 'stage' | 'nextStep'>>;
type VisitEvent = Extract<
	FollowUpEvent,
	{ kind: 'moved' | 'cancelled' | 'confirmed' | 'arrived' | 'missed' }
>;

function enter(state: FollowUpState, stage: OpenStage, changes: Changes, due: DueContext): FollowUpState {
	const next = { ...state, ...changes };
	return { ...next, stage, nextStep: nextStepOf(stage, next, due) };
}

function close(
	state: FollowUpState,
	outcome: Outcome,
	now: Date,
	mergedIntoId: string | null = null
): FollowUpState {
	return { ...state, stage: 'closed', nextStep: null, visit: null, outcome, closedAt: now, mergedIntoId };
}

const stageWithVisit = (visit: OpenVisit | null): OpenStage =>
	visit === null ? 'to-book' : visit.isConfirmed ? 'confirmed' : 'booked';

function visitInside(visit: OpenVisit | null, window: FollowUpWindow): OpenVisit | null {
	return visit && visit.startsAt >= window.from && visit.startsAt <= window.until ? visit : null;
}

function decide(state: FollowUpState, decision: Decision, due: DueContext): FollowUpState {
	switch (decision.then) {
		case 'repeat': {
			const visit = visitInside(state.visit, decision.window);
			const changes = {
				window: decision.window,
				visit,
				round: state.round + 1,
				laterCheckAt: null,
				laterCheckAsks: null
			};
			return enter(state, stageWithVisit(visit), changes, due);
		}
		case 'treat':
			return enter(state, 'in-treatment', { visit: null }, due);
		case 'check-later':
			return enter(
				state,
				'later-check',
				{ visit: null, laterCheckAt: decision.at, laterCheckAsks: decision.asks },
				due
			);
		case 'close':
			return close(state, decision.outcome, due.now);
	}
}

function assessed(
	state: FollowUpState,
	event: Extract<FollowUpEvent, { kind: 'assessed' }>,
	due: DueContext
): FollowUpState {
	const { disposition, window } = event;
	const stage =
		state.handedOverAt || allowsDischarge(disposition) ? stageWithVisit(state.visit) : 'before-discharge';
	return enter(state, stage, { disposition, window }, { ...due, isUrgent: isUrgentDisposition(disposition) });
}

function visitAfter(state: FollowUpState, event: VisitEvent): OpenVisit | null {
	if (event.kind === 'moved') return event.visit;
	return event.kind === 'confirmed' && state.visit ? { ...state.visit, isConfirmed: true } : null;
}

function stageAfter(event: VisitEvent, visit: OpenVisit | null): OpenStage {
	if (event.kind === 'arrived') return 'seen';
	return event.kind === 'missed' ? 'missed' : stageWithVisit(visit);
}

/** What happens to a visit moves the stage, except where something more pressing is owed: there the next step stays. */
function visitChanged(state: FollowUpState, event: VisitEvent, due: DueContext): FollowUpState {
	const visit = visitAfter(state, event);
	if (VISIT_STANDS_BY.includes(state.stage)) return { ...state, visit };
	return enter(state, stageAfter(event, visit), { visit }, due);
}

function climbed(state: FollowUpState, due: DueContext): Result<FollowUpState, TransitionRefusal> {
	const above = state.nextStep && climbOf(state.nextStep, due.policy, due.now);
	if (!state.nextStep || !above) return refuse('nobody-above', 'Nobody is left to climb to.');
	return ok({ ...state, nextStep: { ...state.nextStep, ...above } });
}

function refuse(code: TransitionRefusal['code'], message: string): Result<never, TransitionRefusal> {
	return err({ code, message });
}

/** What forbids an event that its stage would allow; null where nothing does. */
function objection(state: FollowUpState, event: FollowUpEvent): Result<never, TransitionRefusal> | null {
	if (!LEGAL_FROM[event.kind].includes(state.stage)) {
		return refuse('not-from-here', `This cannot be done while the follow-up is at "${state.stage}".`);
	}
	if (VISIT_STANDS_BY.includes(state.stage) && !state.visit && NEEDS_VISIT.includes(event.kind)) {
		return refuse('not-from-here', 'There is no visit to change.');
	}
	if (event.kind === 'overridden' && event.reason.trim() === '') {
		return refuse('reason-missing', 'Say why you decide otherwise.');
	}
	if (event.kind === 'handed-over' && !event.isAgainstAdvice && !allowsDischarge(state.disposition)) {
		return refuse('discharge-not-ready', 'The standard asks for something before discharge.');
	}
	const isNotReached =
		(event.kind === 'closed' && event.outcome === 'not-reached' && !event.isLadderDone) ||
		((event.kind === 'accepted' || event.kind === 'overridden') &&
			event.decision.then === 'close' &&
			event.decision.outcome === 'not-reached');
	if (isNotReached) {
		return refuse(
			'ladder-not-done',
			'The whole ladder of attempts is needed before "not reached" can close it.'
		);
	}
	return null;
}

/**
 * The only way in which a follow-up changes stage. Values in, values out.
 * Returns the state after the event, always with exactly one next step while open, or says why the event is not legal.
 */
export function transition(
	state: FollowUpState,
	event: FollowUpEvent,
	due: DueContext
): Result<FollowUpState, TransitionRefusal> {
	const refused = objection(state, event);
	if (refused) return refused;
	switch (event.kind) {
		case 'assessed':
			return ok(assessed(state, event, due));
		case 'booked':
			return ok(enter(state, stageWithVisit(event.visit), { visit: event.visit }, due));
		case 'moved':
		case 'cancelled':
		case 'confirmed':
		case 'arrived':
		case 'missed':
			return ok(visitChanged(state, event, due));
		case 'handed-over':
			return ok(
				enter(state, stageWithVisit(state.visit), { handedOverAt: state.handedOverAt ?? due.now }, due)
			);
		case 'value-recorded':
			return ok(enter(state, 'result-waiting', {}, { ...due, isUrgent: event.isUrgent }));
		case 'accepted':
		case 'overridden':
			return ok(decide(state, event.decision, due));
		case 'treatment-ended':
			return ok(enter(state, 'to-book', { window: event.window, round: state.round + 1 }, due));
		case 'closed':
			return ok(close(state, event.outcome, due.now));
		case 'merged':
			return ok(close(state, 'entered-twice', due.now, event.intoId));
		case 'reopened':
			return ok(enter(state, 'result-waiting', { outcome: null, closedAt: null, mergedIntoId: null }, due));
		case 'climbed':
			return climbed(state, due);
	}
}

/** A follow-up as it begins: something is owed by the discharging nurse before the newborn goes home. */
export function openFollowUp(
	facts: Pick<FollowUpState, 'birthSiteId' | 'clinicId' | 'plannedDischargeAt'>,
	due: DueContext
): FollowUpState {
	const blank: FollowUpState = {
		...facts,
		stage: 'before-discharge',
		round: 1,
		handedOverAt: null,
		disposition: null,
		window: null,
		visit: null,
		laterCheckAt: null,
		laterCheckAsks: null,
		nextStep: null,
		outcome: null,
		closedAt: null,
		mergedIntoId: null
	};
	return enter(blank, 'before-discharge', {}, due);
}
