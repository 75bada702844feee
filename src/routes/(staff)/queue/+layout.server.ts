import { QUEUE_PAGE, queueQuerySchema } from '$lib/schemas/desk';
import { requireActor } from '$lib/server/auth/guard';
import { getQueue } from '$lib/server/services/queue';
import type { LayoutServerLoad } from './$types';

/** The list beside every call panel; the panel itself asks for its own record. */
export const load: LayoutServerLoad = async ({ locals, url }) => {
	// Only these are read, so that opening another row does not load the list again.
	const [clinicWord, showWord, rowsWord] = ['clinic', 'show', 'rows'].map(
		(name) => url.searchParams.get(name) ?? undefined
	);
	const { clinic, show, rows } = queueQuerySchema.parse({
		clinic: clinicWord,
		show: showWord,
		rows: rowsWord ?? QUEUE_PAGE
	});
	const queue = await getQueue(locals.ctx, requireActor(locals.actor), {
		clinicId: clinic,
		group: show,
		limit: rows
	});
	return {
		queue,
		choices: { clinic: queue.clinicId, show: queue.group, rows: rows === QUEUE_PAGE ? null : rows }
	};
};
