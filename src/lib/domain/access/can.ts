import type { Role, StaffActor } from './roles';

/** What staff may do; the table below is the only place that says who. */
export type Action =
	| 'discharge.view'
	/** A nurse at her birth unit; a pediatrician for a newborn who comes to the clinic and is not on record. */
	| 'discharge.enter'
	| 'discharge.edit'
	| 'values.view-latest'
	| 'values.view'
	| 'values.record'
	| 'visit.book-first'
	| 'visit.manage'
	| 'visit.approve-outside-window'
	| 'thread.view'
	| 'thread.write'
	/** Texts of numbers that belong to no family have no site: every desk of the organisation owes them. */
	| 'stray-text.settle'
	| 'attempt.log'
	| 'alert.settle'
	| 'follow-up.view'
	| 'follow-up.decide'
	| 'queue.view'
	| 'calendar.view'
	| 'waiting.view'
	| 'openings.edit'
	| 'people.manage'
	| 'sites.manage'
	| 'wording.manage'
	| 'policy.manage'
	| 'operations.view'
	| 'access-record.view-all'
	| 'access-record.view-own'
	| 'measures.view-site'
	| 'measures.view-all';

/** Which of the resource's sites the role must be held at. */
type Reach = 'birth-unit' | 'clinic' | 'organisation';

const AT_UNIT = 'birth-unit';
const AT_CLINIC = 'clinic';
const EVERYWHERE = 'organisation';

/** Role by role, following the table "who may do what" of the product; absent means no. */
const PERMISSIONS: Readonly<Record<Role, Partial<Record<Action, Reach>>>> = {
	nurse: {
		'discharge.view': AT_UNIT,
		'discharge.enter': AT_UNIT,
		'discharge.edit': AT_UNIT,
		'values.view-latest': AT_UNIT,
		'values.view': AT_UNIT,
		'visit.book-first': AT_UNIT,
		'thread.view': AT_UNIT,
		'follow-up.view': AT_UNIT,
		'measures.view-site': AT_UNIT
	},
	desk: {
		'discharge.view': AT_CLINIC,
		'values.view-latest': AT_CLINIC,
		'visit.book-first': AT_CLINIC,
		'visit.manage': AT_CLINIC,
		'thread.view': AT_CLINIC,
		'thread.write': AT_CLINIC,
		'stray-text.settle': EVERYWHERE,
		'attempt.log': AT_CLINIC,
		'alert.settle': AT_CLINIC,
		'follow-up.view': AT_CLINIC,
		'queue.view': AT_CLINIC,
		'calendar.view': AT_CLINIC,
		'openings.edit': AT_CLINIC,
		'measures.view-site': AT_CLINIC
	},
	pediatrician: {
		'discharge.view': AT_CLINIC,
		'discharge.enter': AT_CLINIC,
		'discharge.edit': AT_CLINIC,
		'values.view-latest': AT_CLINIC,
		'values.view': AT_CLINIC,
		'values.record': AT_CLINIC,
		'visit.book-first': AT_CLINIC,
		'visit.manage': AT_CLINIC,
		'visit.approve-outside-window': AT_CLINIC,
		'thread.view': AT_CLINIC,
		'thread.write': AT_CLINIC,
		'stray-text.settle': EVERYWHERE,
		'attempt.log': AT_CLINIC,
		'alert.settle': AT_CLINIC,
		'follow-up.view': AT_CLINIC,
		'follow-up.decide': AT_CLINIC,
		'queue.view': AT_CLINIC,
		'calendar.view': AT_CLINIC,
		'waiting.view': AT_CLINIC,
		'access-record.view-own': AT_CLINIC,
		'measures.view-site': AT_CLINIC
	},
	admin: {
		'openings.edit': EVERYWHERE,
		'people.manage': EVERYWHERE,
		'sites.manage': EVERYWHERE,
		'wording.manage': EVERYWHERE,
		'policy.manage': EVERYWHERE,
		'operations.view': EVERYWHERE,
		'access-record.view-all': EVERYWHERE,
		'measures.view-all': EVERYWHERE
	}
};

/** What is acted upon: its organisation, and the sites that it belongs to. */
export interface Resource {
	readonly organisationId: string;
	readonly birthSiteId?: string | null;
	readonly clinicId?: string | null;
}

/** Default deny: true only where a role of the actor names the action and is held at the resource's own site. */
export function can(actor: StaffActor, action: Action, resource: Resource): boolean {
	if (actor.organisationId !== resource.organisationId) return false;
	return actor.roles.some(({ role, siteId }) => {
		switch (PERMISSIONS[role][action]) {
			case 'organisation':
				return true;
			case 'birth-unit':
				return siteId !== null && siteId === resource.birthSiteId;
			case 'clinic':
				return siteId !== null && siteId === resource.clinicId;
			default:
				return false;
		}
	});
}

/** The sites at which the actor may do the action: the scope of a list. */
export function sitesWhere(actor: StaffActor, action: Action): string[] {
	const sites = actor.roles.filter(
		({ role, siteId }) => siteId !== null && PERMISSIONS[role][action] !== undefined
	);
	return [...new Set(sites.flatMap(({ siteId }) => (siteId === null ? [] : [siteId])))];
}

/** True where any role of the actor could ever do the action: the guard of a whole screen. */
export function mayEver(actor: StaffActor, action: Action): boolean {
	return actor.roles.some(({ role }) => PERMISSIONS[role][action] !== undefined);
}
