import type { Decision } from '../../src/lib/domain/followup/transition';
import type { Outcome } from '../../src/lib/domain/followup/states';
import { closeFollowUp, decide, endTreatment } from '../../src/lib/server/services/decisions';
import { clinicIdOf, hoursFrom, must, staffOf, type Demo } from './context';
import type { Underway } from './stories';

/** The pediatrician decides at the given instant. */
export async function pediatricianDecides(
	demo: Demo,
	under: Underway,
	asked: { at: Date; decision: Decision; reason?: string }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = staffOf(demo.pediatrician, await clinicIdOf(demo, under.followUpId));
	const { decision, reason = 'Examined: feeding well, no other sign.' } = asked;
	must(
		await decide(demo.ctx, actor, { followUpId: under.followUpId, decision, reason }),
		`decide ${under.newborn.family}`
	);
}

export async function pediatricianEndsTreatment(demo: Demo, under: Underway, at: Date): Promise<void> {
	demo.clock.set(hoursFrom(at, 0.1));
	const actor = staffOf(demo.pediatrician, await clinicIdOf(demo, under.followUpId));
	must(
		await endTreatment(demo.ctx, actor, { followUpId: under.followUpId, endedAt: at }),
		'end of treatment'
	);
}

export async function pediatricianCloses(
	demo: Demo,
	under: Underway,
	asked: { at: Date; outcome: Outcome; why: string }
): Promise<void> {
	demo.clock.set(asked.at);
	const actor = staffOf(demo.pediatrician, await clinicIdOf(demo, under.followUpId));
	const { outcome, why } = asked;
	must(
		await closeFollowUp(demo.ctx, actor, { followUpId: under.followUpId, outcome, why }),
		`close ${under.newborn.family}`
	);
}
