import { mayEver, sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { actionWords } from '../audit/actions';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { listAccess, type AccessFilter, type AccessLine } from '../repos/access-records';
import { listStaff } from '../repos/staff';

export const PAGE_LENGTH = 50;

export interface AccessQuestion {
	readonly staffId?: string;
	readonly recordNumber?: string;
	readonly from?: Date;
	readonly until?: Date;
	/** From `AccessPage.next`. */
	readonly cursor?: string;
}

export interface AccessPage {
	readonly lines: readonly (AccessLine & { readonly words: string })[];
	/** Opens the next, older page; null at the end. */
	readonly next: string | null;
	readonly people: readonly { readonly id: string; readonly name: string }[];
	/** False where only the own clinic's newborns are shown. */
	readonly isWhole: boolean;
}

/**
 * The record of access: all of it for an administrator, for a pediatrician the lines about newborns of the own clinic.
 * Looking is itself recorded.
 */
export async function readAccessLog(ctx: Ctx, actor: StaffActor, asked: AccessQuestion): Promise<AccessPage> {
	const isWhole = mayEver(actor, 'access-record.view-all');
	const filter: AccessFilter = {
		organisationId: actor.organisationId,
		staffId: asked.staffId,
		recordNumber: asked.recordNumber,
		from: asked.from,
		until: asked.until,
		before: readCursor(asked.cursor),
		...(isWhole ? {} : { clinicIds: sitesWhere(actor, 'access-record.view-own') })
	};
	const found = await listAccess(ctx.db, filter, PAGE_LENGTH + 1);
	const lines = found.slice(0, PAGE_LENGTH);
	const last = found.length > PAGE_LENGTH ? lines.at(-1) : undefined;
	const people = await listStaff(ctx.db, actor.organisationId);
	await recordAccess(ctx.db, ctx, {
		organisationId: actor.organisationId,
		staffId: actor.staffId,
		action: 'access-record.viewed'
	});
	return {
		lines: lines.map((line) => ({ ...line, words: actionWords(line.action) })),
		next: last === undefined ? null : `${last.at.getTime()}-${last.id}`,
		people: people.map(({ id, name }) => ({ id, name })),
		isWhole
	};
}

function readCursor(cursor: string | undefined): AccessFilter['before'] {
	const [, at, id] = /^(\d{1,15})-([a-z0-9]{1,16})$/.exec(cursor ?? '') ?? [];
	return at === undefined || id === undefined ? undefined : { at: new Date(Number(at)), id };
}
