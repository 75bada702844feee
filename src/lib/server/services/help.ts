import type { StaffActor } from '../../domain/access/roles';
import type { Ctx } from '../context';
import { findOrganisation, listSites } from '../repos/sites';

export interface HelpNumbers {
	readonly organisationName: string;
	readonly emergencyNumber: string;
	/** The reader's own sites first. */
	readonly sites: readonly {
		readonly id: string;
		readonly name: string;
		readonly address: string;
		readonly phone: string;
		readonly afterHoursPhone: string;
		readonly isOwn: boolean;
	}[];
}

/** The numbers that help names: the organisation's emergency number, and each site's by day and after hours. */
export async function getHelp(ctx: Ctx, actor: StaffActor): Promise<HelpNumbers> {
	const organisation = await findOrganisation(ctx.db, actor.organisationId);
	const own = new Set(actor.roles.map(({ siteId }) => siteId));
	const sites = await listSites(ctx.db, actor.organisationId);
	const shown = sites.map(({ id, name, address, phone, afterHoursPhone }) => ({
		id,
		name,
		address,
		phone,
		afterHoursPhone,
		isOwn: own.has(id)
	}));
	return {
		organisationName: organisation?.name ?? '',
		emergencyNumber: organisation?.emergencyNumber ?? '',
		sites: shown.sort((a, b) => Number(b.isOwn) - Number(a.isOwn))
	};
}
