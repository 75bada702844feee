/** The outcome of something that may be refused for an expected reason; a thrown error is a bug or a broken machine. */
export type Result<T, E> =
	{ readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: E };

export const ok = <T>(value: T): Result<T, never> => ({ ok: true, value });

export const err = <E>(error: E): Result<never, E> => ({ ok: false, error });

/** Makes the compiler refuse a `switch` that forgot a case. */
export function assertNever(value: never): never {
	throw new Error(`Unexpected case: ${JSON.stringify(value)}`);
}
