import { describe, expect, it } from 'vitest';
import {
	barsByDay,
	measure,
	medianOf,
	percentOf,
	type MeasuredFollowUp,
	type MeasuredVisit
} from './measures';

const T0 = Date.UTC(2026, 2, 2, 12);
const at = (hours: number) => new Date(T0 + hours * 3_600_000);

const visit = (more: Partial<MeasuredVisit> = {}): MeasuredVisit => ({
	round: 1,
	startsAt: at(30),
	state: 'arrived',
	isOutsideWindow: false,
	isConfirmed: true,
	arrivedAt: at(30),
	...more
});
const followUp = (more: Partial<MeasuredFollowUp> = {}): MeasuredFollowUp => ({
	id: 'a',
	handedOverAt: at(0),
	outcome: null,
	round: 1,
	windowUntilAt: at(48),
	visits: [visit()],
	reachedAt: [],
	firstVisitDifference: null,
	...more
});

describe('seen inside the window', () => {
	it('counts the first visit kept, booked inside the first window', () => {
		expect(measure([followUp()], at(60)).seenInsideWindow).toEqual({ count: 1, of: 1 });
	});
	it('does not count a visit outside the window or one of a later round', () => {
		const outside = followUp({ visits: [visit({ isOutsideWindow: true })] });
		const later = followUp({
			round: 2,
			visits: [visit({ state: 'missed', arrivedAt: null }), visit({ round: 2 })]
		});
		expect(measure([outside, later], at(60)).seenInsideWindow).toEqual({ count: 0, of: 2 });
	});
	it('leaves out whom the window still allows to come, and counts them once it has passed', () => {
		const open = followUp({ visits: [visit({ state: 'booked', arrivedAt: null })] });
		expect(measure([open], at(20))).toMatchObject({
			seenInsideWindow: { count: 0, of: 0 },
			windowStillOpen: 1
		});
		expect(measure([open], at(49))).toMatchObject({
			seenInsideWindow: { count: 0, of: 1 },
			windowStillOpen: 0
		});
	});
	it('counts a follow-up that was closed without being seen as not seen', () => {
		expect(measure([followUp({ visits: [], outcome: 'moved-away' })], at(5)).seenInsideWindow).toEqual({
			count: 0,
			of: 1
		});
	});
	it('leaves out what was entered twice', () => {
		expect(measure([followUp({ outcome: 'entered-twice' })], at(60)).handedOver).toBe(0);
	});
});

describe('visits', () => {
	const missed = visit({ state: 'missed', arrivedAt: null, isConfirmed: false });
	it('counts only visits that fell due', () => {
		const one = followUp({
			visits: [visit({ state: 'cancelled' }), visit({ state: 'moved' }), missed, visit({ startsAt: at(90) })]
		});
		expect(measure([one], at(60))).toMatchObject({
			confirmed: { count: 0, of: 1 },
			missed: { count: 1, of: 1 }
		});
	});
	it('counts a family as reached by a later try or a later visit, not by an earlier one', () => {
		const reached = (more: Partial<MeasuredFollowUp>) =>
			measure([followUp({ visits: [missed], ...more })], at(99)).reachedAfterMissed;
		expect(reached({ reachedAt: [at(29)] })).toEqual({ count: 0, of: 1 });
		expect(reached({ reachedAt: [at(31)] })).toEqual({ count: 1, of: 1 });
		expect(reached({ visits: [missed, visit({ startsAt: at(50), arrivedAt: at(50) })] })).toEqual({
			count: 1,
			of: 1
		});
	});
});

describe('values at the first visit', () => {
	it('counts a value equal to the line as at it', () => {
		const rows = [-0.4, 0, 0.1, null].map((firstVisitDifference) => followUp({ firstVisitDifference }));
		expect(measure(rows, at(60)).atOrOverLine).toEqual({ count: 2, of: 3 });
	});
});

describe('figures', () => {
	it('takes the middle of an odd and of an even number', () => {
		expect([medianOf([]), medianOf([3]), medianOf([1, 2, 9]), medianOf([1, 2, 4, 9])]).toEqual([
			null,
			3,
			2,
			3
		]);
	});
	it('gives no percentage of nothing', () => {
		expect([percentOf({ count: 0, of: 0 }), percentOf({ count: 1, of: 3 })]).toEqual([null, 33]);
	});
	it('puts every hour into one bar', () => {
		const bars = barsByDay([0, 23.9, 24, 150, 900]);
		expect(bars.map(({ count }) => count)).toEqual([2, 1, 0, 0, 0, 0, 2]);
	});
});
