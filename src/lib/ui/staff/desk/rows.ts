/** The queue's rows in the page: each has one link that carries `data-row-link`; the open one also `aria-current`. */
const rowLinks = (): HTMLElement[] => [...document.querySelectorAll<HTMLElement>('[data-row-link]')];

/** Moves the focus to the row before or after the one in focus, or else the open one; stays at the ends. */
export function walkRows(step: 1 | -1): void {
	const links = rowLinks();
	const focused = links.findIndex((link) => link === document.activeElement);
	const here = focused === -1 ? links.findIndex((link) => link.ariaCurrent === 'true') : focused;
	const target = links[here === -1 ? (step === 1 ? 0 : links.length - 1) : here + step];
	target?.focus();
	target?.scrollIntoView({ block: 'nearest' });
}

/** Focuses the row of a follow-up, where it is on the page. */
export const focusRowOf = (followUpId: string): void =>
	rowLinks()
		.find((link) => link.dataset['rowLink'] === followUpId)
		?.focus();

/**
 * Notes which row is in focus and where on the screen it lies; the function given back puts both as they were, after
 * rows around it came, went or changed places.
 */
export function holdPlace(): () => void {
	const held = rowLinks().find((link) => link === document.activeElement);
	if (!held) return () => {};
	const top = held.getBoundingClientRect().top;
	return () => {
		if (!held.isConnected) return;
		if (document.activeElement !== held) held.focus({ preventScroll: true });
		window.scrollBy(0, held.getBoundingClientRect().top - top);
	};
}
