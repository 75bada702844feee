import { performance } from 'node:perf_hooks';
import type { CallOutcome } from '../providers/call';
import type { Held, Outbox } from './port';

/** One call and what came of it. */
export interface Called {
	readonly held: Held;
	readonly outcome: CallOutcome;
	readonly milliseconds: number;
}

/** Makes the call of one held message. Never throws, and ends soon after the call time-out whatever the SDK does. */
export async function makeCall(outbox: Outbox, held: Held): Promise<Called> {
	const began = performance.now();
	const outcome = await inTime(send(outbox, held), (outbox.settings.callSeconds + 1) * 1000);
	return { held, outcome, milliseconds: performance.now() - began };
}

async function send({ providers, statusUrl }: Outbox, { row, content }: Held): Promise<CallOutcome> {
	const { to, text, subject, html, attachments, reference } = content;
	try {
		return row.channel === 'sms'
			? await providers.sms.send({ to, text, statusUrl: statusUrl(row.id) })
			: await providers.mail.send({
					to,
					text,
					html,
					attachments,
					subject: subject ?? '',
					messageId: reference
				});
	} catch (error) {
		// A port should not throw; when it does, the message may be on its way.
		return { kind: 'unknown', reason: error instanceof Error ? error.name : 'error' };
	}
}

function inTime(call: Promise<CallOutcome>, milliseconds: number): Promise<CallOutcome> {
	let timer: NodeJS.Timeout | undefined;
	const late = new Promise<CallOutcome>((resolve) => {
		timer = setTimeout(() => resolve({ kind: 'unknown', reason: 'no answer in time' }), milliseconds);
	});
	return Promise.race([call, late]).finally(() => clearTimeout(timer));
}
