/** One sentence with the id of the field it belongs to. */
export interface FieldError {
	readonly field: string;
	readonly message: string;
}

/** Superforms' `$allErrors` (`{ path, messages }[]`) as links for `ErrorSummary`. */
export function fieldErrors(all: readonly { path: string; messages: readonly string[] }[]): FieldError[] {
	return all.flatMap(({ path, messages }) => messages.map((message) => ({ field: path, message })));
}
