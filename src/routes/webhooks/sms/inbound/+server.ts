import { readSignedForm } from '$lib/server/http/signed-form';
import { receiveEvent } from '$lib/server/services/provider-events';
import type { RequestHandler } from './$types';

/** An empty answer: what we say goes out through the outbox, never as the reply to this call. */
const NOTHING_TO_SAY = '<?xml version="1.0" encoding="UTF-8"?><Response></Response>';

export const POST: RequestHandler = async ({ request, url, locals }) => {
	const fields = await readSignedForm(locals.ctx, { request, url });
	if (fields === null) return new Response('signature mismatch', { status: 403 });
	const { MessageSid: sid, From: from, Body: body } = fields;
	if (!sid || !from || body === undefined) return new Response('fields missing', { status: 400 });
	await receiveEvent(locals.ctx, { kind: 'inbound', eventKey: sid, payload: { sid, from, body } });
	return new Response(NOTHING_TO_SAY, { headers: { 'content-type': 'text/xml; charset=utf-8' } });
};
