import { z } from 'zod';
import { type Lookup, shortReason } from '../call';

const answer = z.object({ sent: z.array(z.object({ messageId: z.string() })) });

/**
 * Asks an HTTP list of sent mail: `GET <url>?messageId=<id>` answers `{ "sent": [{ "messageId": "<id>" }] }`, empty when the
 * host took no such mail. The local fake has one; before a hosted mail service it is a small adapter to that service's log.
 */
export async function findInSentList(
	url: string | undefined,
	messageId: string,
	timeoutMilliseconds: number
): Promise<Lookup> {
	if (url === undefined) return { kind: 'no-list' };
	try {
		const target = new URL(url);
		target.searchParams.set('messageId', messageId);
		const response = await fetch(target, { signal: AbortSignal.timeout(timeoutMilliseconds) });
		if (!response.ok) return { kind: 'unavailable', reason: `HTTP ${response.status}` };
		const { sent } = answer.parse(await response.json());
		const found = sent.some((entry) => entry.messageId === messageId);
		return found ? { kind: 'found', providerId: messageId, status: null } : { kind: 'absent' };
	} catch (error) {
		return { kind: 'unavailable', reason: shortReason(error) };
	}
}
