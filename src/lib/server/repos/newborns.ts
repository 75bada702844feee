import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { carers, measurements, newborns, phototherapyCourses, weights } from '../db/schema/newborn';

export type NewbornRow = typeof newborns.$inferSelect;
export type CarerRow = typeof carers.$inferSelect;
export type MeasurementRow = typeof measurements.$inferSelect;
export type PhototherapyRow = typeof phototherapyCourses.$inferSelect;
export type WeightRow = typeof weights.$inferSelect;

/** Everything of a newborn that the guideline asks for, and the family; measurements that were struck are left out. */
export interface NewbornRecord {
	readonly newborn: NewbornRow;
	readonly carers: CarerRow[];
	readonly measurements: MeasurementRow[];
	readonly phototherapy: PhototherapyRow[];
	readonly weights: WeightRow[];
}

export async function findNewbornRecord(db: Reader, newbornId: string): Promise<NewbornRecord | null> {
	const [newborn] = await db.select().from(newborns).where(eq(newborns.id, newbornId));
	if (!newborn) return null;
	return {
		newborn,
		carers: await db
			.select()
			.from(carers)
			.where(eq(carers.newbornId, newbornId))
			.orderBy(asc(carers.callOrder)),
		measurements: await db
			.select()
			.from(measurements)
			.where(and(eq(measurements.newbornId, newbornId), eq(measurements.status, 'final')))
			.orderBy(asc(measurements.measuredAt)),
		phototherapy: await db
			.select()
			.from(phototherapyCourses)
			.where(eq(phototherapyCourses.newbornId, newbornId))
			.orderBy(asc(phototherapyCourses.startedAt)),
		weights: await db
			.select()
			.from(weights)
			.where(eq(weights.newbornId, newbornId))
			.orderBy(asc(weights.weighedAt))
	};
}

/** The course of phototherapy that is still running, if any. */
export async function findRunningPhototherapy(
	db: Reader,
	newbornId: string
): Promise<PhototherapyRow | null> {
	const [course] = await db
		.select()
		.from(phototherapyCourses)
		.where(and(eq(phototherapyCourses.newbornId, newbornId), isNull(phototherapyCourses.endedAt)));
	return course ?? null;
}
