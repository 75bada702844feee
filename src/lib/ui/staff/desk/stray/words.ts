import type { StrayAnswer } from '../../../../schemas/stray';

/** What became of the automatic emergency advice; nothing where none was asked for. */
export const ADVICE_WORDS: Readonly<Record<StrayAnswer, string | null>> = {
	none: null,
	'on-its-way': 'The emergency advice is on its way to this number.',
	sent: 'The emergency advice was sent to this number.',
	'not-sent': 'The emergency advice could not be sent to this number.'
};

/** The address part by which a number's link is found again after its panel is closed. */
export const strayLinkId = (entryId: string): string => `stray-${entryId}`;
