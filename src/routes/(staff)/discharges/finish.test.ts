import { describe, expect, it } from 'vitest';
import { blankForm } from '$lib/schemas/discharge-fill';
import { liveResult } from '$lib/schemas/discharge-live';
import type { DischargeForm } from '$lib/schemas/discharge';
import { finishIssues, finishLabel, finishSteps } from './finish';
import { LEFT_TO_DESK, placeValue, readPlace } from './place';

const now = new Date('2026-03-04T16:00:00Z');
const clinic = { name: 'Mill Street Clinic', timeZone: 'America/Chicago' };

function typed(changes: Partial<DischargeForm> = {}): DischargeForm {
	return {
		...blankForm('America/Chicago'),
		bornOn: '2026-03-02',
		bornTime: '08:00',
		gestationWeeks: '40',
		measurementMethod: ['serum'],
		measurementOn: ['2026-03-04'],
		measurementTime: ['08:00'],
		measurementTotal: ['13.5'],
		measurementDirect: [''],
		feeding: 'breast',
		carer1Name: 'Ngozi Okafor',
		carer1Phone: '512 555 0143',
		carer1Sms: true,
		...changes
	};
}

const settingOf = (form: DischargeForm) => ({
	live: liveResult(form, { standard: 'aap-2022', now }),
	clinic,
	hasVisit: false
});
const fields = (form: DischargeForm) => finishIssues(form, settingOf(form)).map(({ path }) => path[0]);
// 48 h old at the value and 3.5 below the line: the window runs from 24 to 48 h after it.
const inside = placeValue(new Date('2026-03-05T16:00:00Z'), 'check');

describe('finishing a discharge', () => {
	it('asks for a place, or for the desk, and takes either', () => {
		expect(fields(typed())).toEqual(['place']);
		expect(fields(typed({ place: inside }))).toEqual([]);
		expect(fields(typed({ place: LEFT_TO_DESK }))).toEqual([]);
	});

	it('refuses a place that the window has left behind', () => {
		expect(fields(typed({ place: placeValue(new Date('2026-03-09T16:00:00Z'), 'check') }))).toEqual([
			'place'
		]);
	});

	it('asks for a way to reach the family', () => {
		expect(fields(typed({ place: inside, carer1Phone: '' }))).toEqual(['carer1Phone']);
	});

	it('wants a reason where the standard asks for something first', () => {
		const unmeasured = { measurementTotal: [''] };
		expect(fields(typed(unmeasured))).toEqual(['againstAdviceWhy']);
		expect(fields(typed({ ...unmeasured, againstAdviceWhy: 'The family leaves.' }))).toEqual([]);
	});

	it('says what the button will do', () => {
		expect(finishLabel(typed(), settingOf(typed()))).toBe('Finish the discharge');
		expect(finishSteps(typed(), settingOf(typed()))[0]).toMatch(/^The visit: choose a place/);
		const form = typed({ place: inside });
		expect(finishLabel(form, settingOf(form))).toBe('Book, message the family and hand over');
		expect(finishSteps(form, settingOf(form))[0]).toBe(
			'Books Thu 5 Mar 10:00 at Mill Street Clinic: check (weight and bilirubin).'
		);
		const silent = typed({ place: LEFT_TO_DESK, carer1Sms: false });
		expect(finishLabel(silent, settingOf(silent))).toBe('Hand over, the desk makes the visit');
		expect(finishSteps(silent, settingOf(silent))[1]).toMatch(/^Messages nobody/);
	});
});

describe('a place on the form', () => {
	it('comes back as it went in, and nothing else is one', () => {
		expect(readPlace(inside)).toEqual({ startsAt: new Date('2026-03-05T16:00:00Z'), kind: 'check' });
		for (const text of ['', 'desk', 'soon check', '2026-03-05T16:00:00.000Z party'])
			expect(readPlace(text)).toBeNull();
	});
});
