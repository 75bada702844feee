import type { StandardId } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { organisations } from '../db/schema/organisation';
import { isDuplicate, withTx } from '../db/tx';
import { invalid, type AppError } from '../errors';
import { insertInvitation } from '../repos/invitations';
import { insertStaff, replaceRoles } from '../repos/staff';
import { INVITATION_DAYS } from './people';
import { installDefaultWording } from './wording';

export interface Founding {
	readonly organisationName: string;
	readonly standard: StandardId;
	readonly emergencyNumber: string;
	readonly administratorName: string;
	readonly administratorEmail: string;
}

/**
 * Begins an organisation: its standard, its wording as drafts, and an administrator who sets a password through the
 * returned link, good for seven days and shown nowhere else. Refused where the e-mail address has an account.
 */
export async function foundOrganisation(
	ctx: Ctx,
	founding: Founding
): Promise<Result<{ readonly link: string }, AppError>> {
	const now = ctx.clock.now();
	const organisationId = ctx.random.id();
	const staffId = ctx.random.id();
	const token = ctx.random.token();
	const { organisationName: name, standard, emergencyNumber } = founding;
	try {
		await withTx(ctx.db, async (tx) => {
			await tx
				.insert(organisations)
				.values({ id: organisationId, name, standard, emergencyNumber, createdAt: now });
			await installDefaultWording(tx, ctx, organisationId);
			const email = founding.administratorEmail.trim().toLowerCase();
			await insertStaff(tx, {
				id: staffId,
				organisationId,
				email,
				name: founding.administratorName,
				createdAt: now
			});
			await replaceRoles(tx, ctx, { staffId, roles: [{ role: 'admin', siteId: null }] });
			const expiresAt = new Date(now.getTime() + INVITATION_DAYS * 24 * 3_600_000);
			await insertInvitation(tx, ctx, { staffId, token, expiresAt, createdBy: staffId });
			await recordAccess(tx, ctx, { organisationId, staffId, action: 'person.invited' });
		});
	} catch (error) {
		if (isDuplicate(error))
			return err(invalid('There is already an account with this address.', 'administratorEmail'));
		throw error;
	}
	return ok({ link: `${ctx.config.origin}/invitation/${token}` });
}
