import { redirect } from '@sveltejs/kit';
import { recordAccess } from '$lib/server/audit/record';
import { endSession } from '$lib/server/auth/session';
import { setSessionCookie } from '$lib/server/http/cookies';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async ({ locals, cookies }) => {
	const { ctx, actor, sessionId } = locals;
	setSessionCookie(cookies, await endSession(ctx, sessionId));
	if (actor) {
		const { organisationId, staffId } = actor;
		await recordAccess(ctx.db, ctx, { organisationId, staffId, action: 'session.ended' });
	}
	redirect(303, '/sign-in');
};
