import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { err, ok } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { notFound } from '../errors';
import { findDischargePage, findOrganisationRules, listDischargeParts } from '../repos/discharge-pages';
import { findNewbornRecord } from '../repos/newborns';
import { listLinks } from '../repos/parent-links';
import { assessRecord, lastLeftAt } from './assessment';
import { windowOf } from './discharge-list';
import { dischargeResource, factsOf } from './discharge-view';
import { isLinkAlive, linkUrl } from './parent-links';
import { qrPicture } from './qr';

/**
 * What the family takes home on paper: visit, numbers, their own link; and, for the clinician who sees the newborn
 * next, the values with cautions and reasons, reckoned as the follow-up's own window was.
 * Links exist from the hand-over on; a sheet printed before it carries none. Opening the sheet is recorded.
 * @returns not found also where it is of other sites, and for those who may not see the values
 */
export async function getDischargeSheet(ctx: Ctx, actor: StaffActor, followUpId: string) {
	const page = await findDischargePage(ctx.db, followUpId);
	if (!page || !can(actor, 'values.view', dischargeResource(page))) return err(notFound);
	const record = await findNewbornRecord(ctx.db, page.newborn.id);
	const rules = await findOrganisationRules(ctx.db, page.newborn.organisationId);
	if (!record || !rules) return err(notFound);
	const now = ctx.clock.now();
	const { followUp } = page;
	const { visits } = await listDischargeParts(ctx.db, [page]);
	const links = (await listLinks(ctx.db, [followUpId])).filter((link) => isLinkAlive(link, now));
	const assessed = assessRecord(record, {
		standard: followUp.standard,
		dischargeAt: lastLeftAt(followUp, record),
		now
	});
	await recordAccess(ctx.db, ctx, {
		organisationId: page.newborn.organisationId,
		staffId: actor.staffId,
		action: 'sheet.viewed',
		followUpId
	});
	return ok({
		followUpId,
		now,
		facts: factsOf(page, record),
		unit: page.unit,
		clinic: page.clinic,
		emergencyNumber: rules.emergencyNumber,
		organisationName: rules.name,
		handedOverAt: followUp.handedOverAt,
		window: windowOf(page),
		visit: visits.find(({ isOpen }) => isOpen === true) ?? null,
		assessment: assessed.ok ? assessed.value : null,
		refusals: assessed.ok ? [] : assessed.error,
		families: record.carers.map((carer) => {
			const link = links.find(({ carerId }) => carerId === carer.id);
			const url = link ? linkUrl(ctx, link.id) : null;
			return {
				carerId: carer.id,
				name: carer.name,
				language: carer.language,
				url,
				qr: url ? qrPicture(url) : null
			};
		})
	});
}
