import type { RoleAtSite, StaffActor } from '../../domain/access/roles';
import { areRolesSound, leavesAnAdministrator } from '../../domain/access/staffing';
import { err, ok, type Result } from '../../domain/result';
import type { AccessAction } from '../audit/actions';
import { recordAccess } from '../audit/record';
import { endAllSessions } from '../auth/session';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { isDuplicate, withTx } from '../db/tx';
import { conflict, invalid, notFound, type AppError } from '../errors';
import { deleteOpenInvitations, insertInvitation, openInvitationsOf } from '../repos/invitations';
import { listSites, lockOrganisation } from '../repos/sites';
import {
	findStaff,
	insertStaff,
	listRoles,
	listStaff,
	replaceRoles,
	updateStaff,
	type Staff
} from '../repos/staff';

/** An invitation link is good for this long. */
export const INVITATION_DAYS = 7;

export type Standing = 'active' | 'invited' | 'invitation-expired' | 'disabled';

export interface Person {
	readonly id: string;
	readonly name: string;
	readonly email: string;
	readonly standing: Standing;
	/** Until when an open link can be used, also for a new password of an active account. */
	readonly linkUntil: Date | null;
	readonly hasSecondFactor: boolean;
	readonly roles: readonly (RoleAtSite & { readonly siteName: string | null })[];
}

/** Everybody of the actor's organisation, by name. */
export async function listPeople(ctx: Ctx, actor: StaffActor): Promise<Person[]> {
	const { organisationId } = actor;
	const [people, roles, sites] = await Promise.all([
		listStaff(ctx.db, organisationId),
		listRoles(ctx.db, organisationId),
		listSites(ctx.db, organisationId)
	]);
	const siteNames = new Map(sites.map(({ id, name }) => [id, name]));
	const links = await openInvitationsOf(
		ctx.db,
		people.map(({ id }) => id),
		ctx.clock.now()
	);
	return people.map((person) => ({
		id: person.id,
		name: person.name,
		email: person.email,
		standing: standingOf(person, links.has(person.id)),
		linkUntil: links.get(person.id) ?? null,
		hasSecondFactor: person.totpSecret !== null,
		roles: roles
			.filter(({ staffId }) => staffId === person.id)
			.map(({ role, siteId }) => ({ role, siteId, siteName: siteNames.get(siteId ?? '') ?? null }))
	}));
}

function standingOf(person: Staff, hasLink: boolean): Standing {
	if (person.isDisabled) return 'disabled';
	if (person.passwordHash !== null) return 'active';
	return hasLink ? 'invited' : 'invitation-expired';
}

export interface Invitation {
	/** Shown once; only its hash is kept. */
	readonly link: string;
	readonly name: string;
	readonly expiresAt: Date;
}

/** Adds a person and makes the link with which they choose a password. */
export async function invite(
	ctx: Ctx,
	actor: StaffActor,
	asked: { readonly name: string; readonly email: string; readonly roles: readonly RoleAtSite[] }
): Promise<Result<Invitation, AppError>> {
	const sites = await listSites(ctx.db, actor.organisationId);
	if (!areRolesSound(asked.roles, sites)) return err(UNSOUND);
	const staffId = ctx.random.id();
	const { organisationId } = actor;
	const person = { id: staffId, organisationId, email: asked.email, name: asked.name };
	try {
		return await withTx(ctx.db, async (tx) => {
			await insertStaff(tx, { ...person, createdAt: ctx.clock.now() });
			await replaceRoles(tx, ctx, { staffId, roles: asked.roles });
			await recordAccess(tx, ctx, line(actor, 'person.invited', staffId));
			return ok(await makeLink(tx, ctx, actor, person));
		});
	} catch (error) {
		if (!isDuplicate(error)) throw error;
		return err(invalid('There is already an account with this address.', 'email'));
	}
}

/** Makes a new link: for an invitation that ran out, or for somebody who forgot the password. */
export async function inviteAgain(
	ctx: Ctx,
	actor: StaffActor,
	staffId: string
): Promise<Result<Invitation, AppError>> {
	return change(ctx, actor, staffId, async (tx, person) => {
		if (person.isDisabled) return err(conflict('This account is disabled. Enable it first.'));
		await recordAccess(tx, ctx, line(actor, 'person.invited-again', staffId));
		return ok(await makeLink(tx, ctx, actor, person));
	});
}

async function makeLink(
	tx: Tx,
	ctx: Ctx,
	actor: StaffActor,
	person: { readonly id: string; readonly name: string }
): Promise<Invitation> {
	const token = ctx.random.token();
	const expiresAt = new Date(ctx.clock.now().getTime() + INVITATION_DAYS * 24 * 3_600_000);
	await insertInvitation(tx, ctx, { staffId: person.id, token, expiresAt, createdBy: actor.staffId });
	return { link: `${ctx.config.origin}/invitation/${token}`, name: person.name, expiresAt };
}

