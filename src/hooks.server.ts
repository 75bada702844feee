import { building } from '$app/environment';
import { textDirection } from '$lib/domain/messaging/language';
import { appContext, closeAppContext } from '$lib/server/app-context';
import { decideAccess, needOf } from '$lib/server/auth/route-access';
import { readSession, sessionCookieName } from '$lib/server/auth/session';
import { isTooLong } from '$lib/server/http/body-limit';
import { setSessionCookie } from '$lib/server/http/cookies';
import { describeFailure } from '$lib/server/failure';
import { isForged } from '$lib/server/http/forgery';
import { protectHeaders } from '$lib/server/http/headers';
import { refuse, sendToSignIn } from '$lib/server/http/refusal';
import { readTheme, THEME_COOKIE } from '$lib/ui/theme';
import {
	isHttpError,
	isRedirect,
	type Handle,
	type HandleServerError,
	type RequestEvent,
	type ServerInit
} from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import errorPage from './error.html?raw';

export const init: ServerInit = () => {
	if (building) return;
	const { log, config } = appContext();
	log.info({ origin: config.origin }, 'web server is up');
	process.once('sveltekit:shutdown', () => {
		closeAppContext().catch((error: unknown) => log.error(describeFailure(error), 'closing the pool failed'));
	});
};

const identify: Handle = ({ event, resolve }) => {
	const ctx = appContext();
	const requestId = ctx.random.id();
	Object.assign(event.locals, {
		actor: null,
		sessionId: null,
		pendingStaffId: null,
		requestId,
		ctx: { ...ctx, log: ctx.log.child({ requestId }) },
		theme: readTheme(event.cookies.get(THEME_COOKIE)),
		language: 'en'
	} satisfies App.Locals);
	return resolve(event);
};

const setHeaders: Handle = async ({ event, resolve }) => {
	const response = await answered(event, resolve);
	protectHeaders(response.headers, event.locals.ctx.config.origin.startsWith('https:'));
	response.headers.set('x-request-id', event.locals.requestId);
	return response;
};

async function answered(event: RequestEvent, resolve: Parameters<Handle>[0]['resolve']): Promise<Response> {
	try {
		return await resolve(event);
	} catch (error) {
		return answerFailure(event, error);
	}
}

/** For what breaks before a page is reached, such as a session that cannot be looked up: fail closed, with a number. */
function answerFailure(event: RequestEvent, error: unknown): Response {
	if (isRedirect(error) || isHttpError(error)) throw error;
	const { message, errorId } = reportFailure(event, error, 500);
	return refuse(event, 500, `${message} Reference number: ${errorId}`, errorPage);
}

const refuseForgery: Handle = ({ event, resolve }) => {
	if (!isForged(event.request, event.url)) return resolve(event);
	return refuse(event, 403, 'This form was sent from another site, so nothing was done.', errorPage);
};

const limitBody: Handle = ({ event, resolve }) => {
	if (!isTooLong(event.request, event.route.id ?? '')) return resolve(event);
	return refuse(
		event,
		413,
		'What was sent is too long, so nothing was done. Send it in smaller parts.',
		errorPage
	);
};

const findActor: Handle = async ({ event, resolve }) => {
	const { ctx } = event.locals;
	const cookie = event.cookies.get(sessionCookieName(ctx));
	if (cookie) {
		const session = await readSession(ctx, cookie);
		if (session.state !== 'none') event.locals.sessionId = session.sessionId;
		if (session.state === 'half') event.locals.pendingStaffId = session.staffId;
		if (session.state === 'signed-in') {
			event.locals.actor = session.actor;
			if (session.cookie) setSessionCookie(event.cookies, session.cookie);
		}
	}
	return resolve(event);
};

const checkAccess: Handle = ({ event, resolve }) => {
	// Without a route there is nothing to protect: the framework answers 404 in our own layout.
	if (event.route.id === null) return resolve(event);
	const need = needOf(event.route.id, event.request.method, event.url);
	if (need === null) {
		event.locals.ctx.log.warn(
			{ route: event.route.id, method: event.request.method },
			'not in the route table'
		);
		return refuse(event, 404, 'There is no such page.', errorPage);
	}
	switch (decideAccess(need, event.locals.actor, isLoopback(event))) {
		case 'allow':
			return resolve(event);
		case 'sign-in-first':
			return sendToSignIn(event);
		case 'not-your-work':
			return refuse(event, 403, 'This screen belongs to another role than yours.', errorPage);
	}
};

/** A proxy on this machine is not the machine itself asking. */
function isLoopback({ request, getClientAddress }: RequestEvent): boolean {
	if (request.headers.has('x-forwarded-for') || request.headers.has('forwarded')) return false;
	return ['127.0.0.1', '::1', '::ffff:127.0.0.1'].includes(getClientAddress());
}

const fillShell: Handle = ({ event, resolve }) =>
	resolve(event, {
		transformPageChunk: ({ html }) =>
			html
				.replace('%lang%', event.locals.language)
				.replace('%dir%', textDirection(event.locals.language))
				.replace('%theme%', event.locals.theme)
	});

export const handle = sequence(
	identify,
	setHeaders,
	refuseForgery,
	limitBody,
	findActor,
	checkAccess,
	fillShell
);

/** Logs the cause without names and telephone numbers; the person gets a plain sentence and the number to ask by. */
function reportFailure(event: RequestEvent, error: unknown, status: number) {
	const { log, random } = appContext();
	const errorId = random.id();
	const { requestId } = event.locals;
	const { method } = event.request;
	const failure = describeFailure(error);
	log.error({ errorId, requestId, route: event.route.id, method, status, failure }, 'a request failed');
	const message =
		'Something broke on our side. What was saved before is still there; this last step was not saved.';
	return { message, errorId };
}

export const handleError: HandleServerError = ({ error, event, status }) =>
	status === 404 ? { message: 'There is no such page.' } : reportFailure(event, error, status);
