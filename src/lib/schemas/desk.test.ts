import { describe, expect, test } from 'vitest';
import { doneWords, logSchema, placeOfWord, placeWord, queueQuerySchema } from './desk';
import { readDeskJson } from './desk-view';

test('a place goes through a form as one word', () => {
	const startsAt = new Date('2026-03-03T14:20:00.000Z');
	expect(placeOfWord(placeWord(startsAt, 'blood-draw'))).toEqual({ startsAt, kind: 'blood-draw' });
	for (const word of ['', 'tomorrow check', '2026-03-03T14:20:00.000Z', '2026-03-03T14:20:00.000Z lunch']) {
		expect(placeOfWord(word), word).toBeNull();
	}
});

test('a call has no outcome until somebody chooses one', () => {
	expect(logSchema.safeParse({ carerId: 'abc' }).success).toBe(false);
	expect(logSchema.parse({ carerId: 'abc', outcome: 'no-answer' })).toMatchObject({
		channel: 'call',
		outcome: 'no-answer',
		note: ''
	});
});

test('choices in an address that make no sense are no choices', () => {
	expect(queueQuerySchema.parse({ show: 'nonsense', clinic: "' or 1", rows: '-3' })).toEqual({ rows: 100 });
	expect(queueQuerySchema.parse({ show: 'needs-call', rows: '300' })).toEqual({
		show: 'needs-call',
		rows: 300
	});
});

test('only words of our own can be shown as done', () => {
	expect(doneWords('booked')).toContain('booked');
	expect(doneWords('<b>call 900</b>')).toBeNull();
	expect(doneWords('toString')).toBeNull();
});

describe('the desk’s JSON', () => {
	test('gives instants back as dates and leaves words alone', () => {
		const at = new Date('2026-03-02T15:00:00.000Z');
		const view = {
			nowAt: at,
			rows: [
				{
					bornAt: at,
					bornOn: '2026-03-01',
					window: { from: at, until: at },
					hourLine: { now: at, visits: [{ at }] }
				}
			]
		};
		expect(readDeskJson(JSON.stringify(view))).toEqual(view);
	});
});
