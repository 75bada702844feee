/** Signs of acute bilirubin encephalopathy as a clinician finds them, each from 0 (none) to 3 (advanced). */
export interface EncephalopathySigns {
	readonly mentalStatus: 0 | 1 | 2 | 3;
	readonly muscleTone: 0 | 1 | 2 | 3;
	readonly cry: 0 | 1 | 2 | 3;
}

export interface EncephalopathyScore {
	readonly score: number;
	readonly grade: 'none' | 'mild' | 'moderate' | 'advanced';
	readonly source: string;
}

/**
 * The BIND score: the sum of the three, 1 to 3 mild, 4 to 6 moderate, 7 to 9 advanced (PMC8467765, table 3). Moderate
 * or advanced signs ask about exchange at any value (AAP 2022). `{ 2, 2, 1 }` is 5, moderate.
 */
export function encephalopathyScore({
	mentalStatus,
	muscleTone,
	cry
}: EncephalopathySigns): EncephalopathyScore {
	const score = mentalStatus + muscleTone + cry;
	const grade = score === 0 ? 'none' : score <= 3 ? 'mild' : score <= 6 ? 'moderate' : 'advanced';
	return { score, grade, source: 'BIND score, PMC8467765 table 3' };
}
