import { z } from 'zod';
import { CHANNELS, MESSAGE_KINDS } from '../domain/messaging/kinds';
import { LANGUAGES } from '../domain/messaging/language';

/** Which wording: from the address of its page. */
export const wordingPlaceSchema = z.object({
	kind: z.enum(MESSAGE_KINDS),
	channel: z.enum(CHANNELS),
	language: z.enum(LANGUAGES)
});

/** Changed words; `basedOn` is the version that was on the screen. */
export const wordingSchema = z.object({
	subject: z.string().trim().max(200, 'Keep the subject under 200 characters.').default(''),
	body: z
		.string()
		.transform((text) => text.replace(/\r\n/g, '\n').trim())
		.pipe(z.string().min(1, 'The text is empty.').max(4000, 'Keep the text under 4000 characters.')),
	basedOn: z.coerce.number().int().min(1)
});

/** Who reviewed the words in use; without a name the mark is taken back. */
export const reviewSchema = z.object({
	version: z.coerce.number().int().min(1),
	reviewedBy: z.string().trim().max(120, 'Keep it under 120 characters.').default('')
});

/** An earlier version that is to be used again. */
export const restoreSchema = z.object({ version: z.coerce.number().int().min(1) });
