import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { withTx } from '../db/tx';
import { findOpenInvitation, spendInvitation, type OpenInvitation } from '../repos/invitations';
import { findStaff, updateStaff } from '../repos/staff';
import { hashPassword } from './password';
import { countTry, giveBackTry } from './rate-limit';
import type { SignedIn } from './sign-in';
import { endAllSessions, endSession, startSession } from './session';

/** What a link says about its invitation; looking never spends it. Null: unknown, used, expired or withdrawn. */
export async function readInvitation(
	ctx: Ctx,
	token: string,
	address: string
): Promise<OpenInvitation | null> {
	if ((await countTry(ctx, 'invitation', address)) !== null) return null;
	const open = await findOpenInvitation(ctx.db, token, ctx.clock.now());
	if (open) await giveBackTry(ctx, 'invitation', address);
	return open;
}

/** Takes up an invitation: sets the password, spends the link, signs in under a new session. */
export async function acceptInvitation(
	ctx: Ctx,
	{ token, password, oldSessionId }: { token: string; password: string; oldSessionId: string | null }
): Promise<Result<SignedIn, 'gone'>> {
	const passwordHash = await hashPassword(password);
	const accepted = await withTx(ctx.db, async (tx) => {
		const now = ctx.clock.now();
		const open = await findOpenInvitation(tx, token, now);
		if (open === null || !(await spendInvitation(tx, open.id, now))) return null;
		await updateStaff(tx, open.staffId, { passwordHash });
		await recordAccess(tx, ctx, {
			organisationId: open.organisationId,
			staffId: open.staffId,
			action: 'account.invitation-accepted'
		});
		return findStaff(tx, open.staffId);
	});
	if (accepted === null) return err('gone');
	await endSession(ctx, oldSessionId);
	await endAllSessions(ctx, accepted.id);
	// A new password does not stand in for a second factor that is switched on.
	const needsCode = accepted.totpSecret !== null;
	const { cookie } = await startSession(ctx, accepted.id, !needsCode);
	return ok({ cookie, needsCode });
}
