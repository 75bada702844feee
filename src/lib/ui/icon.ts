import type { Component } from 'svelte';
import type { ClassValue } from 'svelte/elements';

/** A Lucide icon, imported by its own path: `@lucide/svelte/icons/<name>`. */
export type Icon = Component<{
	class?: ClassValue | null;
	'aria-hidden'?: boolean | 'true' | 'false' | null;
}>;
