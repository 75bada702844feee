import { err, ok, type Result } from '../result';

/** Values of fields by name. */
export type FieldValues = Readonly<Record<string, string>>;

export interface WordingFault {
	readonly code: 'unknown-field' | 'required-field-absent' | 'stray-brace';
	/** Field names, or the text around a brace. */
	readonly what: string;
}

const FIELD = /\{([a-zA-Z]+)\}/g;

/** Names of the fields in a text, each once, in order of appearance. */
export const fieldsIn = (text: string): string[] => [
	...new Set([...text.matchAll(FIELD)].map((match) => match[1] ?? ''))
];

/**
 * What is wrong with a wording, if anything: a field that the kind does not have, one that it cannot do without, or a
 * brace that is no field. An empty list means that it may be saved.
 */
export function wordingFaults(
	text: string,
	fields: { readonly allowed: readonly string[]; readonly required: readonly string[] }
): WordingFault[] {
	const used = fieldsIn(text);
	const unknown = used.filter((name) => !fields.allowed.includes(name));
	const absent = fields.required.filter((name) => !used.includes(name));
	const stray = /[{}]/.exec(text.replace(FIELD, ''));
	return [
		...unknown.map((what) => ({ code: 'unknown-field' as const, what })),
		...absent.map((what) => ({ code: 'required-field-absent' as const, what })),
		...(stray ? [{ code: 'stray-brace' as const, what: stray[0] }] : [])
	];
}

/**
 * Puts values into a text. A field without a value is an error, never an empty place: half a sentence about a visit is
 * worse than none. Example: `render('At {time}', { time: '10:20' })` gives `At 10:20`.
 */
export function render(
	text: string,
	values: FieldValues
): Result<string, { readonly missing: readonly string[] }> {
	const missing = fieldsIn(text).filter((name) => (values[name] ?? '') === '');
	if (missing.length > 0) return err({ missing });
	return ok(text.replace(FIELD, (_, name: string) => values[name] ?? ''));
}
