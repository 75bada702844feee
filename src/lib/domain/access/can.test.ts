import { describe, expect, test } from 'vitest';
import { can, mayEver, sitesWhere, type Action } from './can';
import type { Role, StaffActor } from './roles';

const HERE = { organisationId: 'org', birthSiteId: 'unit', clinicId: 'clinic' };
const actor = (role: Role, siteId: string | null): StaffActor => ({
	kind: 'staff',
	staffId: 'somebody',
	organisationId: 'org',
	name: 'Somebody',
	roles: [{ role, siteId }]
});
const AT_HOME: Record<Role, StaffActor> = {
	nurse: actor('nurse', 'unit'),
	desk: actor('desk', 'clinic'),
	pediatrician: actor('pediatrician', 'clinic'),
	admin: actor('admin', null)
};
const ELSEWHERE: Record<Exclude<Role, 'admin'>, StaffActor> = {
	nurse: actor('nurse', 'other-unit'),
	desk: actor('desk', 'other-clinic'),
	pediatrician: actor('pediatrician', 'other-clinic')
};

/** Written down by hand from "who may do what", so that a slip in the table of permissions shows. */
const WHO_MAY: Record<Action, readonly Role[]> = {
	'discharge.view': ['nurse', 'desk', 'pediatrician'],
	'discharge.enter': ['nurse', 'pediatrician'],
	'discharge.edit': ['nurse', 'pediatrician'],
	'values.view-latest': ['nurse', 'desk', 'pediatrician'],
	'values.view': ['nurse', 'pediatrician'],
	'values.record': ['pediatrician'],
	'visit.book-first': ['nurse', 'desk', 'pediatrician'],
	'visit.manage': ['desk', 'pediatrician'],
	'visit.approve-outside-window': ['pediatrician'],
	'thread.view': ['nurse', 'desk', 'pediatrician'],
	'thread.write': ['desk', 'pediatrician'],
	'stray-text.settle': ['desk', 'pediatrician'],
	'attempt.log': ['desk', 'pediatrician'],
	'alert.settle': ['desk', 'pediatrician'],
	'follow-up.view': ['nurse', 'desk', 'pediatrician'],
	'follow-up.decide': ['pediatrician'],
	'queue.view': ['desk', 'pediatrician'],
	'calendar.view': ['desk', 'pediatrician'],
	'waiting.view': ['pediatrician'],
	'openings.edit': ['desk', 'admin'],
	'people.manage': ['admin'],
	'sites.manage': ['admin'],
	'wording.manage': ['admin'],
	'policy.manage': ['admin'],
	'operations.view': ['admin'],
	'access-record.view-all': ['admin'],
	'access-record.view-own': ['pediatrician'],
	'measures.view-site': ['nurse', 'desk', 'pediatrician'],
	'measures.view-all': ['admin']
};
/** A text of an unknown number belongs to no site: these are open at every site of the organisation. */
const OF_NO_SITE: readonly Action[] = ['stray-text.settle'];
const actions = Object.entries(WHO_MAY).flatMap(([action, roles]) => {
	const known = (Object.keys(WHO_MAY) as Action[]).find((name) => name === action);
	return known === undefined ? [] : [{ action: known, roles }];
});

describe.each(actions)('$action', ({ action, roles }) => {
	test.each(['nurse', 'desk', 'pediatrician', 'admin'] as const)('%s, at home', (role) => {
		expect(can(AT_HOME[role], action, HERE)).toBe(roles.includes(role));
		expect(mayEver(AT_HOME[role], action)).toBe(roles.includes(role));
	});
	test.each(['nurse', 'desk', 'pediatrician'] as const)('%s of another site', (role) => {
		expect(can(ELSEWHERE[role], action, HERE)).toBe(OF_NO_SITE.includes(action) && roles.includes(role));
	});
	test('nobody of another organisation', () => {
		for (const who of Object.values(AT_HOME)) {
			expect(can({ ...who, organisationId: 'other' }, action, HERE)).toBe(false);
		}
	});
});

test('a role held without a site opens nothing that belongs to a site', () => {
	expect(can(actor('desk', null), 'queue.view', { ...HERE, clinicId: null })).toBe(false);
});

test('the scope of a list holds each own site once', () => {
	const both: StaffActor = {
		...AT_HOME.desk,
		roles: [
			{ role: 'desk', siteId: 'clinic' },
			{ role: 'pediatrician', siteId: 'clinic' },
			{ role: 'desk', siteId: 'second-clinic' },
			{ role: 'nurse', siteId: 'unit' }
		]
	};
	expect(sitesWhere(both, 'queue.view')).toEqual(['clinic', 'second-clinic']);
});
