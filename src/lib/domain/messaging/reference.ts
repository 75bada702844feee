/**
 * A message's own mark in its text, by which a provider's list of sent messages is searched when an answer was lost.
 * Six characters of the random id: unique enough beside recipient and time. Example: `k7f2q9`.
 */
export const smsReferenceOf = (messageId: string): string => messageId.slice(0, 6);

/** How the mark stands at the end of a text: unobtrusive, and the same for the writer and the searcher. */
export const smsReferenceSuffix = (messageId: string): string => ` (${smsReferenceOf(messageId)})`;

/** The Message-ID header of a mail: always the same for one message, so that a repeat can be recognised. */
export function mailReferenceOf(messageId: string, mailFrom: string): string {
	const domain = /@([^\s>]+)/.exec(mailFrom)?.[1] ?? 'localhost';
	return `<${messageId}@${domain}>`;
}
