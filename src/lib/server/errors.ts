/** Expected refusals of a use case; `http/errors.ts` turns them into a status and a sentence. */
export type AppError =
	| { readonly code: 'not_found' }
	| { readonly code: 'not_allowed' }
	| { readonly code: 'conflict'; readonly message: string }
	| { readonly code: 'invalid'; readonly field?: string; readonly message: string };

export const notFound: AppError = { code: 'not_found' };
export const notAllowed: AppError = { code: 'not_allowed' };
export const conflict = (message: string): AppError => ({ code: 'conflict', message });
export const invalid = (message: string, field?: string): AppError => ({ code: 'invalid', message, field });
