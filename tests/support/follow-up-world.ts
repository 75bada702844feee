import { and, eq } from 'drizzle-orm';
import { assert } from 'vitest';
import type { Result } from '../../src/lib/domain/result';
import type { Ctx } from '../../src/lib/server/context';
import { parentLinks } from '../../src/lib/server/db/schema/follow-up';
import type { AppError } from '../../src/lib/server/errors';
import { findFollowUp } from '../../src/lib/server/repos/follow-ups';
import { findPlaces } from '../../src/lib/server/repos/places';
import { enterDischarge } from '../../src/lib/server/services/discharges';
import { installDefaultWording } from '../../src/lib/server/services/wording';
import { withTx } from '../../src/lib/server/db/tx';
import { fixedClock, testContext } from './context';
import type { TestDatabase } from './database';
import { makeDischargeFacts } from './factories/discharge';
import { makeHospital } from './factories/hospital';

/** Monday 2 March 2026, 09:00 in Chicago. */
export const MONDAY = new Date('2026-03-02T15:00:00.000Z');

/** The value of a step that a test takes for granted. */
export function must<T>(result: Result<T, AppError>): T {
	assert(result.ok, result.ok ? '' : JSON.stringify(result.error));
	return result.value;
}

/** A small hospital on a Monday morning, and the ways in which a test moves a follow-up along. */
export async function openWorld(database: TestDatabase) {
	const clock = fixedClock(MONDAY);
	const ctx: Ctx = testContext(database, clock);
	const hospital = await makeHospital(database.db);
	await withTx(ctx.db, (tx) => installDefaultWording(tx, ctx, hospital.organisationId));
	const { east } = hospital;

	const enter = async (set: Partial<Parameters<typeof makeDischargeFacts>[1]> = {}) => {
		const facts = makeDischargeFacts(clock.now(), { clinicId: east.clinicId, ...set });
		return must(await enterDischarge(ctx, east.nurse.actor, { birthSiteId: east.birthSiteId, facts }))
			.followUpId;
	};
	const state = async (followUpId: string) => {
		const loaded = await findFollowUp(ctx.db, followUpId);
		assert(loaded, 'the follow-up is on record');
		return loaded;
	};
	const firstPlace = async (followUpId: string) => {
		const { window } = (await state(followUpId)).state;
		const from = window?.from ?? clock.now();
		const until = window?.until ?? new Date(from.getTime() + 48 * 3_600_000);
		const places = await findPlaces(ctx.db, { clinicId: east.clinicId, from, until });
		const free = places?.find((place) => place.freeNumbers.length > 0 && place.startsAt > clock.now());
		assert(free, 'the clinic has a place in the window');
		return { startsAt: free.startsAt, kind: free.kind };
	};
	const carer = async (followUpId: string) => {
		const [link] = await ctx.db
			.select()
			.from(parentLinks)
			.where(and(eq(parentLinks.followUpId, followUpId)));
		assert(link, 'the family has a link');
		return { kind: 'carer' as const, carerId: link.carerId, followUpId };
	};
	return { ctx, clock, hospital, east, enter, state, firstPlace, carer };
}

export type World = Awaited<ReturnType<typeof openWorld>>;
