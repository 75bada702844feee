import type { HoldFacts } from '../../domain/messaging/holds';
import type { Ctx } from '../context';
import type { Reader } from '../db/client';
import {
	listCarersByIds,
	listEntriesByIds,
	listHeads,
	listLastCheckIns,
	listLastReached,
	listNewbornMarks,
	listSitesOfMessages,
	listVisitsOf
} from '../repos/message-batch';
import type { CarerRow, FollowUpRow, SiteRow, VisitRow } from '../repos/message-facts';
import type { MessageRow } from '../repos/messages';
import { listLinks } from '../repos/parent-links';
import { listCurrentTemplates, type TemplateRow } from '../repos/templates';
import { newbornMarks } from './newborn-marks';
import { isLinkAlive, linkUrl } from './parent-links';

/** Everything that one message needs to be checked and rendered, as it is now. */
export interface MessageFacts {
	readonly message: MessageRow;
	readonly organisationId: string;
	readonly organisationName: string;
	readonly emergencyNumber: string;
	readonly site: SiteRow;
	readonly followUp: FollowUpRow | null;
	readonly carer: CarerRow | null;
	readonly visit: VisitRow | null;
	readonly holds: HoldFacts | null;
	readonly link: string | undefined;
	readonly words: string | undefined;
	/** The number that wrote what this answers, where it belongs to no carer. */
	readonly strayPhone: string | null;
	readonly choices: readonly string[] | undefined;
	readonly template: TemplateRow | null;
}

const unique = (ids: readonly (string | null | undefined)[]): string[] => [
	...new Set(ids.flatMap((id) => (id ? [id] : [])))
];

const byId = <T extends { id: string }>(rows: readonly T[]): Map<string, T> =>
	new Map(rows.map((row) => [row.id, row]));

const isOpen = ({ state }: VisitRow): boolean => state === 'booked' || state === 'confirmed';

/** Reads the facts of many messages with one query for each kind of record. */
export async function loadMessageFacts(
	db: Reader,
	ctx: Ctx,
	rows: readonly MessageRow[]
): Promise<MessageFacts[]> {
	const loaded = await load(db, rows);
	const templates = await listCurrentTemplates(
		db,
		unique([...loaded.sites.values()].map(({ site }) => site.organisationId)),
		[...new Set(rows.map(({ kind }) => kind))]
	);
	const templateOf = templateFinder(templates);
	const now = ctx.clock.now();
	return rows.flatMap((message) => {
		const followUp = loaded.followUps.get(message.followUpId ?? '') ?? null;
		const visits = loaded.visits.filter(({ followUpId }) => followUpId === message.followUpId);
		const visit = visits.find(({ id }) => id === message.facts.visitId) ?? null;
		// What goes to no carer keeps the site it was planned for, also once its text is in a newborn's thread.
		const ofFamily = message.carerId === null ? undefined : (visit?.clinicId ?? followUp?.clinicId);
		const at = loaded.sites.get(ofFamily ?? message.siteId);
		if (at === undefined) return [];
		const { site, organisationName, emergencyNumber } = at;
		const entry = loaded.entries.get(message.facts.threadEntryId ?? '');
		const link = loaded.links.find(
			(one) =>
				one.followUpId === message.followUpId && one.carerId === message.carerId && isLinkAlive(one, now)
		);
		return [
			{
				message,
				organisationId: site.organisationId,
				organisationName,
				emergencyNumber,
				site,
				followUp,
				carer: loaded.carers.get(message.carerId ?? '') ?? null,
				visit,
				holds: followUp && {
					stage: followUp.stage,
					outcome: followUp.outcome,
					timeZone: site.timeZone,
					visit,
					hasOpenVisit: visits.some(isOpen),
					lastCheckInAt: loaded.lastCheckIns.get(followUp.id) ?? null,
					lastReachedAt: loaded.lastReached.get(followUp.id) ?? null
				},
				link: link && linkUrl(ctx, link.id),
				words: entry?.body,
				strayPhone: message.carerId === null ? (entry?.phone ?? null) : null,
				choices: choicesOf(message, loaded.marks),
				template: templateOf(site.organisationId, message)
			}
		];
	});
}

async function load(db: Reader, rows: readonly MessageRow[]) {
	const having = (kinds: readonly string[]) =>
		unique(rows.flatMap(({ kind, followUpId }) => (kinds.includes(kind) ? [followUpId] : [])));
	const followUpIds = unique(rows.map(({ followUpId }) => followUpId));
	const followUps = byId(await listHeads(db, followUpIds));
	const visits = await listVisitsOf(
		db,
		unique(rows.flatMap((row) => (row.facts.visitId ? [row.followUpId] : [])))
	);
	const siteIds = [
		...rows.map(({ siteId }) => siteId),
		...visits.map(({ clinicId }) => clinicId),
		...[...followUps.values()].map(({ clinicId }) => clinicId)
	];
	const sites = await listSitesOfMessages(db, unique(siteIds));
	const entries = await listEntriesByIds(db, unique(rows.map(({ facts }) => facts.threadEntryId)));
	const asked = unique(rows.flatMap(({ facts }) => facts.choices?.split(' ') ?? []));
	return {
		followUps,
		visits,
		sites: new Map(sites.map((row) => [row.site.id, row])),
		carers: byId(await listCarersByIds(db, unique(rows.map(({ carerId }) => carerId)))),
		links: await listLinks(db, followUpIds),
		lastCheckIns: lastOf(await listLastCheckIns(db, having(['check-in-ask']))),
		lastReached: lastOf(await listLastReached(db, having(['visit-missed-again']))),
		entries: byId(entries),
		marks: newbornMarks(await listNewbornMarks(db, asked))
	};
}

const lastOf = (
	rows: readonly { readonly followUpId: string; readonly at: Date | null }[]
): Map<string, Date> =>
	new Map(rows.flatMap(({ followUpId, at }) => (at ? [[followUpId, at] as const] : [])));

function choicesOf(message: MessageRow, marks: ReadonlyMap<string, string>): string[] | undefined {
	return message.facts.choices?.split(' ').map((followUpId) => marks.get(followUpId) ?? '?');
}

/** The wording in the message's own language, or the source language's where that one has none. */
function templateFinder(templates: readonly TemplateRow[]) {
	const key = (organisationId: string, kind: string, channel: string, language: string): string =>
		[organisationId, kind, channel, language].join(' ');
	const found = new Map(
		templates.map((row) => [key(row.organisationId, row.kind, row.channel, row.language), row])
	);
	return (organisationId: string, { kind, channel, language }: MessageRow): TemplateRow | null =>
		found.get(key(organisationId, kind, channel, language)) ??
		found.get(key(organisationId, kind, channel, 'en')) ??
		null;
}
