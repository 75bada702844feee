export interface Column<Key extends string = string> {
	readonly key: Key;
	readonly label: string;
	/** Numbers stand at the end so that they line up. */
	readonly align?: 'start' | 'end';
	/** Tailwind width class, for instance `w-40`. */
	readonly width?: string;
	/** The label is for screen readers only (a column of buttons). */
	readonly hideLabel?: boolean;
}
