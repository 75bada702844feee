import type { IncomingMessage, ServerResponse } from 'node:http';
import { readBody, sendJson } from './http';
import type { Store } from './store';
import { troubleOrder, type Troubles } from './troubles';

export interface ControlParts {
	readonly store: Store;
	readonly troubles: Troubles;
}

/**
 * What tests and a person trying the product ask of the fakes; no hosted service has it.
 * - `POST /control/troubles` orders a failure (see troubles.ts), `GET` shows what is open, `DELETE` forgets it.
 * - `GET /control/sms[?to=]` and `GET /control/mail[?messageId=]` list what was taken, oldest first.
 * - `GET /mail/sent?messageId=` is the sent list that MAIL_SENT_LIST_URL may point to.
 * - `POST /control/reset` forgets everything.
 * Returns false for any other path.
 */
export async function answerControl(
	{ store, troubles }: ControlParts,
	{ request, response, url }: { request: IncomingMessage; response: ServerResponse; url: URL }
): Promise<boolean> {
	const wanted = (name: string) => url.searchParams.get(name);
	switch (`${request.method} ${url.pathname}`) {
		case 'POST /control/troubles':
			await order(troubles, request, response);
			return true;
		case 'GET /control/troubles':
			sendJson(response, 200, troubles.open);
			return true;
		case 'DELETE /control/troubles':
			troubles.clear();
			sendJson(response, 200, []);
			return true;
		case 'GET /control/sms': {
			const to = wanted('to');
			sendJson(response, 200, [...(to === null ? store.smses : store.smsesOf(to))]);
			return true;
		}
		case 'GET /control/mail':
		case 'GET /mail/sent': {
			const id = wanted('messageId');
			const found = store.mails.filter(({ messageId }) => id === null || messageId === id);
			const sent = found.map(({ messageId, to, at }) => ({ messageId, to, at }));
			sendJson(response, 200, url.pathname === '/mail/sent' ? { sent } : found);
			return true;
		}
		case 'POST /control/reset':
			store.clear();
			troubles.clear();
			sendJson(response, 200, {});
			return true;
		default:
			return false;
	}
}

async function order(troubles: Troubles, request: IncomingMessage, response: ServerResponse): Promise<void> {
	const parsed = troubleOrder.safeParse(readJson(await readBody(request)));
	if (!parsed.success) return sendJson(response, 400, { issues: parsed.error.issues });
	troubles.order(parsed.data);
	sendJson(response, 201, parsed.data);
}

function readJson(text: string): unknown {
	try {
		return JSON.parse(text);
	} catch {
		return undefined;
	}
}
