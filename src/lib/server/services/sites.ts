import { DateTime } from 'luxon';
import { can, type Resource } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { dayBounds, isInOpening, overlaps } from '../../domain/followup/openings';
import type { Opening } from '../../domain/followup/places';
import { DEFAULT_POLICY } from '../../domain/followup/policy';
import { err, ok, type Result } from '../../domain/result';
import type { AccessAction } from '../audit/actions';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { isDuplicate, withTx } from '../db/tx';
import { conflict, invalid, notFound, type AppError } from '../errors';
import {
	deleteClosedDay,
	findSite,
	insertClosedDay,
	insertOpening,
	insertSite,
	listClosedDays,
	listComingVisits,
	listOpenings,
	listSites as listSitesOf,
	lockSite,
	retireOpening,
	updateSite,
	type ClosedDay,
	type OpeningRow,
	type Site
} from '../repos/sites';

export type SiteFields = Pick<
	Site,
	'name' | 'address' | 'phone' | 'afterHoursPhone' | 'dutyEmail' | 'timeZone'
>;

/** A site as the access table sees it. */
export const siteResource = ({
	organisationId,
	kind,
	id
}: Pick<Site, 'organisationId' | 'kind' | 'id'>): Resource =>
	kind === 'clinic' ? { organisationId, clinicId: id } : { organisationId, birthSiteId: id };

/** Every site of the actor's organisation, birth units first. */
export const listSites = (ctx: Ctx, actor: StaffActor): Promise<Site[]> =>
	listSitesOf(ctx.db, actor.organisationId);

/** The sites whose openings the actor may edit: all for an administrator, the own clinic for its desk. */
export async function listEditableSites(ctx: Ctx, actor: StaffActor): Promise<Site[]> {
	const sites = await listSites(ctx, actor);
	return sites.filter((site) => can(actor, 'openings.edit', siteResource(site)));
}

export interface SiteScreen {
	readonly site: Site;
	readonly canChangeSite: boolean;
	readonly openings: readonly (OpeningRow & { readonly standing: number })[];
	/** From today on. */
	readonly closedDays: readonly (ClosedDay & { readonly standing: number })[];
}

/** One site with its openings and closed days, and how many visits to come lie in each. */
export async function getSiteScreen(
	ctx: Ctx,
	actor: StaffActor,
	siteId: string
): Promise<Result<SiteScreen, AppError>> {
	const site = await findSite(ctx.db, actor.organisationId, siteId);
	if (site === null || !can(actor, 'openings.edit', siteResource(site))) return err(notFound);
	const now = ctx.clock.now();
	const [openings, closedDays, visits] = await Promise.all([
		listOpenings(ctx.db, siteId),
		listClosedDays(ctx.db, siteId, localToday(now, site.timeZone)),
		listComingVisits(ctx.db, siteId, now)
	]);
	return ok({
		site,
		canChangeSite: can(actor, 'sites.manage', siteResource(site)),
		openings: openings.map((opening) => ({
			...opening,
			standing: standingIn(opening, visits, site.timeZone)
		})),
		closedDays: closedDays.map((day) => {
			const { from, until } = dayBounds(day.closedOn, site.timeZone);
			return { ...day, standing: visits.filter((v) => v.startsAt >= from && v.startsAt <= until).length };
		})
	});
}

const localToday = (now: Date, timeZone: string): string =>
	DateTime.fromJSDate(now, { zone: timeZone }).toFormat('yyyy-MM-dd');

const standingIn = (
	opening: Opening,
	visits: readonly { readonly startsAt: Date; readonly kind: string }[],
	timeZone: string
): number =>
	visits.filter((v) => v.kind === opening.visitKind && isInOpening(opening, v.startsAt, timeZone)).length;

/** Adds a birth unit or clinic, with the default policy. */
export async function addSite(
	ctx: Ctx,
	actor: StaffActor,
	fields: SiteFields & { readonly kind: Site['kind'] }
): Promise<Result<string, AppError>> {
	const id = ctx.random.id();
	await withTx(ctx.db, async (tx) => {
		const { organisationId } = actor;
		await insertSite(tx, {
			id,
			organisationId,
			...fields,
			policy: DEFAULT_POLICY,
			createdAt: ctx.clock.now()
		});
		await recordAccess(tx, ctx, line(actor, 'site.added', id));
	});
	return ok(id);
}

