import { describe, expect, test } from 'vitest';
import { dayBounds, isInOpening, overlaps } from './openings';
import type { Opening } from './places';

const monday: Opening = {
	weekday: 1,
	from: '08:00',
	until: '12:00',
	visitKind: 'check',
	placeMinutes: 30,
	placesAtOnce: 1
};

describe('openings that would offer a place twice', () => {
	test.each([
		[true, { from: '11:30', until: '13:00' }],
		[true, { from: '09:00', until: '10:00' }],
		[false, { from: '12:00', until: '13:00' }],
		[false, { from: '11:30', until: '13:00', weekday: 2 }],
		[false, { from: '11:30', until: '13:00', visitKind: 'blood-draw' as const }]
	])('%s: %j', (doOverlap, other) => {
		expect(overlaps(monday, { ...monday, ...other })).toBe(doOverlap);
		expect(overlaps({ ...monday, ...other }, monday)).toBe(doOverlap);
	});
});

describe('a visit lies in an opening by the clinic’s own clock', () => {
	const zone = 'America/Chicago';
	test('in winter and in summer time', () => {
		// 08:00 on Monday 2 March 2026 (UTC-6) and on Monday 9 March 2026 (UTC-5).
		expect(isInOpening(monday, new Date('2026-03-02T14:00:00Z'), zone)).toBe(true);
		expect(isInOpening(monday, new Date('2026-03-02T13:59:00Z'), zone)).toBe(false);
		expect(isInOpening(monday, new Date('2026-03-09T13:00:00Z'), zone)).toBe(true);
	});
	test('its end is not part of it', () => {
		expect(isInOpening(monday, new Date('2026-03-02T18:00:00Z'), zone)).toBe(false);
	});
});

test('a day of 23 hours begins and ends at local midnight', () => {
	const { from, until } = dayBounds('2026-03-08', 'America/Chicago');
	expect(from.toISOString()).toBe('2026-03-08T06:00:00.000Z');
	expect(until.toISOString()).toBe('2026-03-09T04:59:59.999Z');
});
