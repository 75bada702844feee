import { describe, expect, it } from 'vitest';
import { missingForDischarge, type DischargeStanding } from './discharge-missing';

const carer = { phone: '+15125550143', email: null, consentsToSms: true, consentsToMail: false };
const ready: DischargeStanding = {
	disposition: 'follow-up',
	hasValue: true,
	hasBirthWeight: true,
	carers: [carer],
	hasVisit: true,
	handedOver: false
};

describe('what a discharge lacks', () => {
	it('is only the hand-over when everything is there, and nothing after it', () => {
		expect(missingForDischarge(ready)).toEqual(['hand-over']);
		expect(missingForDischarge({ ...ready, handedOver: true, carers: [] })).toEqual([]);
	});

	it.each([
		['measure-first', false, 'value'],
		['measure-first', true, 'serum-value'],
		['confirm-serum', true, 'serum-value'],
		['delay-discharge', true, 'decision'],
		['exchange', true, 'decision']
	] as const)('with %s and a value: %s lacks %s first', (disposition, hasValue, first) => {
		expect(missingForDischarge({ ...ready, disposition, hasValue })[0]).toBe(first);
	});

	it('asks for a person, then for a way to reach them, then for their consent', () => {
		expect(missingForDischarge({ ...ready, carers: [] })).toContain('carer');
		expect(missingForDischarge({ ...ready, carers: [{ ...carer, phone: null }] })).toContain(
			'reachable-carer'
		);
		expect(missingForDischarge({ ...ready, carers: [{ ...carer, consentsToSms: false }] })).toContain(
			'consent'
		);
	});
});
