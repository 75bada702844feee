import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ALERT_KINDS } from './alert';
import {
	QUEUE_GROUPS,
	firstDueAt,
	inQueueOrder,
	queueGroupsOf,
	type QueueAlert,
	type QueueFacts
} from './desk-queue';
import { STAGES } from './states';

const NOW = new Date('2026-03-02T15:00:00.000Z');
const inHours = (hours: number) => new Date(NOW.getTime() + hours * 3_600_000);

const facts = (set: Partial<QueueFacts> = {}): QueueFacts => ({
	followUpId: 'a',
	stage: 'booked',
	isHandedOver: true,
	nextStepDueAt: inHours(4),
	windowUntilAt: inHours(24),
	visitAt: inHours(10),
	alerts: [],
	...set
});

const alert = (set: Partial<QueueAlert> = {}): QueueAlert => ({
	id: 'x',
	kind: 'check-in-call-back',
	role: 'desk',
	climb: 0,
	dueAt: inHours(2),
	detail: '',
	...set
});

describe('the groups of the queue', () => {
	test.each([
		['to book after the hand-over', facts({ stage: 'to-book', visitAt: null }), ['needs-visit']],
		['to book before the hand-over', facts({ stage: 'to-book', isHandedOver: false }), []],
		['booked, visit ahead', facts(), ['not-confirmed']],
		['booked, visit begun', facts({ visitAt: inHours(-1) }), ['did-not-come']],
		['confirmed, visit ahead', facts({ stage: 'confirmed' }), []],
		[
			'confirmed, begun, inside the grace',
			facts({ stage: 'confirmed', visitAt: inHours(-0.2), nextStepDueAt: inHours(0.3) }),
			[]
		],
		[
			'confirmed, begun, grace over',
			facts({ stage: 'confirmed', visitAt: inHours(-1), nextStepDueAt: inHours(-0.5) }),
			['did-not-come']
		],
		['missed', facts({ stage: 'missed', visitAt: null }), ['did-not-come']],
		['later check far away', facts({ stage: 'later-check', nextStepDueAt: inHours(80) }), []],
		['later check tomorrow', facts({ stage: 'later-check', nextStepDueAt: inHours(20) }), ['needs-call']],
		['seen', facts({ stage: 'seen', visitAt: null }), []],
		[
			'answer that asks for a call, beside a confirmed visit',
			facts({ stage: 'confirmed', alerts: [alert()] }),
			['needs-call']
		],
		[
			'alert of the pediatrician only',
			facts({ stage: 'result-waiting', alerts: [alert({ role: 'pediatrician' })] }),
			[]
		],
		[
			'an alert that climbed past the desk is still the desk’s',
			facts({ stage: 'confirmed', alerts: [alert({ role: 'pediatrician', climb: 1 })] }),
			['needs-call']
		],
		[
			'undelivered and not confirmed',
			facts({ alerts: [alert({ kind: 'message-undeliverable' })] }),
			['not-confirmed', 'undelivered']
		]
	])('%s', (_, given, groups) => {
		expect(queueGroupsOf(given, NOW)).toEqual(groups);
	});
});

describe('the order of the queue', () => {
	const order = (rows: QueueFacts[]) => inQueueOrder(rows, NOW).map(({ followUpId }) => followUpId);

	test('goes by the time left in the window, not by the due time', () => {
		const soonDue = facts({
			followUpId: 'soon-due',
			nextStepDueAt: inHours(0.5),
			windowUntilAt: inHours(40)
		});
		const shortWindow = facts({ followUpId: 'short', nextStepDueAt: inHours(1), windowUntilAt: inHours(20) });
		expect(order([soonDue, shortWindow])).toEqual(['short', 'soon-due']);
	});

	test('puts what is overdue first, and emergencies before that', () => {
		const calm = facts({ followUpId: 'calm', windowUntilAt: inHours(1) });
		const late = facts({ followUpId: 'late', nextStepDueAt: inHours(-1), windowUntilAt: inHours(90) });
		const emergency = facts({
			followUpId: 'emergency',
			stage: 'confirmed',
			windowUntilAt: inHours(95),
			alerts: [alert({ kind: 'check-in-emergency', dueAt: inHours(1) })]
		});
		expect(order([calm, late, emergency])).toEqual(['emergency', 'late', 'calm']);
	});

	test('an alert counts by its own due time where somebody else owes the next step', () => {
		const waiting = facts({
			stage: 'result-waiting',
			nextStepDueAt: inHours(-5),
			alerts: [alert({ dueAt: inHours(3) })]
		});
		expect(firstDueAt(waiting)).toEqual(inHours(3));
	});

	const anyFacts = fc.record({
		followUpId: fc.uuid(),
		stage: fc.constantFrom(...STAGES),
		isHandedOver: fc.boolean(),
		nextStepDueAt: fc.integer({ min: -100, max: 100 }).map(inHours),
		windowUntilAt: fc.option(fc.integer({ min: -100, max: 100 }).map(inHours)),
		visitAt: fc.option(fc.integer({ min: -100, max: 100 }).map(inHours)),
		alerts: fc.array(
			fc.record({
				id: fc.uuid(),
				kind: fc.constantFrom(...ALERT_KINDS),
				role: fc.constantFrom('desk' as const, 'pediatrician' as const),
				climb: fc.integer({ min: 0, max: 2 }),
				dueAt: fc.integer({ min: -100, max: 100 }).map(inHours),
				detail: fc.constant('')
			}),
			{ maxLength: 3 }
		)
	});

	test('is the same whatever order the rows came in, and loses none', () => {
		fc.assert(
			fc.property(
				fc.uniqueArray(anyFacts, { selector: (row) => row.followUpId, maxLength: 12 }),
				fc.integer(),
				(rows, seed) => {
					const turned = [...rows].sort(
						(a, b) => ((a.followUpId.charCodeAt(0) * seed) % 7) - ((b.followUpId.charCodeAt(0) * seed) % 7)
					);
					expect(order(turned)).toEqual(order(rows));
					expect(order(rows).sort()).toEqual(rows.map(({ followUpId }) => followUpId).sort());
				}
			)
		);
	});

	test('every newborn whom the desk owes something stands in a group', () => {
		fc.assert(
			fc.property(anyFacts, (row) => {
				const owes =
					row.stage === 'missed' ||
					row.stage === 'booked' ||
					(row.stage === 'to-book' && row.isHandedOver) ||
					row.alerts.some(({ role, climb }) => role === 'desk' || climb > 0);
				const groups = queueGroupsOf(row, NOW);
				if (owes) expect(groups.length).toBeGreaterThan(0);
				expect(QUEUE_GROUPS).toEqual(expect.arrayContaining(groups));
			})
		);
	});
});
