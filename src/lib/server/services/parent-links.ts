import { createHash, createHmac } from 'node:crypto';
import type { Ctx } from '../context';
import type { Reader, Tx } from '../db/client';
import type { FollowUpRow } from '../repos/message-facts';
import {
	extendLink,
	findLinkByHash,
	listLinks,
	putLink,
	revokeLink,
	type ParentLinkRow
} from '../repos/parent-links';

const DAY = 86_400_000;
/** A link outlives the last thing that is planned by this long (common practice, no source). */
const LINK_DAYS = 30;
/** 22 characters of base64url are 132 bits: unguessable, and short enough for a text message. */
const TOKEN_CHARACTERS = 22;

/**
 * The secret part of a carer's link. Derived from the application's key and the link's id, so that every later message can
 * hold the same link while the database keeps no more than a hash of it.
 */
export function linkToken(ctx: Ctx, linkId: string): string {
	return createHmac('sha256', ctx.config.linkSecret)
		.update(`parent-link:${linkId}`)
		.digest('base64url')
		.slice(0, TOKEN_CHARACTERS);
}

const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

/** The address that a carer opens. */
export const linkUrl = (ctx: Ctx, linkId: string): string =>
	`${ctx.config.publicBaseUrl}/v/${linkToken(ctx, linkId)}`;

/** True while a link may be used and may be sent. */
export const isLinkAlive = (link: Pick<ParentLinkRow, 'revokedAt' | 'expiresAt'>, now: Date): boolean =>
	link.revokedAt === null && link.expiresAt > now;

/** A link of a carer to a follow-up: the living one, or a new one in place of one that was revoked. */
export async function ensureParentLink(
	tx: Tx,
	ctx: Ctx,
	followUpId: string,
	carerId: string
): Promise<{ id: string; url: string }> {
	const links = await listLinks(tx, [followUpId]);
	const id = await ensure(tx, ctx, { followUpId, carerId, links, until: ctx.clock.now() });
	return { id, url: linkUrl(ctx, id) };
}

/** The same for every carer of a follow-up that messages go to, in one reading. */
export async function ensureParentLinks(
	tx: Tx,
	ctx: Ctx,
	followUp: Pick<FollowUpRow, 'id' | 'laterCheckAt'>,
	carerIds: readonly string[]
): Promise<void> {
	if (carerIds.length === 0) return;
	const links = await listLinks(tx, [followUp.id]);
	const until = followUp.laterCheckAt ?? ctx.clock.now();
	for (const carerId of carerIds) await ensure(tx, ctx, { followUpId: followUp.id, carerId, links, until });
}

interface Wanted {
	readonly followUpId: string;
	readonly carerId: string;
	readonly links: readonly ParentLinkRow[];
	/** The last instant that is planned. */
	readonly until: Date;
}

async function ensure(tx: Tx, ctx: Ctx, { followUpId, carerId, links, until }: Wanted): Promise<string> {
	const now = ctx.clock.now();
	const last = Math.max(until.getTime(), now.getTime());
	const expiresAt = new Date(last + LINK_DAYS * DAY);
	const link = links.find((one) => one.carerId === carerId);
	if (link && link.revokedAt === null) {
		// Extended in steps: a change of the follow-up need not write the link each time.
		if (link.expiresAt.getTime() < last + (LINK_DAYS - 7) * DAY) await extendLink(tx, link.id, expiresAt);
		return link.id;
	}
	const id = ctx.random.id();
	await putLink(tx, {
		id,
		followUpId,
		carerId,
		tokenHash: hashOf(linkToken(ctx, id)),
		expiresAt,
		createdAt: now
	});
	return id;
}

/** Ends a carer's link at once, for instance when it went to a wrong number; the next message carries a new one. */
export async function revokeParentLink(tx: Tx, ctx: Ctx, followUpId: string, carerId: string): Promise<void> {
	await revokeLink(tx, followUpId, carerId, ctx.clock.now());
}

export type FoundLink =
	| {
			readonly state: 'alive';
			readonly followUpId: string;
			readonly carerId: string;
			readonly linkId: string;
	  }
	| { readonly state: 'unknown' }
	/** Was good once: the page may say whom to call. */
	| { readonly state: 'ended'; readonly followUpId: string };

/** Finds a carer by the secret part of the link; reading it changes nothing, so a scanner's visit spends nothing. */
export async function findByToken(db: Reader, ctx: Ctx, token: string): Promise<FoundLink> {
	if (token.length !== TOKEN_CHARACTERS) return { state: 'unknown' };
	const link = await findLinkByHash(db, hashOf(token));
	if (link === null) return { state: 'unknown' };
	if (!isLinkAlive(link, ctx.clock.now())) return { state: 'ended', followUpId: link.followUpId };
	return { state: 'alive', followUpId: link.followUpId, carerId: link.carerId, linkId: link.id };
}
