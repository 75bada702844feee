/** What every field component takes. `name` is also the id unless `id` says otherwise. */
export interface FieldProps {
	name: string;
	id?: string;
	label: string;
	hint?: string;
	/** Sentences beside the field, as Superforms gives them. */
	errors?: readonly string[] | undefined;
	/** Shown as "(optional)" after the label. */
	optional?: boolean;
	hideLabel?: boolean;
}

export interface Choice<Value extends string = string> {
	readonly value: Value;
	readonly label: string;
	readonly hint?: string;
	readonly disabled?: boolean;
}

/** The ids of hint and error, for aria-describedby; undefined when there is neither. */
export function fieldDescribedBy(
	id: string,
	hint: string | undefined,
	errors: readonly string[] | undefined
): string | undefined {
	const ids = [hint ? `${id}-hint` : '', errors?.length ? `${id}-error` : ''].filter(Boolean);
	return ids.length > 0 ? ids.join(' ') : undefined;
}
