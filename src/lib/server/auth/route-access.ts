import { mayEver, type Action } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';

/**
 * What a request needs before its page or endpoint runs:
 * `public` nothing; `signed-in` any member of staff; an action (or one of several) of `domain/access/can.ts`;
 * `operations-or-loopback` an administrator, or a program on this very machine.
 */
export type Need = 'public' | 'signed-in' | 'operations-or-loopback' | Action | readonly Action[];

export interface PageAccess {
	readonly kind: 'page';
	readonly view: Need;
	/** Form actions by name; the unnamed one is `default`. */
	readonly actions: Readonly<Record<string, Need>>;
}

export interface EndpointAccess {
	readonly kind: 'endpoint';
	readonly methods: Readonly<Record<string, Need>>;
}

export type RouteAccess = PageAccess | EndpointAccess;

const page = (view: Need, actions: Record<string, Need> = {}): PageAccess => ({
	kind: 'page',
	view,
	actions
});
const endpoint = (methods: Record<string, Need>): EndpointAccess => ({ kind: 'endpoint', methods });

/**
 * Every route of the product, each method and form action of it, and what it needs. Default deny: what is not
 * written here is answered 404. This opens a screen to a role at all; the page or action still asks
 * `requireCan(actor, action, record)` for the record it touches.
 */
export const ROUTE_ACCESS: Readonly<Record<string, RouteAccess>> = {
	'/': page('public'),

	'/(auth)/sign-in': page('public', { default: 'public' }),
	'/(auth)/sign-in/code': page('public', { default: 'public' }),
	'/(auth)/sign-out': endpoint({ POST: 'public' }),
	'/(auth)/invitation/[token]': page('public', { default: 'public' }),

	'/(staff)/account': page('signed-in', {
		password: 'signed-in',
		prepareFactor: 'signed-in',
		switchOnFactor: 'signed-in',
		switchOffFactor: 'signed-in',
		endSession: 'signed-in',
		signOutEverywhere: 'signed-in'
	}),
	'/(staff)/account/feeds': page('signed-in', { make: 'signed-in', revoke: 'signed-in' }),
	'/(staff)/help': page('signed-in'),
	'/(staff)/search': page('follow-up.view'),
	'/(staff)/measures': page(['measures.view-site', 'measures.view-all']),

	'/(staff)/discharges': page('discharge.view'),
	'/(staff)/discharges/new': page('discharge.enter', { save: 'discharge.enter', finish: 'discharge.enter' }),
	'/(staff)/discharges/[followUpId]': page('discharge.view', {
		save: 'discharge.edit',
		finish: 'discharge.edit'
	}),
	'/(staff)/discharges/[followUpId]/sheet': page('discharge.view'),

	'/(staff)/queue': page('queue.view'),
	'/(staff)/queue/[followUpId]': page('queue.view', {
		log: 'attempt.log',
		book: 'visit.manage',
		move: 'visit.manage',
		cancel: 'visit.manage',
		confirm: 'visit.manage',
		arrive: 'visit.manage',
		miss: 'visit.manage',
		settle: 'alert.settle',
		askOutside: 'visit.manage',
		approve: 'visit.approve-outside-window'
	}),
	'/(staff)/queue/texts/[entryId]': page('stray-text.settle', {
		assign: 'stray-text.settle',
		notOurs: 'stray-text.settle'
	}),
	'/(staff)/calendar': page('calendar.view', { choose: 'visit.manage' }),
	'/(staff)/morning': page('queue.view', {
		confirm: 'visit.manage',
		arrive: 'visit.manage',
		miss: 'visit.manage'
	}),
	'/(staff)/waiting': page('waiting.view'),

	'/(staff)/follow-ups/[followUpId]': page('follow-up.view', {
		value: 'values.record',
		strike: 'values.record',
		accept: 'follow-up.decide',
		decide: 'follow-up.decide',
		endTreatment: 'follow-up.decide',
		close: 'follow-up.decide',
		reopen: 'follow-up.decide',
		merge: 'follow-up.decide',
		settle: 'alert.settle'
	}),
	'/(staff)/follow-ups/[followUpId]/summary': page('values.view'),
	'/(staff)/follow-ups/[followUpId]/thread': page('thread.view', {
		write: 'thread.write',
		read: 'thread.write',
		assign: 'thread.write'
	}),

	'/(admin)/people': page('people.manage', {
		invite: 'people.manage',
		inviteAgain: 'people.manage',
		roles: 'people.manage',
		disable: 'people.manage',
		enable: 'people.manage',
		resetFactor: 'people.manage',
		signOutEverywhere: 'people.manage'
	}),
	'/(admin)/sites': page('openings.edit', { add: 'sites.manage' }),
	'/(admin)/sites/[siteId]': page('openings.edit', {
		save: 'sites.manage',
		addOpening: 'openings.edit',
		removeOpening: 'openings.edit',
		addClosedDay: 'openings.edit',
		removeClosedDay: 'openings.edit'
	}),
	'/(admin)/wording': page('wording.manage'),
	'/(admin)/wording/[kind]/[channel]/[language]': page('wording.manage', {
		save: 'wording.manage',
		restore: 'wording.manage',
		review: 'wording.manage'
	}),
	'/(admin)/standard': page('policy.manage', { standard: 'policy.manage', policy: 'policy.manage' }),
	'/(admin)/operations': page('operations.view'),
	'/(admin)/access-record': page(['access-record.view-all', 'access-record.view-own']),

	'/(public)/v/[token]': page('public', { confirm: 'public', otherTime: 'public' }),
	'/(public)/v/[token]/check-in': page('public', { default: 'public' }),
	'/(public)/v/[token]/check-in/[checkInId]': page('public'),
	'/(public)/v/[token]/visit.ics': endpoint({ GET: 'public' }),
	'/feeds/[token]': endpoint({ GET: 'public' }),

	'/webhooks/sms/inbound': endpoint({ POST: 'public' }),
	'/webhooks/sms/status': endpoint({ POST: 'public' }),

	'/api/v1/assessments': endpoint({ POST: 'discharge.view' }),
	'/api/v1/queue': endpoint({ GET: 'queue.view' }),
	'/api/v1/places': endpoint({ GET: ['visit.book-first', 'visit.manage'] }),
	'/api/v1/search': endpoint({ GET: 'follow-up.view' }),

	'/health/live': endpoint({ GET: 'public' }),
	'/health/ready': endpoint({ GET: 'public' }),
	'/api/health': endpoint({ GET: 'public' }),
	'/metrics': endpoint({ GET: 'operations-or-loopback' })
};

