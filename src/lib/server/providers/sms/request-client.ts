import { Agent } from 'node:http';
import twilio from 'twilio';

/** The provider asks for a slower pace; the SDK's own error drops the header that says for how long. */
export class TooManyRequests extends Error {
	constructor(readonly retryAfterSeconds: number) {
		super('429');
	}
}

const LONGEST_WISH_SECONDS = 3600;
const UNSAID_WISH_SECONDS = 1;

type Client = InstanceType<typeof twilio.RequestClient>;
type RequestOptions<T> = Parameters<Client['request']>[0] & { data?: T };

/** The SDK's HTTP client with connections kept open also without TLS, as the local fake is reached. */
export class KeptOpenClient extends twilio.RequestClient {
	readonly #plainAgent: Agent;

	constructor({ timeout, connections }: { readonly timeout: number; readonly connections: number }) {
		super({ timeout, keepAlive: true, maxSockets: connections, maxTotalSockets: connections });
		this.#plainAgent = new Agent({ keepAlive: true, maxSockets: connections, maxFreeSockets: connections });
		this.axios.defaults.httpAgent = this.#plainAgent;
	}

	override async request<T>(options: RequestOptions<T>) {
		const response = await super.request<T>(options);
		if (response.statusCode === 429) throw new TooManyRequests(secondsOf(response.headers));
		return response;
	}

	close(): void {
		this.#plainAgent.destroy();
	}
}

function secondsOf(headers: unknown): number {
	if (typeof headers !== 'object' || headers === null || !('retry-after' in headers))
		return UNSAID_WISH_SECONDS;
	const seconds = Number(headers['retry-after']);
	return Number.isFinite(seconds)
		? Math.min(Math.max(seconds, 0), LONGEST_WISH_SECONDS)
		: UNSAID_WISH_SECONDS;
}
