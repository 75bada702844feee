import { eq } from 'drizzle-orm';
import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { PlaceTime } from '../../domain/followup/places';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import { sites } from '../db/schema/organisation';
import { notFound, type AppError } from '../errors';
import { findPlaces } from '../repos/places';

/** The places of a clinic between two instants, for whoever books there: its own staff, or a nurse of the organisation. */
export async function listPlaces(
	ctx: Ctx,
	actor: StaffActor,
	asked: { readonly clinicId: string; readonly from: Date; readonly until: Date }
): Promise<Result<PlaceTime[], AppError>> {
	const [clinic] = await ctx.db
		.select({ organisationId: sites.organisationId, kind: sites.kind })
		.from(sites)
		.where(eq(sites.id, asked.clinicId));
	if (!clinic || clinic.kind !== 'clinic' || clinic.organisationId !== actor.organisationId)
		return err(notFound);
	const isOwn = can(actor, 'calendar.view', {
		organisationId: clinic.organisationId,
		clinicId: asked.clinicId
	});
	// A birth unit discharges to every clinic of its organisation, so its nurses see the free places of all of them.
	const isDischarging = actor.roles.some(({ role }) => role === 'nurse');
	if (!isOwn && !isDischarging) return err(notFound);
	const places = await findPlaces(ctx.db, asked);
	return places ? ok(places) : err(notFound);
}
