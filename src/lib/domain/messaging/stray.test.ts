import { describe, expect, it } from 'vitest';
import { readBy } from './reading';
import { isStrayBeyond, strayAsks, strayPriority } from './stray';
import { understand } from './words';

describe('a text from a number of no family', () => {
	it.each([
		['my baby will not wake up', true, 'emergency-advice'],
		['Can we come an hour later?', true, null],
		['yes', true, null],
		['3', true, null],
		['START', true, null],
		['HELP', true, 'help-answer'],
		['help, she is limp', true, 'emergency-advice'],
		['STOP', false, null],
		['Thank you', false, null]
	])('"%s": owed %s, answered with %s', (text, isOwed, answer) => {
		expect(strayAsks(understand(text))).toEqual({ isOwed, answer });
	});

	it('is read at once where it alarms, else within two hours, and alarming ones stand first', () => {
		const at = new Date('2026-03-03T10:00:00Z');
		expect(readBy(at, true)).toEqual(at);
		expect(readBy(at, false)).toEqual(new Date('2026-03-03T12:00:00Z'));
		expect(strayPriority(true)).toBeLessThan(strayPriority(false));
	});

	it.each([
		[true, 9, false],
		[true, 10, true],
		[false, 29, false],
		[false, 30, true]
	])('alarming %s, %i minutes after its due time: for the watch %s', (isAlarming, minutes, expected) => {
		const dueAt = new Date('2026-03-03T10:00:00Z');
		const now = new Date(dueAt.getTime() + minutes * 60_000);
		expect(isStrayBeyond({ dueAt, isAlarming }, now)).toBe(expected);
	});
});
