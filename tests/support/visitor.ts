import type { App } from './app';

/** What a browser would keep and send: cookies, and the origin of a form. Redirects are told, not followed. */
export function visitor(app: App, jar: Map<string, string> = new Map()) {
	const send = async (path: string, init: RequestInit = {}): Promise<Response> => {
		const headers = new Headers(init.headers);
		if (!headers.has('accept')) headers.set('accept', 'text/html');
		if (jar.size > 0) headers.set('cookie', [...jar].map(([name, value]) => `${name}=${value}`).join('; '));
		const response = await fetch(app.address + path, { redirect: 'manual', ...init, headers });
		for (const line of response.headers.getSetCookie()) {
			const [, name, value] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
			if (name === undefined || value === undefined) continue;
			if (value === '') jar.delete(name);
			else jar.set(name, value);
		}
		return response;
	};
	return {
		jar,
		get: (path: string, headers: Record<string, string> = {}) => send(path, { headers }),
		send,
		/** Posts a form as the page itself would. */
		post: (path: string, fields: Record<string, string> = {}, headers: Record<string, string> = {}) =>
			send(path, {
				method: 'POST',
				body: new URLSearchParams(fields),
				headers: { origin: app.origin, ...headers }
			}),
		signIn: (who: { email: string; password: string }) =>
			send('/sign-in', {
				method: 'POST',
				body: new URLSearchParams({ email: who.email, password: who.password }),
				headers: { origin: app.origin }
			})
	};
}

export type Visitor = ReturnType<typeof visitor>;
