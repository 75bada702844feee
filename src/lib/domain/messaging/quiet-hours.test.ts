import fc from 'fast-check';
import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import { isQuiet, lastAllowedBefore, nextAllowed, type QuietHours } from './quiet-hours';

const chicago: QuietHours = {
	timeZone: 'America/Chicago',
	quietFrom: '21:00',
	quietUntil: '08:00',
	quietDays: []
};
const local = (iso: string, zone = 'America/Chicago'): Date => DateTime.fromISO(iso, { zone }).toJSDate();
const shown = (at: Date, zone = 'America/Chicago'): string =>
	DateTime.fromJSDate(at, { zone }).toFormat('yyyy-MM-dd HH:mm');

describe('quiet hours', () => {
	it.each([
		['2026-03-03T20:59', false],
		['2026-03-03T21:00', true],
		['2026-03-04T07:59', true],
		['2026-03-04T08:00', false]
	])('%s is quiet: %s', (iso, quiet) => expect(isQuiet(local(iso), chicago)).toBe(quiet));

	it('waits for the morning, and over a quiet day', () => {
		expect(shown(nextAllowed(local('2026-03-03T22:15'), chicago))).toBe('2026-03-04 08:00');
		const noSunday = { ...chicago, quietDays: [7] };
		expect(shown(nextAllowed(local('2026-03-07T22:15'), noSunday))).toBe('2026-03-09 08:00');
		expect(shown(lastAllowedBefore(local('2026-03-08T10:00'), noSunday))).toBe('2026-03-07 20:30');
		expect(shown(lastAllowedBefore(local('2026-03-04T07:00'), chicago))).toBe('2026-03-03 20:30');
	});

	it('knows hours that do not cross midnight, none at all, and a week of quiet days', () => {
		const noon = { ...chicago, quietFrom: '12:00', quietUntil: '13:00' };
		expect(shown(nextAllowed(local('2026-03-03T12:30'), noon))).toBe('2026-03-03 13:00');
		const never = { ...chicago, quietUntil: '21:00' };
		expect(isQuiet(local('2026-03-03T23:00'), never)).toBe(false);
		const always = { ...chicago, quietDays: [1, 2, 3, 4, 5, 6, 7] };
		expect(shown(nextAllowed(local('2026-03-03T10:00'), always))).toBe('2026-03-03 10:00');
	});

	it('keeps the wall clock on the nights when the clocks change', () => {
		// Summer time begins on 8 March 2026 at 02:00 and ends on 1 November 2026 at 02:00.
		expect(shown(nextAllowed(local('2026-03-07T23:00'), chicago))).toBe('2026-03-08 08:00');
		expect(shown(nextAllowed(local('2026-10-31T23:00'), chicago))).toBe('2026-11-01 08:00');
		// 02:30 does not exist on 8 March: the first instant after it is allowed.
		const early = { ...chicago, quietUntil: '02:30' };
		expect(shown(nextAllowed(local('2026-03-07T23:00'), early))).toBe('2026-03-08 03:30');
	});

	it('never answers a quiet instant, never goes back, and goes back where asked to', () => {
		const zones = fc.constantFrom(
			'America/Chicago',
			'Europe/Madrid',
			'Asia/Ho_Chi_Minh',
			'Australia/Lord_Howe'
		);
		const time = fc.integer({ min: 0, max: 47 }).map((half) => {
			return `${String(Math.floor(half / 2)).padStart(2, '0')}:${half % 2 ? '30' : '00'}`;
		});
		const minutes = fc.integer({ min: 0, max: 525_600 });
		const days = fc.uniqueArray(fc.integer({ min: 1, max: 7 }), { maxLength: 3 });
		fc.assert(
			fc.property(zones, time, time, minutes, days, (timeZone, quietFrom, quietUntil, minute, quietDays) => {
				const quiet = { timeZone, quietFrom, quietUntil, quietDays };
				const at = new Date(Date.UTC(2026, 0, 1) + minute * 60_000);
				const next = nextAllowed(at, quiet);
				expect(isQuiet(next, quiet)).toBe(false);
				expect(next.getTime()).toBeGreaterThanOrEqual(at.getTime());
				expect(next.getTime() - at.getTime()).toBeLessThan(5 * 86_400_000);
				expect(lastAllowedBefore(at, quiet).getTime()).toBeLessThanOrEqual(at.getTime());
			}),
			{ numRuns: 400 }
		);
	});
});
