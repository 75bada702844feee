import { CHANNELS } from '../src/lib/domain/messaging/kinds';
import { Lane } from '../src/lib/server/outbox/lane';
import type { Outbox } from '../src/lib/server/outbox/port';
import { reconcileUnknown } from '../src/lib/server/outbox/reconcile';
import { rescueAbandoned } from '../src/lib/server/outbox/rescue';

/** The sending part of a worker: one lane for each channel, and the care for what other workers left behind. */
export interface SendingLoop {
	/** Due messages are looked for now, and not only at the next tick. */
	poke(): void;
	/** Frees what dead workers held and asks providers about lost answers. */
	lookAfterOthers(): Promise<void>;
	/** Takes nothing new, gives back what was not begun, and ends when calls under way are recorded. */
	stop(): Promise<void>;
}

export function startSending(outbox: Outbox): SendingLoop {
	const lanes = CHANNELS.map((channel) => new Lane(outbox, channel));
	const served = Promise.all(lanes.map((lane) => lane.serve()));
	let care: Promise<void> | null = null;
	return {
		poke: () => lanes.forEach((lane) => lane.poke()),
		lookAfterOthers: () => (care ??= lookAfter(outbox).finally(() => (care = null))),
		stop: async () => {
			lanes.forEach((lane) => lane.stop());
			await served;
			await care;
		}
	};
}

async function lookAfter(outbox: Outbox): Promise<void> {
	const freed = await rescueAbandoned(outbox);
	if (freed > 0) outbox.ctx.log.warn({ freed }, 'messages of a worker that stopped were freed');
	while ((await reconcileUnknown(outbox)) > 0);
}
