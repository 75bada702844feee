import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import { answerControl } from './control';
import { sendText } from './http';
import { Reports } from './reports';
import type { FakesSettings } from './settings';
import { answerSmsApi } from './sms-api';
import { openFakeSmtp } from './smtp';
import { Store } from './store';
import { answerTelephones } from './telephones/routes';
import { Troubles } from './troubles';

export interface Fakes {
	readonly url: string;
	readonly smtpPort: number;
	readonly store: Store;
	readonly troubles: Troubles;
	readonly reports: Reports;
	readonly close: () => Promise<void>;
}

/** Starts the fake SMS service, the fake mail service and the parents' telephones. */
export async function startFakes(settings: FakesSettings): Promise<Fakes> {
	const store = new Store(settings.journal);
	const troubles = new Troubles();
	const reports = new Reports(settings, store);
	const parts = { settings, store, troubles, reports };
	const smtp = openFakeSmtp(settings, store, troubles);
	const server = createServer({ keepAliveTimeout: 60_000 }, (request, response) => {
		answer(request, response).catch((error: unknown) => {
			console.error(error);
			if (!response.headersSent)
				sendText(response, 500, 'text/plain; charset=utf-8', 'The fake failed; see its log.');
		});
	});

	async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
		const url = new URL(request.url ?? '/', 'http://fakes.invalid');
		const call = { request, response, url };
		if (await answerSmsApi(parts, call)) return;
		if (await answerControl(parts, call)) return;
		if (await answerTelephones(parts, call)) return;
		sendText(response, 404, 'text/plain; charset=utf-8', 'Nothing here.');
	}

	await smtp.listen();
	await new Promise<void>((resolve, reject) => {
		server.once('error', reject);
		server.listen(settings.port, settings.host, () => resolve());
	});
	reports.resume();
	const address = server.address();
	const port = address === null || typeof address === 'string' ? settings.port : address.port;
	return {
		url: `http://127.0.0.1:${port}`,
		smtpPort: smtp.port,
		store,
		troubles,
		reports,
		close: async () => {
			reports.close();
			server.closeAllConnections();
			await new Promise((resolve) => server.close(resolve));
			await smtp.close();
			await store.close();
		}
	};
}
