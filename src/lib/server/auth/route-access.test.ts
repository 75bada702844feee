import { describe, expect, test } from 'vitest';
import type { Role, StaffActor } from '../../domain/access/roles';
import { actionName, decideAccess, needOf } from './route-access';

const at = (path: string): URL => new URL(path, 'http://127.0.0.1');
const actor = (role: Role): StaffActor => ({
	kind: 'staff',
	staffId: 'somebody',
	organisationId: 'org',
	name: 'Somebody',
	roles: [{ role, siteId: role === 'admin' ? null : 'site' }]
});

describe('what a request needs', () => {
	test('a page by its view, a form action by its name', () => {
		expect(needOf('/(admin)/people', 'GET', at('/people'))).toBe('people.manage');
		expect(needOf('/(admin)/people', 'HEAD', at('/people'))).toBe('people.manage');
		expect(needOf('/(admin)/sites', 'POST', at('/sites?/add'))).toBe('sites.manage');
	});
	test('nothing that is not written down', () => {
		expect(needOf('/(admin)/nowhere', 'GET', at('/nowhere'))).toBeNull();
		expect(needOf('/(admin)/people', 'POST', at('/people'))).toBeNull();
		expect(needOf('/(admin)/people', 'DELETE', at('/people'))).toBeNull();
		expect(needOf('/health/live', 'POST', at('/health/live'))).toBeNull();
	});
	test('and no word that every object knows', () => {
		expect(needOf('constructor', 'GET', at('/'))).toBeNull();
		expect(needOf('/(admin)/people', 'POST', at('/people?/constructor'))).toBeNull();
	});
	test('the first name counts, as the framework reads it', () => {
		expect(actionName(at('/people?x=1&/roles&/invite'))).toBe('roles');
		expect(actionName(at('/sign-in?next=%2Fpeople'))).toBe('default');
	});
});

describe('who comes through', () => {
	test.each([
		['public', null, 'allow'],
		['signed-in', null, 'sign-in-first'],
		['signed-in', actor('nurse'), 'allow'],
		['people.manage', actor('nurse'), 'not-your-work'],
		['people.manage', actor('admin'), 'allow'],
		[['measures.view-site', 'measures.view-all'], actor('admin'), 'allow'],
		[[], actor('admin'), 'not-your-work'],
		['operations-or-loopback', null, 'sign-in-first'],
		['operations-or-loopback', actor('desk'), 'not-your-work']
	] as const)('%j for %j', (need, who, verdict) => {
		expect(decideAccess(need, who, false)).toBe(verdict);
	});
	test('being on this machine opens the counts and nothing else', () => {
		expect(decideAccess('operations-or-loopback', null, true)).toBe('allow');
		expect(decideAccess('operations.view', null, true)).toBe('sign-in-first');
	});
});
