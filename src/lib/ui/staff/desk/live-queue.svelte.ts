import { createQuery, useQueryClient } from '@tanstack/svelte-query';
import type { QueueView } from '../../../schemas/desk-view';
import { readDeskJson } from '../../../schemas/desk-view';
import { addressOf } from './address';

const EVERY = 30_000;

export interface QueueChoices {
	readonly clinic: string | null;
	readonly show: string | null;
	readonly rows: number | null;
}

const isQueue = (body: unknown): body is QueueView =>
	typeof body === 'object' && body !== null && 'rows' in body && 'nowAt' in body;

async function fetchQueue(choices: QueueChoices, signal: AbortSignal): Promise<QueueView> {
	const response = await fetch(addressOf('/api/v1/queue', { ...choices }), {
		signal,
		headers: { accept: 'application/json' }
	});
	if (!response.ok) throw new Error(response.status === 401 ? 'signed-out' : 'not-answered');
	const body = readDeskJson(await response.text());
	if (!isQueue(body)) throw new Error('not-answered');
	return body;
}

/**
 * The queue as the page loaded it, asked for again every half minute and when the window gets the focus back.
 * @param given what load gave, and the choices it was loaded with; read again whenever they change
 */
export function liveQueue(given: () => { readonly queue: QueueView; readonly choices: QueueChoices }) {
	const client = useQueryClient();
	const keyOf = (choices: QueueChoices) => ['desk-queue', choices.clinic, choices.show, choices.rows];
	// After something was done the page loads anew, and that answer is newer than the last one asked for here.
	$effect(() => {
		const { queue, choices } = given();
		client.setQueryData(keyOf(choices), queue);
	});
	return createQuery(() => {
		const { queue, choices } = given();
		return {
			queryKey: keyOf(choices),
			queryFn: ({ signal }: { signal: AbortSignal }) => fetchQueue(choices, signal),
			initialData: queue,
			initialDataUpdatedAt: queue.nowAt.getTime(),
			refetchInterval: EVERY,
			refetchOnWindowFocus: true,
			retry: 1
		};
	});
}
