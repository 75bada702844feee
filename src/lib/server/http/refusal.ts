export interface Asker {
	readonly request: Request;
	readonly url: URL;
	readonly isDataRequest: boolean;
}

/** A form sent by script, which expects the framework's own answer to a form. */
const isScriptedForm = ({ request }: Asker): boolean => request.headers.get('x-sveltekit-action') === 'true';

const prefersJson = ({ request, url, isDataRequest }: Asker): boolean =>
	isDataRequest ||
	url.pathname.startsWith('/api/') ||
	(request.headers.get('accept') ?? '').startsWith('application/json');

/** An answer that refuses, in the form the asker can read. `errorPage` is the shell of `src/error.html`. */
export function refuse(asker: Asker, status: number, sentence: string, errorPage: string): Response {
	if (isScriptedForm(asker)) {
		return Response.json({ type: 'error', status, error: { message: sentence } }, { status });
	}
	if (prefersJson(asker)) return Response.json({ message: sentence }, { status });
	const html = errorPage
		.replaceAll('%sveltekit.status%', String(status))
		.replaceAll('%sveltekit.error.message%', sentence);
	return new Response(html, { status, headers: { 'content-type': 'text/html; charset=utf-8' } });
}

/** Sends the asker to sign in and back; a program gets 401 instead. */
export function sendToSignIn(asker: Asker): Response {
	const { request, url } = asker;
	const next = request.method === 'GET' ? url.pathname + url.search : url.pathname;
	const location = `/sign-in?next=${encodeURIComponent(next)}`;
	if (isScriptedForm(asker)) return Response.json({ type: 'redirect', status: 303, location });
	if (prefersJson(asker) && !asker.isDataRequest) {
		return Response.json({ message: 'Please sign in first.' }, { status: 401 });
	}
	return new Response(null, { status: 303, headers: { location } });
}

/** Where to go after signing in: a path of our own, never another site's address. */
export function safeNext(next: string | null): string {
	if (next === null || !next.startsWith('/') || next.startsWith('//') || next.includes('\\')) return '/';
	return next.startsWith('/sign-') ? '/' : next;
}
