import { expect, test } from 'vitest';
import type { CalendarTime } from '../../../schemas/desk-calendar';
import { calendarLines } from './calendar-lines';

const START = Date.parse('2026-03-02T14:00:00.000Z');
const at = (minutes: number) => new Date(START + minutes * 60_000);
const taken = {
	visitId: 'v',
	followUpId: 'f',
	familyName: 'A',
	givenName: 'B',
	state: 'booked',
	isOutsideWindow: false
} as const;

const time = (minutes: number, set: Partial<CalendarTime> = {}): CalendarTime => ({
	startsAt: at(minutes),
	endsAt: at(minutes + 20),
	kind: 'check',
	free: 2,
	taken: [],
	isPast: false,
	isInsideWindow: null,
	...set
});

test('neighbouring free times are one line, a visit keeps its own, and past emptiness is left out', () => {
	const lines = calendarLines(
		[time(0, { isPast: true }), time(20), time(40), time(60, { taken: [taken], free: 1 }), time(80)],
		() => false
	);
	expect(lines).toEqual([
		{ kind: 'run', from: at(20), until: at(60), free: 4 },
		{ kind: 'time', time: expect.objectContaining({ startsAt: at(60) }) },
		{ kind: 'run', from: at(80), until: at(100), free: 2 }
	]);
});

test('a gap between two openings is not bridged', () => {
	expect(calendarLines([time(0), time(60)], () => false)).toHaveLength(2);
});

test('times that can be chosen stay apart', () => {
	const lines = calendarLines([time(0), time(20), time(40)], ({ startsAt }) => startsAt <= at(20));
	expect(lines.map(({ kind }) => kind)).toEqual(['time', 'time', 'run']);
});
