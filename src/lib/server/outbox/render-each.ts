import type { Tx } from '../db/client';
import type { MessageRow, Outbox, RenderedMessage } from './port';

/**
 * Renders a batch. Where that throws, renders one by one, so that a message that cannot be rendered fails alone and does not
 * hold up the others. A database error of the transaction itself comes back at its next statement.
 */
export async function renderEach(
	tx: Tx,
	{ ctx, render }: Outbox,
	rows: readonly MessageRow[]
): Promise<ReadonlyMap<string, RenderedMessage | Error>> {
	if (rows.length === 0) return new Map();
	try {
		return await render(tx, ctx, [...rows]);
	} catch (error) {
		ctx.log.warn({ err: error, count: rows.length }, 'a batch could not be rendered; each is tried alone');
	}
	const results = new Map<string, RenderedMessage | Error>();
	for (const row of rows) {
		try {
			const result = (await render(tx, ctx, [row])).get(row.id);
			if (result !== undefined) results.set(row.id, result);
		} catch (error) {
			results.set(row.id, error instanceof Error ? error : new Error('rendering failed'));
		}
	}
	return results;
}
