import type { Ctx } from '../context';
import type { Reader } from '../db/client';
import { accessRecords } from '../db/schema/staff';
import type { AccessAction } from './actions';

export interface AccessEntry {
	readonly organisationId: string;
	/** Absent for a stranger at the sign-in page and for programs. */
	readonly staffId?: string | null;
	readonly action: AccessAction;
	readonly followUpId?: string | null;
	/** What was touched, in few words; no names and no telephone numbers of families. */
	readonly detail?: string | null;
}

/**
 * Adds one line to the record of access: insert only. A change passes its own transaction, so that the change and
 * its line are kept together or not at all; a look passes the database.
 */
export async function recordAccess(
	to: Reader,
	ctx: Pick<Ctx, 'clock' | 'random'>,
	entry: AccessEntry
): Promise<void> {
	await to.insert(accessRecords).values({
		id: ctx.random.id(),
		organisationId: entry.organisationId,
		staffId: entry.staffId ?? null,
		action: entry.action,
		followUpId: entry.followUpId ?? null,
		detail: entry.detail?.slice(0, 400) ?? null,
		at: ctx.clock.now()
	});
}
