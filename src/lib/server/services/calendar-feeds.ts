import { createHash } from 'node:crypto';
import { can, sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { VisitKind } from '../../domain/followup/visit';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { withTx } from '../db/tx';
import { notFound, type AppError } from '../errors';
import {
	findFeedByHash,
	findLatestVisit,
	insertFeed,
	listFeeds,
	listFeedVisits,
	revokeFeed
} from '../repos/calendar-feeds';
import { findSite, listSites } from '../repos/sites';
import { findStaff, listRoles } from '../repos/staff';
import { publishedVisit, visitFeed, type CalendarVisit } from './calendar-objects';
import { initialOf } from './newborn-marks';
import { findByToken, linkUrl } from './parent-links';

const DAY = 86_400_000;
const DAYS_BACK = 14;
const DAYS_AHEAD = 60;

const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

/** What a person's calendar page shows: feeds that work, and clinics for which one may be made. */
export interface FeedList {
	readonly feeds: readonly {
		readonly id: string;
		readonly siteName: string;
		readonly timeZone: string;
		readonly createdAt: Date;
	}[];
	readonly clinics: readonly { readonly id: string; readonly name: string }[];
}

/** The person's own feeds, and the clinics whose calendar the person may see. */
export async function listCalendarFeeds(ctx: Ctx, actor: StaffActor): Promise<FeedList> {
	const sites = await listSites(ctx.db, actor.organisationId);
	const allowed = sitesWhere(actor, 'calendar.view');
	const zoneOf = new Map(sites.map(({ id, timeZone }) => [id, timeZone]));
	const feeds = await listFeeds(ctx.db, actor.staffId);
	return {
		feeds: feeds.map(({ siteId, ...feed }) => ({ ...feed, timeZone: zoneOf.get(siteId) ?? 'UTC' })),
		clinics: sites.filter(({ id, kind }) => kind === 'clinic' && allowed.includes(id))
	};
}

/** Makes a private feed of one clinic. The address is in the answer and nowhere else: only its hash is kept. */
export async function makeCalendarFeed(
	ctx: Ctx,
	actor: StaffActor,
	siteId: string
): Promise<Result<{ url: string }, AppError>> {
	const site = await findSite(ctx.db, actor.organisationId, siteId);
	const resource = { organisationId: actor.organisationId, clinicId: siteId };
	if (site?.kind !== 'clinic' || !can(actor, 'calendar.view', resource)) return err(notFound);
	const token = ctx.random.token();
	const { organisationId, staffId } = actor;
	await withTx(ctx.db, async (tx) => {
		const id = ctx.random.id();
		await insertFeed(tx, { id, staffId, siteId, tokenHash: hashOf(token), createdAt: ctx.clock.now() });
		await recordAccess(tx, ctx, { organisationId, staffId, action: 'feed.made', detail: site.name });
	});
	return ok({ url: `${ctx.config.origin}/feeds/${token}.ics` });
}

/** Ends one of the person's own feeds at once. */
export async function revokeCalendarFeed(
	ctx: Ctx,
	actor: StaffActor,
	id: string
): Promise<Result<null, AppError>> {
	const { organisationId, staffId } = actor;
	return withTx(ctx.db, async (tx) => {
		if (!(await revokeFeed(tx, { id, staffId, now: ctx.clock.now() }))) return err(notFound);
		await recordAccess(tx, ctx, { organisationId, staffId, action: 'feed.revoked' });
		return ok(null);
	});
}

const KINDS: Readonly<Record<VisitKind, string>> = {
	check: 'Check',
	'blood-draw': 'Blood draw',
	'feeding-help': 'Feeding help'
};

/**
 * A clinic's visits as a calendar: time, kind and initials, no more. Answers null, as to a stranger, once the link is revoked,
 * the account is disabled, or the person may no longer see the clinic's calendar.
 */
export async function readCalendarFeed(ctx: Ctx, token: string): Promise<string | null> {
	const found = await findFeedByHash(ctx.db, hashOf(token.replace(/\.ics$/, '')));
	if (found === null || !(await maySee(ctx, found.feed.staffId, found.site))) return null;
	const now = ctx.clock.now();
	const from = new Date(now.getTime() - DAYS_BACK * DAY);
	const until = new Date(now.getTime() + DAYS_AHEAD * DAY);
	const rows = await listFeedVisits(ctx.db, found.site.id, { from, until });
	const { staffId } = found.feed;
	const { organisationId, name } = found.site;
	await recordAccess(ctx.db, ctx, { organisationId, staffId, action: 'feed.read', detail: name });
	return visitFeed(
		`Visits: ${name}`,
		rows.map(({ visit, givenName, familyName }) => ({
			...calendarFacts(visit),
			title: `${KINDS[visit.kind]} ${initialOf(givenName)}${initialOf(familyName)}`,
			place: name
		})),
		now
	);
}

async function maySee(
	ctx: Ctx,
	staffId: string,
	site: { id: string; organisationId: string }
): Promise<boolean> {
	const person = await findStaff(ctx.db, staffId, site.organisationId);
	if (person === null || person.isDisabled) return false;
	const held = await listRoles(ctx.db, site.organisationId);
	const roles = held.filter((role) => role.staffId === staffId);
	const { organisationId, name } = person;
	const actor: StaffActor = { kind: 'staff', staffId, organisationId, name, roles };
	return can(actor, 'calendar.view', { organisationId, clinicId: site.id });
}

type VisitRow = Awaited<ReturnType<typeof listFeedVisits>>[number]['visit'];

const calendarFacts = (visit: VisitRow): Omit<CalendarVisit, 'title' | 'place'> => ({
	uid: visit.calendarUid,
	sequence: visit.calendarSequence,
	startsAt: visit.startsAt,
	endsAt: visit.endsAt,
	isCancelled: visit.state === 'cancelled'
});

/**
 * The family's visit for "add to calendar". Once added, the same address added again moves it or takes it out.
 * Null where the link does not work or no visit was ever made.
 */
export async function readParentCalendar(ctx: Ctx, token: string): Promise<string | null> {
	const link = await findByToken(ctx.db, ctx, token);
	if (link.state !== 'alive') return null;
	const found = await findLatestVisit(ctx.db, link.followUpId);
	if (found === null) return null;
	const { visit, clinic } = found;
	return publishedVisit(
		{ ...calendarFacts(visit), title: clinic.name, place: clinic.address, url: linkUrl(ctx, link.linkId) },
		ctx.clock.now()
	);
}
