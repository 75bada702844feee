import type { Component } from 'svelte';

export interface MenuItem {
	readonly label: string;
	readonly icon?: Component<{ class?: string }>;
	/** A link, or something to do; one of the two. */
	readonly href?: string;
	readonly onSelect?: () => void;
	readonly danger?: boolean;
	readonly disabled?: boolean;
}
