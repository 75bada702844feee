import { eq } from 'drizzle-orm';
import type { StaffActor } from '../../src/lib/domain/access/roles';
import { placesBetween, type PlaceTime } from '../../src/lib/domain/followup/places';
import type { VisitKind } from '../../src/lib/domain/followup/visit';
import type { Ctx } from '../../src/lib/server/context';
import { followUps } from '../../src/lib/server/db/schema/follow-up';
import type { AppError } from '../../src/lib/server/errors';
import { findPlaces } from '../../src/lib/server/repos/places';
import type { Result } from '../../src/lib/domain/result';

export const HOUR = 3_600_000;
export const hoursFrom = (instant: Date, hours: number) => new Date(instant.getTime() + hours * HOUR);

/** A clock that the demo moves through the past, so that every history is made by the product's own use cases. */
export interface DemoClock {
	now(): Date;
	set(instant: Date): void;
}

export function demoClock(start: Date): DemoClock {
	let current = start;
	return { now: () => current, set: (instant) => void (current = instant) };
}

export interface DemoSite {
	readonly id: string;
	readonly name: string;
}

/** What the stories work with. */
export interface Demo {
	readonly ctx: Ctx;
	readonly clock: DemoClock;
	readonly now: Date;
	readonly timeZone: string;
	readonly unit: DemoSite;
	readonly clinics: readonly [DemoSite, DemoSite];
	readonly nurse: StaffActor;
	/** By clinic id. */
	readonly desk: ReadonlyMap<string, StaffActor>;
	readonly pediatrician: ReadonlyMap<string, StaffActor>;
}

/** The value of a step that must succeed: the demo is wrong where the product refuses it. */
export function must<T>(result: Result<T, AppError>, what: string): T {
	if (result.ok) return result.value;
	throw new Error(`Demo, ${what}: ${JSON.stringify(result.error)}`);
}

export function staffOf(actors: ReadonlyMap<string, StaffActor>, clinicId: string): StaffActor {
	const actor = actors.get(clinicId);
	if (!actor) throw new Error(`No demo staff at ${clinicId}.`);
	return actor;
}

export async function clinicIdOf(demo: Demo, followUpId: string): Promise<string> {
	const [row] = await demo.ctx.db
		.select({ clinicId: followUps.clinicId })
		.from(followUps)
		.where(eq(followUps.id, followUpId));
	if (!row) throw new Error(`No follow-up ${followUpId}.`);
	return row.clinicId;
}

/** Free places of a kind at a clinic between two instants. */
export async function freePlaces(
	demo: Demo,
	asked: { clinicId: string; from: Date; until: Date; kind?: VisitKind }
): Promise<PlaceTime[]> {
	const places =
		(await findPlaces(demo.ctx.db, asked)) ??
		placesBetween({ ...asked, openings: [], closedDays: [], timeZone: demo.timeZone, taken: [] });
	return places.filter((place) => place.kind === (asked.kind ?? 'check') && place.freeNumbers.length > 0);
}
