import { openTwilio } from '../../src/lib/server/providers/sms/twilio';
import { getConfig } from '../../src/lib/server/config';

/**
 * What there is to compare with: the same SDK, the same fake and the same number of calls at a time, and nothing else. On
 * the word `go` sends its count of messages and tells how long that took.
 */
const total = Number(process.env.BARE_COUNT);
const concurrency = Number(process.env.SEND_CONCURRENCY);
const { sms } = getConfig();
const port = openTwilio({ ...sms, timeoutMilliseconds: 30_000, connections: concurrency });

async function send(count: number): Promise<number> {
	let next = 0;
	const began = performance.now();
	const loops = Array.from({ length: concurrency }, async () => {
		while (next < count) {
			const index = next++;
			const outcome = await port.send({
				to: `+1202${2_000_000 + index}`,
				text: 'Your visit is on Tuesday at 10. (abcdef)',
				statusUrl: 'http://127.0.0.1:9/webhooks/sms/status?message=abcdefghijklmnop'
			});
			if (outcome.kind !== 'accepted') throw new Error(`the fake answered ${outcome.kind}`);
		}
	});
	await Promise.all(loops);
	return performance.now() - began;
}

await send(200);
process.on('message', (word) => {
	if (word !== 'go') return;
	void send(total).then((milliseconds) => {
		process.send?.({ milliseconds });
		port.close();
		process.disconnect();
	});
});
process.send?.('ready');
