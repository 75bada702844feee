import { describe, expect, it } from 'vitest';
import { dischargeSchema } from './discharge';
import { addMeasurementRow, blankForm, fillForm } from './discharge-fill';
import { liveResult } from './discharge-live';
import { readDischarge } from './discharge-read';
import { parseGrams, parseNumber } from './discharge-values';
import type { DischargeForm } from './discharge-fields';

const ZONE = 'America/Chicago';

function typed(changes: Partial<DischargeForm> = {}): DischargeForm {
	return {
		...blankForm(ZONE),
		recordNumber: 'R-1',
		familyName: 'Okafor',
		givenName: 'Ada',
		bornOn: '2026-03-02',
		bornTime: '08:00',
		gestationWeeks: '40',
		gestationDays: '1',
		birthWeightGrams: '3,240',
		measurementMethod: ['serum', 'transcutaneous'],
		measurementOn: ['2026-03-04', ''],
		measurementTime: ['08:00', ''],
		measurementTotal: ['13,5', ''],
		measurementDirect: ['0.4', ''],
		feeding: 'breast',
		weightOn: ['2026-03-04'],
		weightTime: ['07:00'],
		weightGrams: ['3040'],
		carer1Name: 'Ngozi Okafor',
		carer1Phone: '512 555 0143',
		carer1Language: 'es',
		carer1Sms: true,
		dischargeOn: '2026-03-04',
		dischargeTime: '12:00',
		clinicId: 'clinic-1',
		...changes
	};
}

const now = new Date('2026-03-04T16:00:00Z');
const live = (changes: Partial<DischargeForm> = {}) =>
	liveResult(typed(changes), { standard: 'aap-2022', now });

describe('reading the form', () => {
	it('makes facts of what was typed, times in the zone of the unit', () => {
		const { facts, issues } = readDischarge(typed());
		expect(issues).toEqual([]);
		expect(facts).toMatchObject({
			bornAt: new Date('2026-03-02T14:00:00Z'),
			gestationalAge: { weeks: 40, days: 1 },
			birthWeightGrams: 3240,
			measurements: [{ method: 'serum', total: 13.5, direct: 0.4, unit: 'mg/dL' }],
			weights: [{ grams: 3040 }],
			carers: [{ name: 'Ngozi Okafor', phone: '+15125550143', language: 'es', relation: 'parent' }]
		});
	});

	it('gives every sentence to its own field and row', () => {
		const { facts, issues } = readDischarge(
			typed({
				familyName: ' ',
				bornTime: '',
				measurementTotal: ['13.5', 'ten'],
				carer1Phone: '12',
				carer1Mail: true,
				clinicId: ''
			})
		);
		expect(facts).toBeNull();
		expect(issues.map(({ path }) => path.join(' ')).sort()).toEqual([
			'bornTime',
			'carer1Email',
			'carer1Phone',
			'clinicId',
			'familyName',
			'measurementOn 1',
			'measurementTotal 1'
		]);
	});

	it('refuses an hour that the change to summer time leaves out', () => {
		const { issues } = readDischarge(typed({ dischargeOn: '2026-03-08', dischargeTime: '02:30' }));
		expect(issues).toHaveLength(1);
		expect(issues[0]).toMatchObject({ path: ['dischargeOn'] });
	});

	it('is what the schema reports', () => {
		const parsed = dischargeSchema.safeParse(typed({ gestationDays: '9' }));
		expect(parsed.error?.issues.map(({ path }) => path)).toEqual([['gestationDays']]);
		expect(dischargeSchema.safeParse(typed()).success).toBe(true);
	});

	it('comes back unchanged when it is filled from its own facts', () => {
		const { facts } = readDischarge(typed());
		if (!facts) throw new Error('the form should be readable');
		expect(readDischarge(fillForm(facts, ZONE)).facts).toEqual(facts);
	});
});

describe('numbers as people type them', () => {
	it.each([
		['9,4', 9.4],
		[' 12 ', 12],
		['1e3', null],
		['-2', null],
		['', null]
	])('reads "%s" as %s', (text, value) => expect(parseNumber(text)).toBe(value));
	it.each([
		['3240', 3240],
		['3,240', 3240],
		['3.240', 3240],
		['3 240', 3240],
		['3.2', null]
	])('reads "%s" grams as %s', (text, value) => expect(parseGrams(text)).toBe(value));
});

describe('the result while typing', () => {
	it('says what it waits for', () => {
		expect(live({ bornOn: '', gestationWeeks: '' })).toEqual({
			state: 'waiting',
			missing: ['date and time of birth', 'gestational age']
		});
	});

	it('holds the typed values against the standard', () => {
		const result = live();
		expect(result).toMatchObject({ state: 'assessed', rows: [0], dischargeAssumed: false, unread: [] });
		expect(result.state === 'assessed' && result.assessment.disposition).toBe('follow-up');
	});

	it('takes now for the discharge until it is planned', () => {
		expect(live({ dischargeOn: '', dischargeTime: '' })).toMatchObject({ dischargeAssumed: true });
	});

	it('leaves out what cannot be read and says so', () => {
		const result = live({ measurementTotal: ['13.5', '??'] });
		expect(result.state === 'assessed' && result.unread.map(({ path }) => path[0])).toEqual([
			'measurementTotal',
			'measurementOn'
		]);
	});

	it('puts a refusal of the standard beside the row it came from', () => {
		const form = typed({
			measurementTotal: ['', '13.5'],
			measurementOn: ['', '2026-03-01'],
			measurementTime: ['', '08:00']
		});
		addMeasurementRow(form);
		expect(liveResult(form, { standard: 'aap-2022', now })).toMatchObject({
			state: 'refused',
			issues: [{ path: ['measurementOn', 1] }]
		});
	});
});
