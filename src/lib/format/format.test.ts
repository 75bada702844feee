import { describe, expect, it } from 'vitest';
import { dueState, formatAge, formatDuration, formatTimeLeft } from './duration';
import { formatPhone } from './phone';
import { formatDayTime, formatSpan, fromFieldValues, toFieldValues } from './time';
import { formatBilirubin, formatDifference, formatGestation, formatWeightChange } from './values';

const chicago = { timeZone: 'America/Chicago' };
const at = (iso: string): Date => new Date(iso);

describe('times', () => {
	it('writes staff times on the 24-hour clock in the site zone', () => {
		expect(formatDayTime(at('2026-03-03T20:20:00Z'), chicago)).toBe('Tue 3 Mar 14:20');
	});

	it('names the day once when a span stays inside it', () => {
		expect(formatSpan(at('2026-03-03T14:00:00Z'), at('2026-03-03T22:00:00Z'), chicago)).toBe(
			'Tue 3 Mar 08:00 to 16:00'
		);
		expect(formatSpan(at('2026-03-03T14:00:00Z'), at('2026-03-05T14:00:00Z'), chicago)).toBe(
			'Tue 3 Mar 08:00 to Thu 5 Mar 08:00'
		);
	});

	it('reads a field back to the instant that filled it', () => {
		const instant = at('2026-07-09T03:05:00Z');
		const { date, time } = toFieldValues(instant, chicago.timeZone);
		expect({ date, time }).toEqual({ date: '2026-07-08', time: '22:05' });
		expect(fromFieldValues(date, time, chicago.timeZone)).toEqual({
			ok: true,
			at: instant,
			ambiguous: false
		});
	});

	it('refuses the hour that spring leaves out and marks the hour that autumn repeats', () => {
		expect(fromFieldValues('2026-03-08', '02:30', chicago.timeZone)).toEqual({
			ok: false,
			reason: 'does-not-exist'
		});
		expect(fromFieldValues('2026-11-01', '01:30', chicago.timeZone)).toEqual({
			ok: true,
			at: at('2026-11-01T06:30:00Z'),
			ambiguous: true
		});
	});

	it.each(['', '2026-3-3', '2026-02-30'])('refuses the date "%s"', (date) => {
		expect(fromFieldValues(date, '10:00', chicago.timeZone)).toEqual({ ok: false, reason: 'malformed' });
	});
});

describe('lengths of time', () => {
	it.each([
		[0, '0 min'],
		[45, '45 min'],
		[200, '3 h 20 min'],
		[180, '3 h'],
		[12 * 60 + 59, '12 h'],
		[47 * 60, '47 h'],
		[76 * 60, '3 d 4 h'],
		[72 * 60, '3 d']
	])('%i minutes is %s', (minutes, words) => {
		expect(formatDuration(minutes * 60_000)).toBe(words);
	});

	it('says left before the time and late after it', () => {
		const now = at('2026-03-03T12:00:00Z');
		expect(formatTimeLeft(at('2026-03-03T12:30:00Z'), now)).toBe('30 min left');
		expect(formatTimeLeft(at('2026-03-03T11:15:00Z'), now)).toBe('45 min late');
		expect(dueState(at('2026-03-03T14:00:00Z'), now)).toBe('soon');
		expect(dueState(at('2026-03-03T14:01:00Z'), now)).toBe('later');
		expect(dueState(at('2026-03-03T11:59:00Z'), now)).toBe('late');
	});

	it('never makes a newborn older', () => {
		const born = at('2026-03-01T00:00:00Z');
		expect(formatAge(born, at('2026-03-02T23:59:59Z'))).toBe('47 h');
		expect(formatAge(born, at('2026-03-08T00:00:00Z'))).toBe('7 days');
		expect(formatAge(born, at('2026-04-05T00:00:00Z'))).toBe('5 weeks');
	});
});

describe('values', () => {
	it('keeps the decimals that each unit has', () => {
		expect(formatBilirubin({ value: 9.06, unit: 'mg/dL' })).toBe('9.1 mg/dL');
		expect(formatBilirubin({ value: 155.6, unit: 'umol/L' })).toBe('156 µmol/L');
	});

	it('says on which side of the line a value lies', () => {
		expect(formatDifference(4.2, 'mg/dL')).toBe('4.2 mg/dL below the line');
		expect(formatDifference(-0.6, 'mg/dL')).toBe('0.6 mg/dL over the line');
		expect(formatDifference(0, 'mg/dL')).toBe('at the line');
		expect(formatDifference(-0.4, 'umol/L')).toBe('0.4 µmol/L over the line');
		expect(formatDifference(30.4, 'umol/L')).toBe('30 µmol/L below the line');
	});

	it('writes gestation, weight change and telephone numbers', () => {
		expect(formatGestation({ weeks: 38, days: 1 })).toBe('38 weeks 1 day');
		expect(formatWeightChange(3040, 3240)).toBe('−6.2 %');
		expect(formatPhone('+15125550143')).toBe('(512) 555-0143');
		expect(formatPhone('not a number')).toBe('not a number');
	});
});
