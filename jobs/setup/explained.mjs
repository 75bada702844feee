/** Something the person can mend: its message is whole sentences, printed without a stack trace. */
export class Explained extends Error {
	/** @override */
	name = 'Explained';
}

/**
 * What to print for an error.
 * @param {unknown} error @returns {string}
 */
export function describe(error) {
	if (error instanceof Explained) return error.message;
	return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
