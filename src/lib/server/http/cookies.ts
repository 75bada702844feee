import type { Cookies } from '@sveltejs/kit';
import type { Cookie } from 'lucia';

/** Sets or clears the session cookie in the browser. */
export function setSessionCookie(cookies: Cookies, { name, value, attributes }: Cookie): void {
	cookies.set(name, value, { ...attributes, path: '/' });
}
