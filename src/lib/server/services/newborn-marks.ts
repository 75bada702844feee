import { timeInWords } from '../wording/field-values';

export interface MarkedNewborn {
	readonly followUpId: string;
	readonly givenName: string;
	readonly bornAt: Date;
	readonly birthTimeZone: string;
}

/** First letter of a name as people see it, so that one outside the basic letters stays whole. */
export const initialOf = (name: string): string => {
	const [first] = new Intl.Segmenter().segment(name.trim());
	return (first?.segment ?? '?').toLocaleUpperCase();
};

/**
 * By what a family tells its newborns apart without a name in a message: the initial, and the time of birth beside it where
 * two have the same.
 */
export function newbornMarks(newborns: readonly MarkedNewborn[]): Map<string, string> {
	const initials = newborns.map(({ givenName }) => initialOf(givenName));
	return new Map(
		newborns.map(({ followUpId, givenName, bornAt, birthTimeZone }) => {
			const initial = initialOf(givenName);
			const isShared = initials.filter((other) => other === initial).length > 1;
			return [followUpId, isShared ? `${initial} (${timeInWords(bornAt, birthTimeZone, 'en')})` : initial];
		})
	);
}
