/** The closed vocabulary of the record of access: what was looked at or changed. Add a line here before writing one. */
export const ACCESS_ACTIONS = {
	'session.started': 'signed in',
	'session.refused': 'was refused at sign-in',
	'session.ended': 'signed out',
	'session.ended-everywhere': 'signed out everywhere',
	'account.password-changed': 'changed the password',
	'account.factor-on': 'switched the second factor on',
	'account.factor-off': 'switched the second factor off',
	'account.invitation-accepted': 'took up the invitation',
	'person.invited': 'invited a person',
	'person.invited-again': 'made a new invitation link',
	'person.roles-set': 'set a person’s roles',
	'person.disabled': 'disabled an account',
	'person.enabled': 'enabled an account',
	'person.factor-reset': 'removed a person’s second factor',
	'person.sessions-ended': 'signed a person out everywhere',
	'site.added': 'added a site',
	'site.changed': 'changed a site',
	'opening.added': 'added an opening',
	'opening.removed': 'removed an opening',
	'closed-day.added': 'added a closed day',
	'closed-day.removed': 'removed a closed day',
	'policy.changed': 'changed a site’s policy',
	'standard.changed': 'changed the guideline in force',
	'wording.changed': 'changed a wording',
	'access-record.viewed': 'looked at the record of access',
	'discharge.viewed': 'looked at a discharge',
	'discharge.changed': 'changed a discharge',
	'sheet.viewed': 'opened the discharge sheet',
	'follow-up.viewed': 'looked at a newborn',
	'follow-up.changed': 'changed a follow-up',
	'summary.viewed': 'opened the summary',
	'thread.viewed': 'looked at the thread with a family',
	'stray-text.assigned': 'put a text of an unknown number into a thread',
	'stray-text.not-ours': 'marked a text of an unknown number as not one of ours',
	'search.made': 'searched',
	'feed.made': 'made a calendar feed',
	'feed.revoked': 'revoked a calendar feed',
	'feed.read': 'a calendar read its feed'
} as const satisfies Record<string, string>;

export type AccessAction = keyof typeof ACCESS_ACTIONS;

/** The action in words; an action of an older version shows as it was written. */
export function actionWords(action: string): string {
	return Object.entries(ACCESS_ACTIONS).find(([name]) => name === action)?.[1] ?? action;
}
