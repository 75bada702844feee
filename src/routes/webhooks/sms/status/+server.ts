import { readSignedForm } from '$lib/server/http/signed-form';
import { receiveEvent } from '$lib/server/services/provider-events';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async ({ request, url, locals }) => {
	const fields = await readSignedForm(locals.ctx, { request, url });
	if (fields === null) return new Response('signature mismatch', { status: 403 });
	const { MessageSid: sid, MessageStatus: status, ErrorCode: error = '' } = fields;
	if (!sid || !status) return new Response('fields missing', { status: 400 });
	const message = url.searchParams.get('message') ?? '';
	const payload = { sid, status, error, message };
	await receiveEvent(locals.ctx, { kind: 'delivery', eventKey: `${sid}:${status}`, payload });
	return new Response(null, { status: 204 });
};
