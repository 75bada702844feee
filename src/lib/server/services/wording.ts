import { can } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { CHANNELS, MESSAGE_KINDS, type Channel, type MessageKind } from '../../domain/messaging/kinds';
import { LANGUAGES, type Language } from '../../domain/messaging/language';
import { faultsOf } from '../../domain/messaging/wording';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { withTx } from '../db/tx';
import { conflict, invalid, notAllowed, notFound, type AppError } from '../errors';
import {
	insertMissingTemplates,
	insertTemplates,
	listTemplateHeads,
	listTemplateVersions,
	lockTemplateVersions,
	markTemplate,
	retireTemplates,
	type NewTemplate,
	type TemplatePlace,
	type TemplateRow
} from '../repos/templates';
import { DEFAULT_WORDING } from '../wording/default-texts';

/**
 * Gives an organisation the wording that ships with the product, wherever it has none of its own. Running it again adds only
 * what a newer release brought. Every text is a draft: none has been reviewed by a qualified translator.
 */
export async function installDefaultWording(tx: Tx, ctx: Ctx, organisationId: string): Promise<void> {
	const now = ctx.clock.now();
	const rows = LANGUAGES.flatMap((language) =>
		MESSAGE_KINDS.flatMap((kind) =>
			CHANNELS.flatMap((channel): NewTemplate[] => {
				const text = defaultText(kind, channel, language);
				if (text === null) return [];
				const place = { organisationId, kind, channel, language };
				const standing = { standing: 'draft', version: 1, isCurrent: true } as const;
				return [{ ...place, ...text, ...standing, id: ctx.random.id(), createdAt: now }];
			})
		)
	);
	await insertMissingTemplates(tx, rows);
}

function defaultText(kind: MessageKind, channel: Channel, language: Language) {
	const texts = DEFAULT_WORDING[language].texts[kind];
	if (channel === 'sms') return texts?.sms === undefined ? null : { subject: null, body: texts.sms };
	return texts?.mail ?? null;
}

export type TemplateHead = Pick<TemplateRow, 'kind' | 'channel' | 'language' | 'version' | 'standing'>;

/** What is in use, kind by kind. */
export async function listWording(ctx: Ctx, actor: StaffActor): Promise<Result<TemplateHead[], AppError>> {
	if (!can(actor, 'wording.manage', actor)) return err(notAllowed);
	return ok(await listTemplateHeads(ctx.db, actor.organisationId));
}

export type WordingPlace = Omit<TemplatePlace, 'organisationId'>;

/** All versions at one place, newest first; the one in use is marked. */
export async function getWording(
	ctx: Ctx,
	actor: StaffActor,
	place: WordingPlace
): Promise<Result<TemplateRow[], AppError>> {
	if (!can(actor, 'wording.manage', actor)) return err(notAllowed);
	const { organisationId } = actor;
	const versions = await listTemplateVersions(ctx.db, { ...place, organisationId });
	return versions.length === 0 ? err(notFound) : ok(versions);
}

export interface WordingDraft extends WordingPlace {
	readonly subject: string | null;
	readonly body: string;
	/** The version that was on the screen: somebody else's newer one is not overwritten unseen. */
	readonly basedOn: number;
}

async function recordChange(
	tx: Tx,
	ctx: Ctx,
	{ organisationId, staffId }: StaffActor,
	detail: string
): Promise<void> {
	await recordAccess(tx, ctx, { organisationId, staffId, action: 'wording.changed', detail });
}

const placeInWords = ({ kind, channel, language }: WordingPlace): string =>
	`${kind}, ${channel}, ${language}`;

/** Saves changed words as a new version, in use from now on; it is a draft until somebody says that it was reviewed. */
export async function saveWording(
	ctx: Ctx,
	actor: StaffActor,
	{ basedOn, subject, body, ...place }: WordingDraft
): Promise<Result<{ version: number }, AppError>> {
	if (!can(actor, 'wording.manage', actor)) return err(notAllowed);
	const [fault] = faultsOf({ ...place, subject, body });
	if (fault !== undefined) return err(invalid(fault, 'body'));
	const { organisationId, staffId } = actor;
	const whole = { ...place, organisationId };
	return withTx(ctx.db, async (tx) => {
		const versions = await lockTemplateVersions(tx, whole);
		const current = versions.find(({ isCurrent }) => isCurrent);
		if (current === undefined) return err(notFound);
		if (current.version !== basedOn)
			return err(conflict(`Version ${current.version} was saved meanwhile. Look at it first.`));
		if (current.body === body && current.subject === subject) return ok({ version: current.version });
		const version = (versions[0]?.version ?? 0) + 1;
		await retireTemplates(tx, whole);
		const made = { createdBy: staffId, createdAt: ctx.clock.now() };
		const row = { ...whole, ...made, id: ctx.random.id(), version, subject, body };
		await insertTemplates(tx, [{ ...row, standing: 'draft', isCurrent: true }]);
		await recordChange(tx, ctx, actor, `${placeInWords(place)}: version ${version}`);
		return ok({ version });
	});
}

/** Takes an earlier version's words back into use, as a new version with the same standing. */
export async function restoreWording(
	ctx: Ctx,
	actor: StaffActor,
	{ version: wanted, ...place }: WordingPlace & { readonly version: number }
): Promise<Result<{ version: number }, AppError>> {
	if (!can(actor, 'wording.manage', actor)) return err(notAllowed);
	const whole = { ...place, organisationId: actor.organisationId };
	return withTx(ctx.db, async (tx) => {
		const versions = await lockTemplateVersions(tx, whole);
		const old = versions.find((row) => row.version === wanted);
		if (old === undefined) return err(notFound);
		const version = (versions[0]?.version ?? 0) + 1;
		await retireTemplates(tx, whole);
		const made = { createdBy: actor.staffId, createdAt: ctx.clock.now(), isCurrent: true };
		const { subject, body, standing, reviewedBy } = old;
		const words = { subject, body, standing, reviewedBy };
		await insertTemplates(tx, [{ ...whole, ...made, ...words, id: ctx.random.id(), version }]);
		await recordChange(tx, ctx, actor, `${placeInWords(place)}: version ${wanted} again, as ${version}`);
		return ok({ version });
	});
}

/** Writes down that the words in use were reviewed, and by whom; or takes the mark back. */
export async function markReviewed(
	ctx: Ctx,
	actor: StaffActor,
	{
		version,
		reviewedBy,
		...place
	}: WordingPlace & { readonly version: number; readonly reviewedBy: string | null }
): Promise<Result<null, AppError>> {
	if (!can(actor, 'wording.manage', actor)) return err(notAllowed);
	return withTx(ctx.db, async (tx) => {
		const versions = await lockTemplateVersions(tx, { ...place, organisationId: actor.organisationId });
		const row = versions.find((one) => one.version === version);
		if (row === undefined) return err(notFound);
		if (!row.isCurrent) return err(conflict('Another version is in use now. Look at it first.'));
		const standing = reviewedBy === null ? 'draft' : 'reviewed';
		await recordChange(tx, ctx, actor, `${placeInWords(place)}: version ${version} ${standing}`);
		await markTemplate(tx, row.id, { standing, reviewedBy });
		return ok(null);
	});
}
