import twilio from 'twilio';

/**
 * True where the SMS provider itself made the call: its signature over the public address and the form fields matches.
 * @param urls the addresses under which the same endpoint may be known to the provider
 */
export function isSignedByProvider(
	authToken: string,
	signature: string,
	{ urls, fields }: { readonly urls: readonly string[]; readonly fields: Readonly<Record<string, string>> }
): boolean {
	return urls.some((url) => twilio.validateRequest(authToken, signature, url, fields));
}
