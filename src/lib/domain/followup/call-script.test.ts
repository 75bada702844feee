import { expect, test } from 'vitest';
import { callAims, ladderRows } from './call-script';
import { DEFAULT_POLICY } from './policy';

const NOW = new Date('2026-03-02T15:00:00.000Z');
const inHours = (hours: number) => new Date(NOW.getTime() + hours * 3_600_000);

test('a call is about the most pressing thing first, and about each once', () => {
	const aims = callAims({
		stage: 'booked',
		visitAt: inHours(5),
		alertKinds: ['other-time-asked', 'check-in-today', 'check-in-today'],
		now: NOW
	});
	expect(aims).toEqual(['seen-today', 'other-time', 'get-confirmation']);
});

test.each([
	['to-book', null, ['make-visit']],
	['booked', inHours(-1), ['not-marked']],
	['confirmed', inHours(5), []],
	['missed', null, ['did-not-come']],
	['later-check', null, ['later-check']],
	['seen', null, []]
] as const)('at %s the stage itself asks for %s', (stage, visitAt, aims) => {
	expect(callAims({ stage, visitAt, alertKinds: [], now: NOW })).toEqual(aims);
});

test('the ladder counts only calls made since the family was missing', () => {
	const call = { channel: 'call', outcome: 'no-answer' } as const;
	const rows = ladderRows({
		since: inHours(-2),
		now: NOW,
		policy: DEFAULT_POLICY,
		window: null,
		attempts: [
			{ ...call, at: inHours(-3) },
			{ ...call, at: inHours(-1) }
		]
	});
	const of = (rung: string) => rows.find((row) => row.rung === rung);
	expect(of('first-call')).toMatchObject({ by: 'desk', isDue: true, isTried: true });
	expect(of('second-call')).toMatchObject({ isDue: false, isTried: false });
	expect(of('message-first-carer')).toMatchObject({ by: 'worker', isDue: true, isTried: false });
});
