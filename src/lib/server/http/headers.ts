/** Nothing may run or load: for answers that are not pages, and pages that the framework did not make. */
const BARE_POLICY =
	"default-src 'none'; style-src 'unsafe-inline'; img-src 'self'; form-action 'self'; frame-ancestors 'none'; base-uri 'none'";

const ALWAYS: Readonly<Record<string, string>> = {
	'x-content-type-options': 'nosniff',
	'x-frame-options': 'DENY',
	// `no-referrer` would make browsers send `Origin: null`, which the forgery check refuses.
	'referrer-policy': 'same-origin',
	'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin'
};

/** Sets the security headers of an answer. Everything the product says is about somebody: nothing is kept by caches. */
export function protectHeaders(headers: Headers, isHttps: boolean): void {
	for (const [name, value] of Object.entries(ALWAYS)) headers.set(name, value);
	if (!headers.has('content-security-policy')) headers.set('content-security-policy', BARE_POLICY);
	if (!headers.get('cache-control')?.includes('no-store')) headers.set('cache-control', 'private, no-store');
	headers.set('x-robots-tag', 'noindex, nofollow');
	if (isHttps) headers.set('strict-transport-security', 'max-age=63072000; includeSubDomains');
}