/** Sets all roles of a person; the change holds from their next click. */
export async function setRoles(
	ctx: Ctx,
	actor: StaffActor,
	{ staffId, roles }: { readonly staffId: string; readonly roles: readonly RoleAtSite[] }
): Promise<Result<void, AppError>> {
	const sites = await listSites(ctx.db, actor.organisationId);
	if (!areRolesSound(roles, sites)) return err(UNSOUND);
	return change(ctx, actor, staffId, async (tx) => {
		const staysAdministrator = roles.some(({ role }) => role === 'admin');
		if (!staysAdministrator && !(await othersAdminister(tx, actor, staffId))) return err(LAST_ADMINISTRATOR);
		await replaceRoles(tx, ctx, { staffId, roles });
		await recordAccess(tx, ctx, line(actor, 'person.roles-set', `${staffId}: ${describe(roles)}`));
		return ok(undefined);
	});
}

/** Closes an account: every session ends at once, open links stop working, what the person did stays on record. */
export async function disable(ctx: Ctx, actor: StaffActor, staffId: string): Promise<Result<void, AppError>> {
	if (staffId === actor.staffId) return err(conflict('You cannot disable your own account.'));
	const disabled = await change(ctx, actor, staffId, async (tx) => {
		if (!(await othersAdminister(tx, actor, staffId))) return err(LAST_ADMINISTRATOR);
		await updateStaff(tx, staffId, { isDisabled: true });
		await deleteOpenInvitations(tx, staffId);
		await recordAccess(tx, ctx, line(actor, 'person.disabled', staffId));
		return ok(undefined);
	});
	if (disabled.ok) await endAllSessions(ctx, staffId);
	return disabled;
}

export async function enable(ctx: Ctx, actor: StaffActor, staffId: string): Promise<Result<void, AppError>> {
	return change(ctx, actor, staffId, async (tx) => {
		await updateStaff(tx, staffId, { isDisabled: false });
		await recordAccess(tx, ctx, line(actor, 'person.enabled', staffId));
		return ok(undefined);
	});
}

/** Removes the second factor of somebody who lost the device with it. */
export async function resetFactor(
	ctx: Ctx,
	actor: StaffActor,
	staffId: string
): Promise<Result<void, AppError>> {
	return change(ctx, actor, staffId, async (tx) => {
		await updateStaff(tx, staffId, { totpSecret: null, totpLastStep: null });
		await recordAccess(tx, ctx, line(actor, 'person.factor-reset', staffId));
		return ok(undefined);
	});
}

/** Signs a person out on every device. */
export async function signPersonOut(
	ctx: Ctx,
	actor: StaffActor,
	staffId: string
): Promise<Result<void, AppError>> {
	const known = await change(ctx, actor, staffId, async (tx) => {
		await recordAccess(tx, ctx, line(actor, 'person.sessions-ended', staffId));
		return ok(undefined);
	});
	if (known.ok) await endAllSessions(ctx, staffId);
	return known;
}

/** One change of one person of the actor's own organisation, after any other change of its people. */
async function change<T>(
	ctx: Ctx,
	actor: StaffActor,
	staffId: string,
	work: (tx: Tx, person: Staff) => Promise<Result<T, AppError>>
): Promise<Result<T, AppError>> {
	return withTx(ctx.db, async (tx) => {
		await lockOrganisation(tx, actor.organisationId);
		const person = await findStaff(tx, staffId, actor.organisationId);
		return person === null ? err(notFound) : work(tx, person);
	});
}

/** Whether somebody other than this person can still sign in and manage people. */
async function othersAdminister(tx: Tx, { organisationId }: StaffActor, without: string): Promise<boolean> {
	const [people, roles] = await Promise.all([listStaff(tx, organisationId), listRoles(tx, organisationId)]);
	const administrators = people
		.filter(({ id }) => roles.some(({ staffId, role }) => staffId === id && role === 'admin'))
		.map(({ id, isDisabled, passwordHash }) => ({
			staffId: id,
			canSignIn: !isDisabled && passwordHash !== null
		}));
	return leavesAnAdministrator(administrators, without);
}

const UNSOUND = invalid(
	'Nurses work at a birth unit, desk and pediatricians at a clinic of this organisation.',
	'roles'
);
const LAST_ADMINISTRATOR = conflict(
	'Nobody would be left who can manage people. Make another administrator first.'
);

const describe = (roles: readonly RoleAtSite[]): string =>
	roles.map(({ role, siteId }) => (siteId === null ? role : `${role} at ${siteId}`)).join(', ');

const line = (actor: StaffActor, action: AccessAction, detail: string) => ({
	organisationId: actor.organisationId,
	staffId: actor.staffId,
	action,
	detail
});
