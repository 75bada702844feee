export interface KeyHint {
	/** Each entry is one key or combination that does it, for instance `['j', '↓']`. */
	readonly keys: readonly string[];
	readonly does: string;
}

export type KeyMap = Readonly<Record<string, (event: KeyboardEvent) => void>>;

function isTyping(target: EventTarget | null): boolean {
	if (!(target instanceof HTMLElement)) return false;
	return (
		target.isContentEditable ||
		target.closest('input, textarea, select, [role="dialog"], [role="menu"]') !== null
	);
}

/**
 * A handler for `<svelte:window onkeydown={…}>` that runs single-key shortcuts.
 * Silent while somebody types, in dialogs and menus, and with Ctrl, Alt or Meta held, so that nothing of the
 * browser's or of a screen reader's is taken away.
 */
export function onKeys(keys: KeyMap): (event: KeyboardEvent) => void {
	return (event) => {
		if (event.ctrlKey || event.altKey || event.metaKey || event.defaultPrevented || isTyping(event.target))
			return;
		const run = keys[event.key];
		if (!run) return;
		event.preventDefault();
		run(event);
	};
}

/** Moves the focus among the page's `[data-row-link]` elements; stays at the ends. */
export function focusRow(step: 1 | -1): void {
	const links = [...document.querySelectorAll<HTMLElement>('[data-row-link]')];
	const here = links.findIndex((link) => link === document.activeElement);
	const next = here === -1 ? (step === 1 ? 0 : links.length - 1) : here + step;
	const target = links[next];
	target?.focus();
	target?.scrollIntoView({ block: 'nearest' });
}

export const ROW_HINTS: readonly KeyHint[] = [
	{ keys: ['j', 'k'], does: 'next, previous row' },
	{ keys: ['Enter'], does: 'open' },
	{ keys: ['/'], does: 'search' }
];
