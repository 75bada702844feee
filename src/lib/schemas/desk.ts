import { z } from 'zod';
import { ATTEMPT_CHANNELS, ATTEMPT_OUTCOMES } from '../domain/followup/attempt';
import { QUEUE_GROUPS } from '../domain/followup/desk-queue';
import { VISIT_KINDS, type VisitKind } from '../domain/followup/visit';

const recordId = z.string().regex(/^[a-z0-9]{1,16}$/, 'This is not one of the choices.');
const words = (most: number, ask: string) =>
	z.string().trim().min(1, ask).max(most, `At most ${most} characters.`);

/** Rows that the queue shows before somebody asks for more. */
export const QUEUE_PAGE = 100;

/** A choice in an address that nobody made, or made wrong, is no choice. */
const maybe = <T extends z.ZodType>(schema: T) => schema.optional().catch(undefined);

export const queueQuerySchema = z.object({
	clinic: maybe(recordId),
	show: maybe(z.enum(QUEUE_GROUPS)),
	rows: z.coerce.number().int().min(1).max(2000).catch(QUEUE_PAGE)
});

export const dayQuerySchema = z.object({
	clinic: maybe(recordId),
	on: maybe(z.iso.date()),
	for: maybe(recordId),
	place: maybe(z.string().max(60))
});

/** A place in a form is one word: its instant and its kind of visit. */
export const placeWord = (startsAt: Date, kind: VisitKind): string => `${startsAt.toISOString()} ${kind}`;

/** The place that a word stands for; null for any other word. */
export function placeOfWord(word: string): { readonly startsAt: Date; readonly kind: VisitKind } | null {
	const [instant, kindWord] = word.split(' ');
	const startsAt = new Date(instant ?? '');
	const kind = VISIT_KINDS.find((known) => known === kindWord);
	return kind && !Number.isNaN(startsAt.getTime()) ? { startsAt, kind } : null;
}

const place = z.string().refine((word) => placeOfWord(word) !== null, 'Choose a place.');
const whyNot = z.string().trim().max(300, 'At most 300 characters.').default('');

export const logSchema = z.object({
	carerId: z.union([recordId, z.literal('')]).default(''),
	channel: z.enum(ATTEMPT_CHANNELS, 'Say how you tried.').default('call'),
	/** Nothing is chosen beforehand: a slip would say that a family was reached. */
	outcome: z
		.enum(ATTEMPT_OUTCOMES, 'Say what came of it.')
		.nullable()
		.default(null)
		.refine((outcome) => outcome !== null, 'Say what came of it.'),
	note: z.string().trim().max(500, 'At most 500 characters.').default('')
});

export const bookSchema = z.object({ place, outsideWindowWhy: whyNot });

export const moveSchema = z.object({
	place,
	why: words(300, 'Say why the visit moves, in a few words.'),
	outsideWindowWhy: whyNot
});

export const cancelSchema = z.object({ why: words(300, 'Say why the visit is cancelled.') });

export const settleSchema = z.object({
	alertId: recordId,
	how: words(300, 'Say how it was settled, in a few words.')
});

export const askOutsideSchema = z.object({
	place,
	why: words(300, 'Say why a time outside the window is needed.')
});

export const approveOutsideSchema = z.object({
	alertId: recordId,
	why: words(300, 'Say why a time outside the window is right.')
});

export const placesQuerySchema = z.object({
	clinicId: recordId,
	from: z.iso.datetime({ offset: true }).transform((text) => new Date(text)),
	until: z.iso.datetime({ offset: true }).transform((text) => new Date(text))
});

export const searchQuerySchema = z.object({ q: z.string().trim().max(120).default('') });

/** What was done last, told on the page that follows; a closed list, so that an address cannot put words there. */
export const DONE = {
	logged: 'The try was written down.',
	booked: 'The visit is booked. The family is told by message.',
	moved: 'The visit was moved. The family is told by message.',
	cancelled: 'The visit was cancelled. A new one is owed.',
	confirmed: 'Marked as confirmed.',
	arrived: 'Marked as arrived. The pediatrician is owed the value.',
	missed: 'Marked as did not come. The family has to be reached.',
	settled: 'Settled.',
	asked: 'The pediatrician was asked. Nothing is booked until the answer comes.',
	approved: 'Approved and booked.',
	textAssigned: 'The text is in the thread with this family. Reading it is owed here now.',
	notOurs: 'Marked as not one of ours. Nobody owes it any more.'
} as const;
export type Done = keyof typeof DONE;

export const doneWords = (word: string | null): string | null =>
	Object.entries(DONE).find(([known]) => known === word)?.[1] ?? null;

/** A place chosen on the calendar: to book it, or, where a visit stands, to move that one here. */
export const chooseSchema = z.object({ place, why: whyNot, outsideWindowWhy: whyNot });

/** A button on the morning list. */
export const markSchema = z.object({ followUpId: recordId });
