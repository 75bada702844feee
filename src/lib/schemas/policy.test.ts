import { describe, expect, test } from 'vitest';
import { DEFAULT_POLICY } from '../domain/followup/policy';
import { formOfPolicy, policyOfForm, policySchema } from './policy';

describe('the policy form', () => {
	test('accepts the defaults and gives them back as they were', () => {
		const policy = { ...DEFAULT_POLICY, dutyStaffIds: ['a', 'b'], quietDays: [7] };
		expect(policyOfForm(policySchema.parse(formOfPolicy(policy)))).toEqual(policy);
	});
	test.each([
		[{ reachShortHours: 5 }, 'reachLongHours'],
		[{ decideHours: 0.25, decideUrgentMinutes: 30 }, 'decideUrgentMinutes'],
		[{ firstDuty: 'a', secondDuty: 'a' }, 'secondDuty'],
		[{ quietFrom: '24:00' }, 'quietFrom'],
		[{ welfareCheck: '  ' }, 'welfareCheck'],
		[{ climbMinutes: 0 }, 'climbMinutes']
	])('refuses %j at %s', (change, field) => {
		const parsed = policySchema.safeParse({ ...formOfPolicy(DEFAULT_POLICY), ...change });
		expect(parsed.error?.issues.map(({ path }) => path[0])).toContain(field);
	});
});
