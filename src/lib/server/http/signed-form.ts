import { Counter } from 'prom-client';
import type { Ctx } from '../context';
import { isSignedByProvider } from '../providers/sms/signature';

/** Calls to our webhooks that the provider did not sign: a wrong setting, or somebody trying. */
export const unsignedCalls = new Counter({
	name: 'fadewell_webhook_signature_mismatch_total',
	help: 'Calls to a webhook whose signature was missing or wrong',
	labelNames: ['webhook']
});

const LONGEST = 64 * 1024;

interface Call {
	readonly request: Request;
	readonly url: URL;
}

/**
 * The fields of a form that the SMS provider has signed; null where it has not, which is counted.
 * The signature is over the public address, which a proxy may have changed on the way to us.
 */
export async function readSignedForm(
	ctx: Ctx,
	{ request, url }: Call
): Promise<Record<string, string> | null> {
	const body = await request.text();
	const signature = request.headers.get('x-twilio-signature') ?? '';
	const fields = body.length > LONGEST ? {} : Object.fromEntries(new URLSearchParams(body));
	const path = url.pathname + url.search;
	const urls = [...new Set([ctx.config.publicBaseUrl, ctx.config.origin])].map((base) => base + path);
	if (signature !== '' && isSignedByProvider(ctx.config.sms.authToken, signature, { urls, fields }))
		return fields;
	unsignedCalls.inc({ webhook: url.pathname });
	ctx.log.warn({ webhook: url.pathname }, 'a webhook call was not signed by the provider');
	return null;
}
