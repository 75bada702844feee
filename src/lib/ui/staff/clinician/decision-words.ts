import type { Disposition } from '../../../domain/guideline/types';
import { dispositionLabel } from '../../../format/values';

/** The words of a decision as it is stored. */
export const CHOSEN_WORDS: Readonly<Record<string, string>> = {
	repeat: 'See again in a window',
	treat: 'Phototherapy',
	'check-later': 'Check later',
	close: 'Close'
};

/** "See again in a window, as recommended" or "Close, where the standard gave: Follow up in the window". */
export function decisionWords(one: {
	readonly chosen: string;
	readonly recommended: Disposition;
	readonly isOverride: boolean;
}): string {
	const chosen = CHOSEN_WORDS[one.chosen] ?? one.chosen;
	return one.isOverride
		? `${chosen}, where the standard gave: ${dispositionLabel(one.recommended)}`
		: `${chosen}, as the standard allows (${dispositionLabel(one.recommended)})`;
}
