import { createQuery, keepPreviousData } from '@tanstack/svelte-query';
import { addressOf } from './address';

export interface Found {
	readonly followUpId: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly recordNumber: string;
	readonly bornOn: string;
	readonly stage: string;
}

interface Loaded {
	readonly words: string;
	readonly found: Found[];
}

/** Somebody who types is asked for only once the keys rest. */
const REST = 250;

async function fetchFound(words: string, signal: AbortSignal): Promise<Found[]> {
	const response = await fetch(addressOf('/api/v1/search', { q: words }), { signal });
	if (!response.ok) throw new Error('not-answered');
	const body: { found: Found[] } = await response.json();
	return body.found;
}

/** What the page searched for when it was loaded, searched anew while somebody types. */
export function liveSearch(given: () => Loaded) {
	let typed = $state<{ words: string; on: string } | null>(null);
	let settled = $state<{ words: string; on: string } | null>(null);
	let timer: ReturnType<typeof setTimeout> | undefined;
	// A new page load (the header's box, the button) overrides what was typed here before it.
	const isCurrent = (one: { on: string } | null) => one !== null && one.on === given().words;
	const words = $derived(isCurrent(typed) ? (typed?.words ?? '') : given().words);
	const asked = $derived((isCurrent(settled) ? (settled?.words ?? '') : given().words).trim());
	const query = createQuery(() => ({
		queryKey: ['search', asked],
		queryFn: ({ signal }: { signal: AbortSignal }) => fetchFound(asked, signal),
		enabled: asked.length >= 2 && asked !== given().words.trim(),
		placeholderData: keepPreviousData,
		retry: false
	}));
	const isLoaded = $derived(asked === given().words.trim());
	return {
		get words() {
			return words;
		},
		get found(): readonly Found[] {
			return isLoaded ? given().found : (query.data ?? given().found);
		},
		get isBusy() {
			return words.trim() !== asked || (!isLoaded && query.isFetching);
		},
		get hasFailed() {
			return !isLoaded && query.isError;
		},
		type(text: string) {
			typed = { words: text, on: given().words };
			clearTimeout(timer);
			timer = setTimeout(() => (settled = typed), REST);
		}
	};
}
