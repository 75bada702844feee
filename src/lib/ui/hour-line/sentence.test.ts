import { describe, expect, it } from 'vitest';
import type { HourLineModel } from './model';
import { hourLineSentence, plainSentence } from './sentence';
import { hourLineTableRows } from './table-rows';
import { ENGLISH, SPANISH } from './words';

const bornAt = new Date('2026-03-02T14:00:00Z');
const hour = (hours: number): Date => new Date(bornAt.getTime() + hours * 3_600_000);
const model: HourLineModel = {
	bornAt,
	timeZone: 'America/Chicago',
	now: hour(46),
	fromHour: 0,
	untilHour: 120,
	unit: 'mg/dL',
	measurements: [{ at: hour(40), method: 'serum', total: 9.1, difference: 4.2 }],
	window: { from: hour(64), until: hour(88), test: 'serum-or-transcutaneous', met: false },
	visits: [
		{ at: hour(60), kind: 'check', state: 'moved' },
		{ at: hour(68), kind: 'check', state: 'booked', siteName: 'Quarry Road Clinic' }
	],
	checkIns: [{ at: hour(44), result: 'call-back' }],
	messages: [{ at: hour(45), direction: 'to-family', channel: 'sms', failed: true }]
};

describe('the sentence', () => {
	it('says age, value, window, visit and check-in', () => {
		expect(hourLineSentence(model)).toBe(
			'Age 46 h. TSB 9.1 mg/dL at 40 h, 4.2 mg/dL below the line. ' +
				'Window Thu 5 Mar 00:00 to Fri 6 Mar 00:00, not open yet. ' +
				'Visit Thu 5 Mar 04:00, not confirmed yet. Last check-in call back.'
		);
	});

	it('says that a window has passed, and what is missing', () => {
		const late = { ...model, now: hour(90), visits: [], checkIns: [], measurements: [] };
		expect(hourLineSentence(late)).toBe(
			'Age 90 h. No bilirubin value yet. ' +
				'Window Thu 5 Mar 00:00 to Fri 6 Mar 00:00 has passed without a visit, 2 h late. No visit booked.'
		);
	});

	it('gives a family the visit and no value, in their language', () => {
		const english = plainSentence(model, ENGLISH);
		expect(english).toContain('Thursday, March 5, 2026');
		expect(english).toContain('Quarry Road Clinic');
		expect(plainSentence(model, SPANISH)).toMatch(/^Cita: jueves, 5 de marzo de 2026/);
		expect(`${english}${plainSentence(model, SPANISH)}`).not.toMatch(/9\.1|mg/);
	});
});

describe('the table', () => {
	it('holds everything in the order of time', () => {
		const rows = hourLineTableRows(model, ENGLISH, false);
		expect(rows.map(({ hour: at, what }) => `${at} ${what}`)).toEqual([
			'0 Born',
			'40 TSB 9.1 mg/dL at 40 h, 4.2 mg/dL below the line',
			'44 Check-in: call back',
			'45 SMS to the family, failed',
			'60 Visit, check: moved',
			'64 Window: TSB or TcB',
			'68 Visit, check: not confirmed yet'
		]);
	});

	it('keeps values, windows and messages from the family view', () => {
		const words = hourLineTableRows(model, ENGLISH, true).map(({ what }) => what);
		expect(words).toEqual([
			'Born',
			'Check-in: call back',
			'Visit, check: moved',
			'Visit, check: not confirmed yet'
		]);
	});
});
