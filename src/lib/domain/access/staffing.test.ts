import { expect, test } from 'vitest';
import { areRolesSound, leavesAnAdministrator } from './staffing';

const SITES = [
	{ id: 'unit', kind: 'birth-unit' },
	{ id: 'clinic', kind: 'clinic' }
] as const;

test.each([
	[true, [{ role: 'nurse', siteId: 'unit' } as const]],
	[true, [{ role: 'desk', siteId: 'clinic' } as const, { role: 'admin', siteId: null } as const]],
	[false, [{ role: 'nurse', siteId: 'clinic' } as const]],
	[false, [{ role: 'pediatrician', siteId: 'unit' } as const]],
	[false, [{ role: 'desk', siteId: 'clinic-of-others' } as const]],
	[false, [{ role: 'desk', siteId: null } as const]],
	[false, [{ role: 'admin', siteId: 'clinic' } as const]],
	[false, [{ role: 'admin', siteId: null } as const, { role: 'admin', siteId: null } as const]]
])('sound: %s for %j', (isSound, roles) => {
	expect(areRolesSound(roles, SITES)).toBe(isSound);
});

test('somebody else has to be able to manage people, and to sign in for it', () => {
	const me = { staffId: 'me', canSignIn: true };
	expect(leavesAnAdministrator([me], 'me')).toBe(false);
	expect(leavesAnAdministrator([me, { staffId: 'invited', canSignIn: false }], 'me')).toBe(false);
	expect(leavesAnAdministrator([me, { staffId: 'other', canSignIn: true }], 'me')).toBe(true);
	expect(leavesAnAdministrator([me], 'a-nurse')).toBe(true);
});
