import { and, desc, eq, gte, inArray, lt, lte, or, type SQL } from 'drizzle-orm';
import type { Reader } from '../db/client';
import { followUps } from '../db/schema/follow-up';
import { newborns } from '../db/schema/newborn';
import { accessRecords, staff } from '../db/schema/staff';

export interface AccessFilter {
	readonly organisationId: string;
	readonly staffId?: string;
	/** Exactly as written in the record. */
	readonly recordNumber?: string;
	readonly from?: Date;
	readonly until?: Date;
	/** Only follow-ups of these clinics; absent means every line, also those about no newborn. */
	readonly clinicIds?: readonly string[];
	/** The line after which a page begins. */
	readonly before?: { readonly at: Date; readonly id: string };
}

export interface AccessLine {
	readonly id: string;
	readonly at: Date;
	readonly action: string;
	readonly detail: string | null;
	readonly staffId: string | null;
	readonly staffName: string | null;
	readonly followUpId: string | null;
	readonly recordNumber: string | null;
}

/** Lines of the record of access, newest first. */
export async function listAccess(db: Reader, filter: AccessFilter, limit: number): Promise<AccessLine[]> {
	const { before, clinicIds } = filter;
	const conditions: (SQL | undefined)[] = [
		eq(accessRecords.organisationId, filter.organisationId),
		filter.staffId ? eq(accessRecords.staffId, filter.staffId) : undefined,
		filter.recordNumber ? eq(newborns.recordNumber, filter.recordNumber) : undefined,
		filter.from ? gte(accessRecords.at, filter.from) : undefined,
		filter.until ? lte(accessRecords.at, filter.until) : undefined,
		clinicIds ? inArray(followUps.clinicId, [...clinicIds]) : undefined,
		before
			? or(
					lt(accessRecords.at, before.at),
					and(eq(accessRecords.at, before.at), lt(accessRecords.id, before.id))
				)
			: undefined
	];
	return db
		.select({
			id: accessRecords.id,
			at: accessRecords.at,
			action: accessRecords.action,
			detail: accessRecords.detail,
			staffId: accessRecords.staffId,
			staffName: staff.name,
			followUpId: accessRecords.followUpId,
			recordNumber: newborns.recordNumber
		})
		.from(accessRecords)
		.leftJoin(staff, eq(staff.id, accessRecords.staffId))
		.leftJoin(followUps, eq(followUps.id, accessRecords.followUpId))
		.leftJoin(newborns, eq(newborns.id, followUps.newbornId))
		.where(and(...conditions))
		.orderBy(desc(accessRecords.at), desc(accessRecords.id))
		.limit(limit);
}
