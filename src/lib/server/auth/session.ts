import { Lucia, TimeSpan, type Cookie } from 'lucia';
import type { RoleAtSite, StaffActor } from '../../domain/access/roles';
import type { Ctx } from '../context';
import { sessionStore, SESSION_IDLE_MINUTES } from '../repos/sessions';

/** All use of Lucia's sessions is here and in `repos/sessions.ts`, its storage. */

interface SessionAttributes {
	startedAt: Date;
	isComplete: boolean;
}

interface StaffAttributes {
	organisationId: string;
	name: string;
	roles: readonly RoleAtSite[];
}

function lucia(ctx: Ctx) {
	const isSecure = ctx.config.origin.startsWith('https:');
	return new Lucia(sessionStore(ctx), {
		sessionExpiresIn: new TimeSpan(SESSION_IDLE_MINUTES, 'm'),
		sessionCookie: {
			// The prefix makes browsers refuse the cookie from anywhere but this host over https.
			name: isSecure ? '__Host-fadewell' : 'fadewell',
			attributes: { secure: isSecure, sameSite: 'lax', path: '/' }
		},
		getSessionAttributes: ({ startedAt, isComplete }) => ({ startedAt, isComplete }),
		getUserAttributes: ({ organisationId, name, roles }) => ({ organisationId, name, roles })
	});
}

declare module 'lucia' {
	interface Register {
		Lucia: ReturnType<typeof lucia>;
		DatabaseSessionAttributes: SessionAttributes;
		DatabaseUserAttributes: StaffAttributes;
	}
}

/** The name of the session cookie, which depends on whether the product runs over https. */
export const sessionCookieName = (ctx: Ctx): string => lucia(ctx).sessionCookieName;

export type ReadSession =
	| { readonly state: 'none' }
	| { readonly state: 'half'; readonly sessionId: string; readonly staffId: string }
	| {
			readonly state: 'signed-in';
			readonly sessionId: string;
			readonly actor: StaffActor;
			/** Set where the idle limit moved on and the browser's cookie has to follow. */
			readonly cookie: Cookie | null;
	  };

/** Who the cookie's session belongs to; a disabled account or a passed limit is `none`, and ends the session. */
export async function readSession(ctx: Ctx, sessionId: string): Promise<ReadSession> {
	const sessions = lucia(ctx);
	const { session, user } = await sessions.validateSession(sessionId);
	if (session === null) return { state: 'none' };
	if (!session.isComplete) return { state: 'half', sessionId, staffId: user.id };
	const { id: staffId, organisationId, name, roles } = user;
	return {
		state: 'signed-in',
		sessionId,
		actor: { kind: 'staff', staffId, organisationId, name, roles },
		cookie: session.fresh ? sessions.createSessionCookie(sessionId) : null
	};
}

/** Starts a session under a new id; `isComplete` false while the second factor is still owed. */
export async function startSession(
	ctx: Ctx,
	staffId: string,
	isComplete: boolean
): Promise<{ sessionId: string; cookie: Cookie }> {
	const sessions = lucia(ctx);
	const session = await sessions.createSession(
		staffId,
		{ startedAt: ctx.clock.now(), isComplete },
		{ sessionId: ctx.random.token() }
	);
	return { sessionId: session.id, cookie: sessions.createSessionCookie(session.id) };
}

/** Ends one session and returns the cookie that removes it from the browser. */
export async function endSession(ctx: Ctx, sessionId: string | null): Promise<Cookie> {
	const sessions = lucia(ctx);
	if (sessionId !== null) await sessions.invalidateSession(sessionId);
	return sessions.createBlankSessionCookie();
}

/** Ends every session of a person, on every device. */
export async function endAllSessions(ctx: Ctx, staffId: string): Promise<void> {
	await lucia(ctx).invalidateUserSessions(staffId);
}
