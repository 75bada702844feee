import type { Ctx } from '../src/lib/server/context';
import { climbOverdue } from '../src/lib/server/services/climb';
import { raiseLadderSteps } from '../src/lib/server/services/ladder';
import type { TimedTick } from './periodic';

/** What time alone brings about, beside the sending itself. */
export const serviceTicks = (ctx: Ctx): TimedTick[] => [
	{
		name: 'escalate',
		at: '*/30 * * * * *',
		everySeconds: 30,
		run: async () => {
			await climbOverdue(ctx);
			await raiseLadderSteps(ctx);
		}
	}
];
