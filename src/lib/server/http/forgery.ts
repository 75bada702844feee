const FORM_TYPES = new Set(['application/x-www-form-urlencoded', 'multipart/form-data', 'text/plain']);
const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * True where another site may be behind the request: a changing request from a foreign origin, or a form post that
 * does not say its origin. Providers' signed posts to `/webhooks/` carry no origin and prove themselves otherwise;
 * for their sake the framework's own check is off (`svelte.config.js`) and this one stands in its place.
 */
export function isForged(request: Request, url: URL): boolean {
	if (SAFE.has(request.method) || url.pathname.startsWith('/webhooks/')) return false;
	const origin = request.headers.get('origin');
	if (origin !== null) return origin !== url.origin;
	// A request without a content type may still be a form with an empty body.
	const type = request.headers.get('content-type')?.split(';', 1)[0]?.trim().toLowerCase() ?? '';
	return type === '' || FORM_TYPES.has(type);
}
