import { and, desc, eq, inArray, like, or, type SQL } from 'drizzle-orm';
import { sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { Ctx } from '../context';
import { followUps } from '../db/schema/follow-up';
import { carers, newborns } from '../db/schema/newborn';

export interface FoundFollowUp {
	readonly followUpId: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly recordNumber: string;
	readonly bornOn: string;
	readonly stage: string;
}

const escapeLike = (text: string) => text.replace(/[\\%_]/g, (c) => `\\${c}`);

function matching(words: string): SQL | undefined {
	const start = `${escapeLike(words)}%`;
	const digits = words.replace(/\D/g, '');
	const isDate = /^\d{4}-\d{2}-\d{2}$/.test(words);
	return or(
		like(newborns.familyName, start),
		like(newborns.givenName, start),
		eq(newborns.recordNumber, words),
		isDate ? eq(newborns.bornOn, words) : undefined,
		digits.length >= 7 && !isDate ? like(carers.phone, `%${digits}`) : undefined
	);
}

/** Newborns by name, date of birth (YYYY-MM-DD), telephone or record number, among the actor's own sites; newest first, at most 30. */
export async function searchFollowUps(ctx: Ctx, actor: StaffActor, words: string): Promise<FoundFollowUp[]> {
	const asked = words.trim();
	if (asked.length < 2) return [];
	const sites = [
		...new Set([...sitesWhere(actor, 'follow-up.view'), ...sitesWhere(actor, 'discharge.view')])
	];
	if (sites.length === 0) return [];
	const rows = await ctx.db
		.selectDistinct({
			followUpId: followUps.id,
			familyName: newborns.familyName,
			givenName: newborns.givenName,
			recordNumber: newborns.recordNumber,
			bornOn: newborns.bornOn,
			stage: followUps.stage,
			createdAt: followUps.createdAt
		})
		.from(followUps)
		.innerJoin(newborns, eq(newborns.id, followUps.newbornId))
		.leftJoin(carers, eq(carers.newbornId, newborns.id))
		.where(
			and(
				eq(newborns.organisationId, actor.organisationId),
				or(inArray(followUps.birthSiteId, sites), inArray(followUps.clinicId, sites)),
				matching(asked)
			)
		)
		.orderBy(desc(followUps.createdAt))
		.limit(30);
	return rows.map(({ createdAt: _createdAt, ...found }) => found);
}
