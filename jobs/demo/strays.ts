import { receiveEvent } from '../../src/lib/server/services/provider-events';
import { hoursFrom, type Demo } from './context';

/** From the range kept for fiction; no family of the demo has these. */
const TEXTS = [
	{
		hoursAgo: 0.7,
		from: '+12025550163',
		body: 'Hi, this is Rosa, the grandmother. Can they come an hour later tomorrow? The bus is on strike.'
	},
	{
		hoursAgo: 0.05,
		from: '+12025550158',
		body: 'our baby is so sleepy and will not wake up to feed what do we do'
	}
] as const;

/** Two texts from telephones that are on no record: one that can wait, one that cannot. */
export async function wroteFromOtherTelephones(demo: Demo): Promise<void> {
	for (const [index, { hoursAgo, from, body }] of TEXTS.entries()) {
		demo.clock.set(hoursFrom(demo.now, -hoursAgo));
		const sid = `SM${String(index).padStart(32, '0')}`;
		await receiveEvent(demo.ctx, { kind: 'inbound', eventKey: sid, payload: { sid, from, body } });
	}
}
