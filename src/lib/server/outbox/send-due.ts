import { CHANNELS } from '../../domain/messaging/kinds';
import { Lane } from './lane';
import type { Outbox } from './port';

/** Sends all that is due now, in this process, and returns how many messages were looked at. Workers do the same for ever. */
export async function sendDue(outbox: Outbox): Promise<number> {
	const counts = await Promise.all(CHANNELS.map((channel) => new Lane(outbox, channel).drain()));
	return counts.reduce((sum, count) => sum + count, 0);
}
