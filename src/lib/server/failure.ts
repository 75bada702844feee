/** What may be said about a failure in a log: enough to find the cause, nothing of a person. */
export interface Failure {
	readonly type: string;
	readonly message?: string;
	readonly code?: string;
	/** SQL with placeholders, never with its values. */
	readonly query?: string;
	readonly stack: readonly string[];
	readonly cause?: Failure;
}

const property = (error: Error, name: string): string | undefined => {
	const value: unknown = Object.getOwnPropertyDescriptor(error, name)?.value;
	return typeof value === 'string' || typeof value === 'number' ? String(value) : undefined;
};

/** Addresses and every run of digits long enough to be a telephone, record or date number. */
const mask = (text: string): string =>
	text.replace(/[^\s@]+@[^\s@]+/g, '[address]').replace(/\d[\d\s().-]{3,}\d/g, '[number]');

/**
 * Describes an error without names or telephone numbers. The messages of database errors repeat the values that
 * were being saved ("Duplicate entry 'Ana …'"), so these errors keep only their code and their statement.
 */
export function describeFailure(error: unknown): Failure {
	if (!(error instanceof Error)) return { type: typeof error, stack: [] };
	const query = property(error, 'query');
	const isDatabase = query !== undefined || property(error, 'errno') !== undefined;
	return {
		type: error.name,
		...(isDatabase ? {} : { message: mask(error.message).slice(0, 300) }),
		...(property(error, 'code') ? { code: property(error, 'code') } : {}),
		...(query ? { query: query.slice(0, 300) } : {}),
		stack: (error.stack ?? '')
			.split('\n')
			.filter((line) => line.startsWith('    at '))
			.slice(0, 12),
		...(error.cause === undefined ? {} : { cause: describeFailure(error.cause) })
	};
}
