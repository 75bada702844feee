export type ButtonVariant = 'primary' | 'secondary' | 'quiet' | 'danger';
export type ButtonSize = 'small' | 'desk' | 'roomy';

const BASE =
	'inline-flex items-center justify-center gap-2 rounded-md border font-semibold no-underline transition-colors ' +
	'disabled:opacity-60 aria-disabled:opacity-60';

const VARIANTS: Record<ButtonVariant, string> = {
	primary: 'border-ink bg-ink text-on-ink hover:bg-ink/85',
	secondary: 'border-field-edge bg-sheet text-ink hover:border-ink hover:bg-well',
	quiet: 'border-transparent bg-transparent text-accent hover:bg-accent-wash',
	danger: 'border-late bg-late text-on-late hover:bg-late/85'
};

/** `small` and `desk` are for the staff's dense screens (32 and 40 px), `roomy` for a thumb (48 px). */
const SIZES: Record<ButtonSize, string> = {
	small: 'min-h-8 px-2.5 text-sm',
	desk: 'min-h-10 px-4',
	roomy: 'min-h-12 px-6 text-lg'
};

/** Classes shared by everything that looks like a button. */
export function buttonClass(variant: ButtonVariant, size: ButtonSize, wide = false): string {
	return `${BASE} ${VARIANTS[variant]} ${SIZES[size]} ${wide ? 'w-full' : ''}`;
}
