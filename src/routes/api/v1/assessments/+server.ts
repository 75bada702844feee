import { MOST_RECORDS } from '$lib/schemas/assessment';
import { assessBody } from '$lib/schemas/assessment-request';
import { json } from '@sveltejs/kit';
import type { RequestHandler } from './$types';

/**
 * Assesses one newborn or up to 1,000, as a JSON object, a JSON array, or newline-delimited JSON; nothing is stored.
 * `?trace=true` adds the reasoning. Access is settled by the hooks.
 */
export const POST: RequestHandler = async ({ request, url, locals }) => {
	const isLines = (request.headers.get('content-type') ?? '').startsWith('application/x-ndjson');
	const answer = assessBody(await request.text(), {
		isLines,
		withTrace: url.searchParams.get('trace') === 'true',
		notAfter: locals.ctx.clock.now()
	});
	if (answer.kind === 'unreadable') {
		return json(
			{ error: { code: 'unreadable', field: '', message: 'The body is not JSON.' } },
			{ status: 400 }
		);
	}
	if (answer.kind === 'too-many') {
		const message = `At most ${MOST_RECORDS} records in one request.`;
		return json({ error: { code: 'too-many-records', field: '', message } }, { status: 413 });
	}
	if (answer.kind === 'one') return json(answer.result, { status: 'error' in answer.result ? 422 : 200 });
	if (answer.kind === 'list') return json(answer.results);
	return new Response(answer.text, { headers: { 'content-type': 'application/x-ndjson' } });
};