/** The form action that a request to a page names: `?/name`, else `default`. */
export function actionName(url: URL): string {
	for (const key of url.searchParams.keys()) if (key.startsWith('/')) return key.slice(1);
	return 'default';
}

/** What the request needs; null where the table does not know it, which is a refusal. */
export function needOf(routeId: string, method: string, url: URL): Need | null {
	const access = Object.hasOwn(ROUTE_ACCESS, routeId) ? ROUTE_ACCESS[routeId] : undefined;
	if (access === undefined) return null;
	const reads = method === 'GET' || method === 'HEAD';
	if (access.kind === 'page') {
		if (reads) return access.view;
		return method === 'POST' ? own(access.actions, actionName(url)) : null;
	}
	return own(access.methods, reads ? 'GET' : method);
}

const own = (needs: Readonly<Record<string, Need>>, name: string): Need | null =>
	Object.hasOwn(needs, name) ? (needs[name] ?? null) : null;

export type Verdict = 'allow' | 'sign-in-first' | 'not-your-work';

/** Whether this person may come through at all. `isLoopback`: a direct call from this machine, not through a proxy. */
export function decideAccess(need: Need, actor: StaffActor | null, isLoopback: boolean): Verdict {
	if (need === 'public') return 'allow';
	if (need === 'operations-or-loopback') {
		return isLoopback ? 'allow' : decideAccess('operations.view', actor, isLoopback);
	}
	if (actor === null) return 'sign-in-first';
	if (need === 'signed-in') return 'allow';
	const actions: readonly Action[] = typeof need === 'string' ? [need] : need;
	return actions.some((action) => mayEver(actor, action)) ? 'allow' : 'not-your-work';
}
