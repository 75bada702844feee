import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { afterFailure, MAX_ATTEMPTS, MAX_CLAIMS, pauseSeconds } from './retry';

const now = new Date('2026-03-02T10:00:00Z');
const expiresAt = new Date('2026-03-03T10:00:00Z');

describe('the pause after a failed call', () => {
	it.each([
		[1, 5, 10],
		[2, 10, 20],
		[3, 20, 40],
		[8, 640, 1280],
		[13, 3600, 7200],
		[40, 3600, 7200]
	])('after %i failures lies between %i and %i seconds', (attempts, least, most) => {
		expect(pauseSeconds({ attempts, fraction: 0 })).toBe(least);
		expect(pauseSeconds({ attempts, fraction: 1 })).toBe(most);
	});

	it('never undercuts what the provider asked for', () => {
		const wish = fc.record({
			attempts: fc.integer({ min: 1, max: 30 }),
			fraction: fc.double({ min: 0, max: 1, noNaN: true }),
			retryAfterSeconds: fc.integer({ min: 0, max: 90_000 })
		});
		fc.assert(fc.property(wish, (facts) => pauseSeconds(facts) >= facts.retryAfterSeconds));
	});
});

describe('a message after a failed call', () => {
	it('is tried again while it is of use', () => {
		expect(afterFailure({ attempts: 1, claims: 1, fraction: 0, now, expiresAt })).toEqual({
			kind: 'again',
			runAt: new Date('2026-03-02T10:00:05Z')
		});
	});

	it('is given up when the next try would come too late', () => {
		const soon = new Date('2026-03-02T10:00:04Z');
		const result = afterFailure({ attempts: 1, claims: 1, fraction: 0, now, expiresAt: soon });
		expect(result).toEqual({ kind: 'give-up', why: 'too-late' });
	});

	it('is given up after the last attempt', () => {
		const result = afterFailure({ attempts: MAX_ATTEMPTS, claims: 1, fraction: 0, now, expiresAt });
		expect(result).toEqual({ kind: 'give-up', why: 'too-many-attempts' });
	});

	it('is given up when every worker that took it died', () => {
		const result = afterFailure({ attempts: 1, claims: MAX_CLAIMS, fraction: 0, now, expiresAt });
		expect(result).toEqual({ kind: 'give-up', why: 'too-many-attempts' });
	});
});
