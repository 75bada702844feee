import { describe, expect, it } from 'vitest';
import { mayFallBack, nextRoute } from './fallback';
import type { PlanCarer } from './plan-facts';

const mother: PlanCarer = { id: 'mother', callOrder: 1, language: 'es', canSms: true, canMail: true };
const father: PlanCarer = { id: 'father', callOrder: 2, language: 'en', canSms: true, canMail: false };
const bySms = (carerId: string) => ({ carerId, channel: 'sms' as const });
const byMail = (carerId: string) => ({ carerId, channel: 'mail' as const });

describe('the next way to a family', () => {
	it('is mail to the same carer, then the second carer, then nobody', () => {
		const carers = [father, mother];
		expect(nextRoute(carers, bySms('mother'), [bySms('mother')])).toMatchObject(byMail('mother'));
		const used = [bySms('mother'), byMail('mother')];
		expect(nextRoute(carers, byMail('mother'), used)).toMatchObject(bySms('father'));
		expect(nextRoute(carers, bySms('father'), [...used, bySms('father')])).toBeNull();
	});

	it('passes over a channel that is not open', () => {
		const noMail = { ...mother, canMail: false };
		expect(nextRoute([noMail, father], bySms('mother'), [])).toMatchObject(bySms('father'));
	});

	it('passes over a way by which the same message went already', () => {
		const used = [bySms('mother'), byMail('mother')];
		expect(nextRoute([mother, father], bySms('mother'), used)).toMatchObject(bySms('father'));
	});

	it('starts from the first carer when the one that failed is gone', () => {
		expect(nextRoute([father], bySms('mother'), [])).toMatchObject(bySms('father'));
	});
});

describe('messages that stay where they are', () => {
	it('are the answers to a text of the family', () => {
		expect(mayFallBack('stop-answer')).toBe(false);
		expect(mayFallBack('visit-missed')).toBe(true);
		expect(mayFallBack('emergency-advice')).toBe(true);
	});
});