/** Changes name, address, numbers and time zone. Visits already made keep their instant. */
export async function saveSite(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, fields }: { readonly siteId: string; readonly fields: SiteFields }
): Promise<Result<void, AppError>> {
	return changeSite(ctx, actor, siteId, async (tx, site) => {
		if (!can(actor, 'sites.manage', siteResource(site))) return err(notFound);
		await updateSite(tx, siteId, fields);
		await recordAccess(tx, ctx, line(actor, 'site.changed', siteId));
		return ok(undefined);
	});
}

/** Adds a weekly opening, unless it would offer the same place twice. */
export async function addOpening(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, opening }: { readonly siteId: string; readonly opening: Opening }
): Promise<Result<void, AppError>> {
	return changeSite(ctx, actor, siteId, async (tx, site) => {
		if (site.kind !== 'clinic') return err(conflict('Only a clinic has openings.'));
		const others = await listOpenings(tx, siteId);
		const clash = others.find((other) => overlaps(opening, other));
		if (clash) {
			const when = `${clash.from} to ${clash.until}`;
			return err(invalid(`This overlaps the opening for the same kind of visit from ${when}.`, 'from'));
		}
		await insertOpening(tx, { id: ctx.random.id(), siteId, ...opening });
		await recordAccess(tx, ctx, line(actor, 'opening.added', `${siteId}: ${describe(opening)}`));
		return ok(undefined);
	});
}

/** Takes an opening out of use. Visits already made in it stay; their number is told. */
export async function removeOpening(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, id }: { readonly siteId: string; readonly id: string }
): Promise<Result<{ readonly standing: number }, AppError>> {
	return changeSite(ctx, actor, siteId, async (tx, site) => {
		const opening = (await listOpenings(tx, siteId)).find((row) => row.id === id);
		if (opening === undefined) return err(notFound);
		const visits = await listComingVisits(tx, siteId, ctx.clock.now());
		const standing = standingIn(opening, visits, site.timeZone);
		await retireOpening(tx, id);
		const detail = `${siteId}: ${describe(opening)}; visits left standing: ${standing}`;
		await recordAccess(tx, ctx, line(actor, 'opening.removed', detail));
		return ok({ standing });
	});
}

/** Closes a clinic for a day. Visits already made on it stay; their number is told. */
export async function addClosedDay(
	ctx: Ctx,
	actor: StaffActor,
	{
		siteId,
		closedOn,
		reason
	}: { readonly siteId: string; readonly closedOn: string; readonly reason: string }
): Promise<Result<{ readonly standing: number }, AppError>> {
	try {
		return await changeSite(ctx, actor, siteId, async (tx, site) => {
			if (site.kind !== 'clinic') return err(conflict('Only a clinic has closed days.'));
			if (closedOn < localToday(ctx.clock.now(), site.timeZone)) {
				return err(invalid('This day is over.', 'closedOn'));
			}
			const { from, until } = dayBounds(closedOn, site.timeZone);
			const visits = await listComingVisits(tx, siteId, ctx.clock.now());
			const standing = visits.filter((v) => v.startsAt >= from && v.startsAt <= until).length;
			await insertClosedDay(tx, { id: ctx.random.id(), siteId, closedOn, reason });
			await recordAccess(tx, ctx, line(actor, 'closed-day.added', `${siteId}: ${closedOn}`));
			return ok({ standing });
		});
	} catch (error) {
		if (!isDuplicate(error)) throw error;
		return err(invalid('This day is already closed.', 'closedOn'));
	}
}

export async function removeClosedDay(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, id }: { readonly siteId: string; readonly id: string }
): Promise<Result<void, AppError>> {
	return changeSite(ctx, actor, siteId, async (tx) => {
		if (!(await deleteClosedDay(tx, siteId, id))) return err(notFound);
		await recordAccess(tx, ctx, line(actor, 'closed-day.removed', siteId));
		return ok(undefined);
	});
}

/** One change of one site whose openings the actor may edit; others are answered as if they did not exist. */
async function changeSite<T>(
	ctx: Ctx,
	actor: StaffActor,
	siteId: string,
	work: (tx: Tx, site: Site) => Promise<Result<T, AppError>>
): Promise<Result<T, AppError>> {
	return withTx(ctx.db, async (tx) => {
		const site = await lockSite(tx, actor.organisationId, siteId);
		if (site === null || !can(actor, 'openings.edit', siteResource(site))) return err(notFound);
		return work(tx, site);
	});
}

const describe = (opening: Opening): string =>
	`weekday ${opening.weekday} ${opening.from}-${opening.until} ${opening.visitKind}`;

const line = (actor: StaffActor, action: AccessAction, detail: string) => ({
	organisationId: actor.organisationId,
	staffId: actor.staffId,
	action,
	detail
});
