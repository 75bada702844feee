import type { StaffActor } from '../../domain/access/roles';
import type { SitePolicy } from '../../domain/followup/policy';
import { standardOf } from '../../domain/guideline/registry';
import { STANDARD_IDS, type StandardId } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { withTx } from '../db/tx';
import { invalid, notFound, type AppError } from '../errors';
import { findOrganisation, findSite, listSites, lockSite, updateSite, updateStandard } from '../repos/sites';
import { listRoles, listStaff } from '../repos/staff';

/** The standards an organisation can put in force. */

export interface PolicyScreen {
	readonly inForce: StandardId;
	readonly standards: readonly {
		readonly id: StandardId;
		readonly title: string;
		readonly edition: string;
	}[];
	readonly sites: readonly {
		readonly id: string;
		readonly name: string;
		readonly kind: 'birth-unit' | 'clinic';
		readonly policy: SitePolicy;
		/** Active people with a role at the site, who can be its duty persons. */
		readonly people: readonly { readonly id: string; readonly name: string }[];
	}[];
}

/** The guideline in force and every site's policy. */
export async function getPolicyScreen(ctx: Ctx, actor: StaffActor): Promise<PolicyScreen> {
	const { organisationId } = actor;
	const [organisation, sites, people, roles] = await Promise.all([
		findOrganisation(ctx.db, organisationId),
		listSites(ctx.db, organisationId),
		listStaff(ctx.db, organisationId),
		listRoles(ctx.db, organisationId)
	]);
	if (organisation === null) throw new Error('A signed-in person has no organisation.');
	return {
		inForce: organisation.standard,
		standards: STANDARD_IDS.map((id) => {
			const { title, edition } = standardOf(id);
			return { id, title, edition };
		}),
		sites: sites.map(({ id, name, kind, policy }) => ({
			id,
			name,
			kind,
			policy,
			people: people
				.filter((person) => !person.isDisabled)
				.filter((person) => roles.some(({ staffId, siteId }) => staffId === person.id && siteId === id))
				.map((person) => ({ id: person.id, name: person.name }))
		}))
	};
}

/** Puts a guideline in force for new assessments; those already made keep the one that made them. */
export async function setStandard(ctx: Ctx, actor: StaffActor, standard: StandardId): Promise<void> {
	await withTx(ctx.db, async (tx) => {
		await updateStandard(tx, actor.organisationId, standard);
		await recordAccess(tx, ctx, {
			organisationId: actor.organisationId,
			staffId: actor.staffId,
			action: 'standard.changed',
			detail: standard
		});
	});
}

/** Saves a site's policy; it holds for every due time set from now on. */
export async function savePolicy(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, policy }: { readonly siteId: string; readonly policy: SitePolicy }
): Promise<Result<void, AppError>> {
	const { organisationId, staffId } = actor;
	const site = await findSite(ctx.db, organisationId, siteId);
	if (site === null) return err(notFound);
	const roles = await listRoles(ctx.db, organisationId);
	const isFromHere = (id: string) => roles.some((role) => role.staffId === id && role.siteId === siteId);
	if (!policy.dutyStaffIds.every(isFromHere)) {
		return err(invalid('A duty person has to have a role at this site.', 'firstDuty'));
	}
	return withTx(ctx.db, async (tx) => {
		const locked = await lockSite(tx, organisationId, siteId);
		if (locked === null) return err(notFound);
		await updateSite(tx, siteId, { policy });
		const detail = `${siteId}: ${changedKeys(locked.policy, policy).join(', ') || 'nothing'}`;
		await recordAccess(tx, ctx, { organisationId, staffId, action: 'policy.changed', detail });
		return ok(undefined);
	});
}

/** The names of the values that differ. */
function changedKeys(before: SitePolicy, after: SitePolicy): string[] {
	const old = new Map<string, unknown>(Object.entries(before));
	return Object.entries(after)
		.filter(([key, value]) => JSON.stringify(value) !== JSON.stringify(old.get(key)))
		.map(([key]) => key);
}
