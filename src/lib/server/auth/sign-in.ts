import type { Cookie } from 'lucia';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { findStaff, findStaffByEmail, spendCodeStep, type Staff } from '../repos/staff';
import { acceptedStep } from './one-time-code';
import { verifyPassword } from './password';
import { countTry, forgetTries, giveBackTry } from './rate-limit';
import { unseal } from './seal';
import { endSession, startSession } from './session';

export type SignInRefusal =
	{ readonly code: 'wrong' } | { readonly code: 'too-many'; readonly waitSeconds: number };

export interface SignedIn {
	readonly cookie: Cookie;
	/** True where the second factor is still owed. */
	readonly needsCode: boolean;
}

export interface PasswordTry {
	readonly email: string;
	readonly password: string;
	readonly address: string;
	/** The session that the browser came with; a new one takes its place. */
	readonly oldSessionId: string | null;
}

/** Judges e-mail and password. A wrong password, an unknown and a disabled account are one refusal, in like time. */
export async function signIn(ctx: Ctx, tried: PasswordTry): Promise<Result<SignedIn, SignInRefusal>> {
	const email = tried.email.trim().toLowerCase();
	const wait = (await countTry(ctx, 'address', tried.address)) ?? (await countTry(ctx, 'account', email));
	if (wait !== null) return err({ code: 'too-many', waitSeconds: wait });
	const person = await findStaffByEmail(ctx.db, email);
	const usable = person !== null && !person.isDisabled;
	const fits = await verifyPassword(usable ? person.passwordHash : null, tried.password);
	if (!usable || !fits) {
		if (person) await record(ctx, person, 'session.refused', 'password');
		return err({ code: 'wrong' });
	}
	await giveBackTry(ctx, 'address', tried.address);
	await forgetTries(ctx, 'account', email);
	await endSession(ctx, tried.oldSessionId);
	const needsCode = person.totpSecret !== null;
	const { cookie } = await startSession(ctx, person.id, !needsCode);
	if (!needsCode) await record(ctx, person, 'session.started');
	return ok({ cookie, needsCode });
}

/** Judges the one-time code of a half session and puts a complete session under a new id in its place. */
export async function signInWithCode(
	ctx: Ctx,
	half: { readonly sessionId: string; readonly staffId: string },
	code: string
): Promise<Result<SignedIn, SignInRefusal>> {
	const wait = await countTry(ctx, 'code', half.staffId);
	if (wait !== null) return err({ code: 'too-many', waitSeconds: wait });
	const person = await findStaff(ctx.db, half.staffId);
	if (person === null || person.isDisabled || !(await spendCode(ctx, person, code))) {
		if (person) await record(ctx, person, 'session.refused', 'second factor');
		return err({ code: 'wrong' });
	}
	await forgetTries(ctx, 'code', person.id);
	await endSession(ctx, half.sessionId);
	const { cookie } = await startSession(ctx, person.id, true);
	await record(ctx, person, 'session.started', 'with second factor');
	return ok({ cookie, needsCode: false });
}

/** Whether the code fits the person's second factor; if so it is spent. */
export async function spendCode(ctx: Ctx, person: Staff, code: string): Promise<boolean> {
	const secret = person.totpSecret === null ? null : unseal(ctx.config, person.totpSecret, person.id);
	if (secret === null) return false;
	const lastStep = person.totpLastStep === null ? null : Number(person.totpLastStep);
	const step = await acceptedStep(secret, code, { now: ctx.clock.now(), lastStep });
	return step !== null && spendCodeStep(ctx, person.id, step);
}

const record = (
	ctx: Ctx,
	person: Staff,
	action: 'session.started' | 'session.refused',
	detail?: string
): Promise<void> =>
	recordAccess(ctx.db, ctx, { organisationId: person.organisationId, staffId: person.id, action, detail });
