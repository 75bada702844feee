/** What one call to a provider came to. Each is a different duty, so no two may be confused. */
export type CallOutcome =
	/** The provider took the message. */
	| { readonly kind: 'accepted'; readonly providerId: string }
	/** The provider will never take this message; trying again is of no use. */
	| { readonly kind: 'refused'; readonly reason: string }
	/**
	 * Certainly not taken, but may be later. `blame`: it lies with this message, with the provider as a whole, or the
	 * provider is well and asks for a slower pace.
	 */
	| {
			readonly kind: 'not-taken';
			readonly reason: string;
			readonly blame: 'message' | 'provider' | 'pace';
			readonly retryAfterSeconds?: number | undefined;
	  }
	/** The call began and its answer was lost: taken or not, nobody here can tell. */
	| { readonly kind: 'unknown'; readonly reason: string };

/** What the provider says about a call whose answer was lost. */
export type Lookup =
	| { readonly kind: 'found'; readonly providerId: string; readonly status: string | null }
	| { readonly kind: 'absent' }
	/** It could not be asked; ask again later. */
	| { readonly kind: 'unavailable'; readonly reason: string }
	/** It can never be asked. */
	| { readonly kind: 'no-list' };

/** Words of an error for the row and the log: no addresses, no texts. */
export function shortReason(error: unknown): string {
	const code = codeOf(error);
	const name = error instanceof Error ? error.name : 'Error';
	return code === undefined ? name : `${name} ${code}`;
}

/** The `code` of an error as Node, axios and nodemailer set it. */
export function codeOf(error: unknown): string | undefined {
	if (typeof error !== 'object' || error === null || !('code' in error)) return undefined;
	const { code } = error;
	return typeof code === 'string' || typeof code === 'number' ? String(code) : undefined;
}

/** No byte of the message left this machine: the name was not resolved or nobody answered at the address. */
const NEVER_CONNECTED = new Set([
	'ECONNREFUSED',
	'ENOTFOUND',
	'EAI_AGAIN',
	'EDNS',
	'EHOSTUNREACH',
	'ENETUNREACH'
]);

/** nodemailer keeps the system's own code in `originalCode`. */
export const neverConnected = (error: unknown): boolean =>
	NEVER_CONNECTED.has(codeOf(error) ?? '') || NEVER_CONNECTED.has(originalCodeOf(error) ?? '');

function originalCodeOf(error: unknown): string | undefined {
	if (typeof error !== 'object' || error === null || !('originalCode' in error)) return undefined;
	return typeof error.originalCode === 'string' ? error.originalCode : undefined;
}
