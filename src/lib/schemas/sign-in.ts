import { z } from 'zod';

/** The least length of a password; a long one matters more than odd characters (NIST SP 800-63B). */
export const PASSWORD_LENGTH = 12;

const newPassword = z
	.string()
	.min(PASSWORD_LENGTH, `Choose at least ${PASSWORD_LENGTH} characters: a few words in a row are good.`)
	.max(200, 'This is too long: at most 200 characters.');

const typedPassword = z.string().min(1, 'Type your password.').max(200, 'This is too long to be a password.');

export const signInSchema = z.object({
	email: z.string().trim().min(1, 'Type your e-mail address.').max(200, 'This is too long to be an address.'),
	password: typedPassword
});

export const oneTimeCode = z
	.string()
	.trim()
	.regex(/^\d{3}\s?\d{3}$/, 'Type the 6 digits that your authenticator shows.');

export const codeSchema = z.object({ code: oneTimeCode });

const isRepeated = (value: { password: string; again: string }): boolean => value.password === value.again;
const NOT_REPEATED = { path: ['again'], error: 'The two are not the same.' };

export const invitationSchema = z
	.object({ password: newPassword, again: z.string() })
	.refine(isRepeated, NOT_REPEATED);

export const passwordChangeSchema = z
	.object({ current: typedPassword, password: newPassword, again: z.string() })
	.refine(isRepeated, NOT_REPEATED);

export const factorOnSchema = z.object({ sealed: z.string().min(1).max(400), code: oneTimeCode });

export const factorOffSchema = z.object({ current: typedPassword });
