import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DEFAULT_POLICY } from './policy';
import type { FollowUpState } from './state';
import { NEXT_STEP_OF, STAGES } from './states';
import { LEGAL_FROM, openFollowUp, transition, type Decision, type FollowUpEvent } from './transition';

const START = Date.UTC(2026, 2, 2, 9);
const HOUR = 3_600_000;
const policy = { ...DEFAULT_POLICY, dutyStaffIds: ['duty-one', 'duty-two'] };
const at = (hours: number) => new Date(START + hours * HOUR);

const windows = fc
	.tuple(fc.integer({ min: 0, max: 100 }), fc.integer({ min: 1, max: 72 }))
	.map(([from, length]) => ({
		from: at(from),
		until: at(from + length),
		test: 'serum-or-transcutaneous' as const
	}));
const visits = fc
	.tuple(fc.integer({ min: 0, max: 200 }), fc.boolean())
	.map(([hours, isConfirmed]) => ({ id: `visit-${hours}`, startsAt: at(hours), isConfirmed }));
const outcomes = fc.constantFrom('jaundice-settled', 'care-transferred', 'moved-away', 'not-reached', 'died');
const decisions: fc.Arbitrary<Decision> = fc.oneof(
	windows.map((window) => ({ then: 'repeat', window }) as const),
	fc.constant({ then: 'treat' } as const),
	fc
		.integer({ min: 1, max: 400 })
		.map((h) => ({ then: 'check-later', at: at(h), asks: 'still yellow?' }) as const),
	outcomes.map((outcome) => ({ then: 'close', outcome }) as const)
);
const events: fc.Arbitrary<FollowUpEvent> = fc.oneof(
	fc
		.tuple(
			fc.constantFrom(
				'follow-up',
				'judgement',
				'measure-first',
				'confirm-serum',
				'delay-discharge',
				'phototherapy',
				'escalate',
				'exchange'
			),
			fc.option(windows, { nil: null })
		)
		.map(([disposition, window]) => ({ kind: 'assessed', disposition, window }) as const),
	visits.map((visit) => ({ kind: 'booked', visit }) as const),
	visits.map((visit) => ({ kind: 'moved', visit }) as const),
	fc.constantFrom(
		{ kind: 'cancelled' } as const,
		{ kind: 'confirmed' } as const,
		{ kind: 'arrived' } as const,
		{ kind: 'missed' } as const,
		{ kind: 'reopened' } as const,
		{ kind: 'climbed' } as const
	),
	fc.boolean().map((isAgainstAdvice) => ({ kind: 'handed-over', isAgainstAdvice }) as const),
	fc.boolean().map((isUrgent) => ({ kind: 'value-recorded', isUrgent }) as const),
	decisions.map((decision) => ({ kind: 'accepted', decision }) as const),
	fc
		.tuple(decisions, fc.constantFrom('', 'seen in clinic'))
		.map(([decision, reason]) => ({ kind: 'overridden', decision, reason }) as const),
	windows.map((window) => ({ kind: 'treatment-ended', window }) as const),
	fc
		.tuple(outcomes, fc.boolean())
		.map(([outcome, isLadderDone]) => ({ kind: 'closed', outcome, isLadderDone }) as const),
	fc.constant({ kind: 'merged', intoId: 'other' } as const)
);

/** The rule that holds the product together, said of one state. */
function expectSound(state: FollowUpState): void {
	if (state.stage === 'closed') {
		expect(state.nextStep).toBeNull();
		expect(state.outcome).not.toBeNull();
		expect(state.closedAt).not.toBeNull();
		return;
	}
	expect(state.nextStep?.kind).toBe(NEXT_STEP_OF[state.stage]);
	expect(state.nextStep?.role).toBeTruthy();
	expect([state.birthSiteId, state.clinicId]).toContain(state.nextStep?.siteId);
	expect(state.nextStep?.dueAt.getTime()).not.toBeNaN();
	expect(state.outcome).toBeNull();
	expect(state.closedAt).toBeNull();
	if (state.stage === 'booked' || state.stage === 'confirmed') expect(state.visit).not.toBeNull();
}

const opened = () =>
	openFollowUp(
		{ birthSiteId: 'unit', clinicId: 'clinic', plannedDischargeAt: at(4) },
		{ now: at(0), policy }
	);

const walks = fc.array(fc.tuple(events, fc.integer({ min: 0, max: 30 })), { maxLength: 60 });

/** Goes through the events, sound after each; tells the stages it came through. */
function walk(steps: readonly (readonly [FollowUpEvent, number])[]): Set<string> {
	const reached = new Set<string>();
	let state = opened();
	let hours = 0;
	expectSound(state);
	for (const [event, pause] of steps) {
		hours += pause;
		const result = transition(state, event, { now: at(hours), policy });
		if (!LEGAL_FROM[event.kind].includes(state.stage)) expect(result.ok).toBe(false);
		if (!result.ok) continue;
		state = result.value;
		reached.add(state.stage);
		expectSound(state);
	}
	return reached;
}

describe('a follow-up', () => {
	it('has exactly one next step after any sequence of transitions, and refuses what is not legal', () => {
		fc.assert(
			fc.property(walks, (steps) => void walk(steps)),
			{ numRuns: 2_000 }
		);
	});

	it('comes through every stage in those walks', () => {
		// Of one seed, so that luck does not decide whether a rare stage is met.
		const reached = fc
			.sample(walks, { numRuns: 2_000, seed: 20_260_302 })
			.flatMap((steps) => [...walk(steps)]);
		expect([...new Set(reached)].sort()).toEqual([...STAGES].sort());
	});

	it('cannot be handed over while the standard asks for something first, unless against advice', () => {
		const waiting = transition(
			opened(),
			{ kind: 'assessed', disposition: 'confirm-serum', window: null },
			{ now: at(0), policy }
		);
		if (!waiting.ok) throw new Error(waiting.error.message);
		const refused = transition(
			waiting.value,
			{ kind: 'handed-over', isAgainstAdvice: false },
			{ now: at(1), policy }
		);
		expect(refused).toMatchObject({ ok: false, error: { code: 'discharge-not-ready' } });
		const left = transition(
			waiting.value,
			{ kind: 'handed-over', isAgainstAdvice: true },
			{ now: at(1), policy }
		);
		expect(left).toMatchObject({ ok: true, value: { stage: 'to-book', nextStep: { role: 'desk' } } });
	});

	it('climbs to the duty persons in their order and then stays, overdue', () => {
		let state = opened();
		for (const staffId of policy.dutyStaffIds) {
			const climbed = transition(state, { kind: 'climbed' }, { now: at(5), policy });
			if (!climbed.ok) throw new Error(climbed.error.message);
			state = climbed.value;
			expect(state.nextStep?.staffId).toBe(staffId);
		}
		expect(state.nextStep?.climbAt).toBeNull();
		expect(transition(state, { kind: 'climbed' }, { now: at(6), policy })).toMatchObject({ ok: false });
	});
});
