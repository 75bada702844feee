import type { Ctx } from '../src/lib/server/context';
import { climbOverdue } from '../src/lib/server/services/climb';
import { deriveAll } from '../src/lib/server/services/derive';
import { fallBack } from '../src/lib/server/services/fallback';
import { raiseLadderSteps } from '../src/lib/server/services/ladder';
import { handleWaitingEvents } from '../src/lib/server/services/provider-events';
import { watch } from '../src/lib/server/services/watch';
import type { TimedTick } from './periodic';

/** What time alone brings about, beside the sending itself. */
export const serviceTicks = (ctx: Ctx): TimedTick[] => [
	{ name: 'derive', at: '0 */15 * * * *', everySeconds: 900, run: () => deriveAll(ctx) },
	{ name: 'events', at: '*/15 * * * * *', everySeconds: 15, run: () => handleWaitingEvents(ctx) },
	{ name: 'fallback', at: '5,35 * * * * *', everySeconds: 30, run: () => fallBack(ctx) },
	{
		name: 'escalate',
		at: '10,40 * * * * *',
		everySeconds: 30,
		run: async () => {
			await climbOverdue(ctx);
			await raiseLadderSteps(ctx);
		}
	},
	{ name: 'watch', at: '20 * * * * *', everySeconds: 60, run: () => watch(ctx) }
];
