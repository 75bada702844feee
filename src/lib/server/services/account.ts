import type { Cookie } from 'lucia';
import QRCode from 'qrcode';
import type { StaffActor } from '../../domain/access/roles';
import { err, ok, type Result } from '../../domain/result';
import type { AccessAction } from '../audit/actions';
import { recordAccess } from '../audit/record';
import { acceptedStep, codeSecretUri, newCodeSecret } from '../auth/one-time-code';
import { hashPassword, verifyPassword } from '../auth/password';
import { countTry, forgetTries } from '../auth/rate-limit';
import { seal, unseal } from '../auth/seal';
import { endAllSessions, startSession } from '../auth/session';
import type { Ctx } from '../context';
import { withTx } from '../db/tx';
import { conflict, invalid, notFound, type AppError } from '../errors';
import { hashToken, listOpenSessions, deleteSessionByHash } from '../repos/sessions';
import { findStaff, updateStaff, type Staff } from '../repos/staff';

export interface Account {
	readonly name: string;
	readonly email: string;
	readonly hasSecondFactor: boolean;
	readonly sessions: readonly {
		readonly id: string;
		readonly startedAt: Date;
		readonly expiresAt: Date;
		readonly isThisOne: boolean;
	}[];
}

/** The signed-in person's own account. */
export async function getAccount(ctx: Ctx, actor: StaffActor, sessionId: string): Promise<Account> {
	const person = await getOwn(ctx, actor);
	const here = hashToken(sessionId);
	const sessions = await listOpenSessions(ctx, actor.staffId);
	return {
		name: person.name,
		email: person.email,
		hasSecondFactor: person.totpSecret !== null,
		sessions: sessions.map((session) => ({ ...session, isThisOne: session.id === here }))
	};
}

/** Changes the password and signs every other session out; this one goes on under a new id. */
export async function changePassword(
	ctx: Ctx,
	actor: StaffActor,
	{ current, next }: { current: string; next: string }
): Promise<Result<Cookie, AppError>> {
	const right = await provePassword(ctx, actor, current);
	if (!right.ok) return right;
	const passwordHash = await hashPassword(next);
	await withTx(ctx.db, async (tx) => {
		await updateStaff(tx, actor.staffId, { passwordHash });
		await recordAccess(tx, ctx, line(actor, 'account.password-changed'));
	});
	await endAllSessions(ctx, actor.staffId);
	const { cookie } = await startSession(ctx, actor.staffId, true);
	return ok(cookie);
}

export interface FactorOffer {
	/** For typing into an authenticator by hand. */
	readonly secret: string;
	/** The same as a picture, as a data address. */
	readonly qrCode: string;
	/** Handed back with the first code; the secret is not stored before that code proves it was taken over. */
	readonly sealed: string;
}

/** Offers a new second factor; nothing changes until `switchOnFactor`. */
export async function offerFactor(ctx: Ctx, actor: StaffActor): Promise<FactorOffer> {
	const person = await getOwn(ctx, actor);
	const secret = newCodeSecret(ctx.random);
	return describeOffer(ctx, person, secret);
}

/** The same offer again, after a code that did not fit; null where the sealed words are not ours. */
export async function repeatOffer(ctx: Ctx, actor: StaffActor, sealed: string): Promise<FactorOffer | null> {
	const secret = unseal(ctx.config, sealed, `offer ${actor.staffId}`);
	return secret === null ? null : describeOffer(ctx, await getOwn(ctx, actor), secret);
}

async function describeOffer(ctx: Ctx, person: Staff, secret: string): Promise<FactorOffer> {
	const qrCode = await QRCode.toDataURL(codeSecretUri(secret, person.email), { margin: 2, width: 220 });
	return { secret, qrCode, sealed: seal(ctx.config, secret, `offer ${person.id}`) };
}

/** Switches the second factor on, once a code shows that the authenticator holds the offered secret. */
export async function switchOnFactor(
	ctx: Ctx,
	actor: StaffActor,
	{ sealed, code }: { sealed: string; code: string }
): Promise<Result<void, AppError>> {
	const secret = unseal(ctx.config, sealed, `offer ${actor.staffId}`);
	if (secret === null) return err(conflict('This offer is no longer good. Please start again.'));
	const wait = await countTry(ctx, 'code', actor.staffId);
	if (wait !== null) return err(tooMany(wait));
	const step = await acceptedStep(secret, code, { now: ctx.clock.now(), lastStep: null });
	if (step === null)
		return err(invalid('This code does not fit. Wait for the next one and type it.', 'code'));
	await withTx(ctx.db, async (tx) => {
		await updateStaff(tx, actor.staffId, {
			totpSecret: seal(ctx.config, secret, actor.staffId),
			totpLastStep: String(step).padStart(12, '0')
		});
		await recordAccess(tx, ctx, line(actor, 'account.factor-on'));
	});
	await forgetTries(ctx, 'code', actor.staffId);
	return ok(undefined);
}

/** Switches the second factor off; the password shows that it is the person who asks. */
export async function switchOffFactor(
	ctx: Ctx,
	actor: StaffActor,
	password: string
): Promise<Result<void, AppError>> {
	const right = await provePassword(ctx, actor, password);
	if (!right.ok) return right;
	await withTx(ctx.db, async (tx) => {
		await updateStaff(tx, actor.staffId, { totpSecret: null, totpLastStep: null });
		await recordAccess(tx, ctx, line(actor, 'account.factor-off'));
	});
	return ok(undefined);
}

/** Ends one of the person's own sessions, named by its stored hash. */
export async function endOwnSession(
	ctx: Ctx,
	actor: StaffActor,
	id: string
): Promise<Result<void, AppError>> {
	const ended = await deleteSessionByHash(ctx, actor.staffId, id);
	if (!ended) return err(notFound);
	await recordAccess(ctx.db, ctx, line(actor, 'session.ended'));
	return ok(undefined);
}

export async function signOutEverywhere(ctx: Ctx, actor: StaffActor): Promise<void> {
	await endAllSessions(ctx, actor.staffId);
	await recordAccess(ctx.db, ctx, line(actor, 'session.ended-everywhere'));
}

async function provePassword(ctx: Ctx, actor: StaffActor, password: string): Promise<Result<void, AppError>> {
	const key = `own ${actor.staffId}`;
	const wait = await countTry(ctx, 'account', key);
	if (wait !== null) return err(tooMany(wait));
	const person = await getOwn(ctx, actor);
	if (!(await verifyPassword(person.passwordHash, password))) {
		return err(invalid('This is not your present password.', 'current'));
	}
	await forgetTries(ctx, 'account', key);
	return ok(undefined);
}

async function getOwn(ctx: Ctx, actor: StaffActor): Promise<Staff> {
	const person = await findStaff(ctx.db, actor.staffId);
	if (person === null) throw new Error('A signed-in person has no account.');
	return person;
}

const tooMany = (seconds: number): AppError =>
	conflict(`Too many tries. Please wait ${Math.ceil(seconds / 60)} minutes.`);

const line = (actor: StaffActor, action: AccessAction) => ({
	organisationId: actor.organisationId,
	staffId: actor.staffId,
	action
});
