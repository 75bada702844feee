import { describe, expect, it } from 'vitest';
import { afterCalls, grantCalls, isUnbroken, OPENS_AFTER, type SenderState } from './breaker';

const now = new Date('2026-03-02T10:00:00Z');
const later = (seconds: number) => new Date(now.getTime() + seconds * 1000);
const fresh: SenderState = { pausedUntil: null, failuresInARow: 0, rateFreeAt: null };
const open: SenderState = { pausedUntil: later(10), failuresInARow: OPENS_AFTER, rateFreeAt: null };
const unlimited = { perSecond: null, probeSeconds: 20 };
const draw = { now, fraction: 1, openSeconds: 16 };

describe('the rate of a sender', () => {
	it('grants all without a limit', () => {
		expect(grantCalls(fresh, 64, now, unlimited).granted).toBe(64);
	});

	it('grants one second of calls at once and then no more than the rate, whoever asks', () => {
		const limits = { perSecond: 10, probeSeconds: 20 };
		let sender = fresh;
		let total = 0;
		for (let tenths = 0; tenths <= 50; tenths++) {
			const { granted, next } = grantCalls(sender, 7, later(tenths / 10), limits);
			total += granted;
			sender = next;
		}
		expect(total).toBeLessThanOrEqual(10 + 50);
		expect(total).toBeGreaterThanOrEqual(50);
	});

	it('serves a rate below one a second', () => {
		const limits = { perSecond: 0.5, probeSeconds: 20 };
		const first = grantCalls(fresh, 5, now, limits);
		expect(first.granted).toBe(1);
		expect(grantCalls(first.next, 5, later(1), limits).granted).toBe(0);
		expect(grantCalls(first.next, 5, later(2), limits).granted).toBe(1);
	});
});

describe('the breaker of a sender', () => {
	it('opens after enough failures in a row and not before', () => {
		const one = afterCalls(fresh, { successes: 0, failures: OPENS_AFTER - 1 }, draw);
		expect(isUnbroken(one)).toBe(true);
		const two = afterCalls(one, { successes: 0, failures: 1 }, draw);
		expect(isUnbroken(two)).toBe(false);
		expect(two.pausedUntil).toEqual(later(16));
	});

	it('grants nothing while open, then one call to try the provider', () => {
		expect(grantCalls(open, 64, later(9), unlimited).granted).toBe(0);
		const probe = grantCalls(open, 64, later(11), unlimited);
		expect(probe.granted).toBe(1);
		expect(grantCalls(probe.next, 64, later(12), unlimited).granted).toBe(0);
		expect(grantCalls(probe.next, 64, later(32), unlimited).granted).toBe(1);
	});

	it('closes at the first success', () => {
		expect(afterCalls(open, { successes: 1, failures: 3 }, draw)).toEqual(fresh);
	});

	it('keeps the pause that the provider asked for, also when other calls succeed', () => {
		const asked = afterCalls(fresh, { successes: 4, failures: 0, pauseSeconds: 30 }, draw);
		expect(asked.pausedUntil).toEqual(later(30));
		expect(afterCalls(asked, { successes: 9, failures: 0 }, draw).pausedUntil).toEqual(later(30));
		expect(grantCalls(asked, 5, later(31), unlimited).granted).toBe(5);
	});
});
