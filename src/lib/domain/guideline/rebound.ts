import { DAY_MS } from './age';
import { standardOf } from './registry';
import type { Bilirubin, NeurotoxicityRisk, StandardId } from './types';

interface StopRequest {
	readonly standard: StandardId;
	readonly weeks: number;
	readonly neurotoxicityRisks: readonly NeurotoxicityRisk[];
	readonly bornAt: Date;
	/** When phototherapy began; AAP takes the line of that age. */
	readonly startedAt: Date;
	/** The age asked about; NICE takes the line of that age. */
	readonly at: Date;
}

/**
 * The total at or below which stopping phototherapy is an option: AAP 2 mg/dL under the line that applied when it
 * began, NICE 50 µmol/L under the line now. Null outside what is printed. 40 weeks, begun at 48 hours: 15.0 mg/dL.
 */
export function phototherapyStopLevel(request: StopRequest): Bilirubin | null {
	const { standard: id, weeks, neurotoxicityRisks, bornAt, startedAt, at } = request;
	const standard = standardOf(id);
	if (weeks < standard.coverage.firstWeek) return null;
	const value = standard.stopLevel({
		weeks,
		atRisk: neurotoxicityRisks.length > 0,
		startAgeMs: startedAt.getTime() - bornAt.getTime(),
		ageMs: at.getTime() - bornAt.getTime()
	});
	return value === null ? null : { value, unit: standard.unit };
}

export interface ReboundScore {
	readonly score: number;
	/** Observed rebound within 72 hours for scores of this band, in percent; secondary copies. */
	readonly band: string;
	readonly percent: string;
	readonly source: string;
}

const BANDS = [
	{ below: 10, band: '9 or less', percent: '0.3' },
	{ below: 20, band: '10 to 19', percent: '1.8 to 2.8' },
	{ below: 30, band: '20 to 29', percent: '5 to 6' },
	{ below: 40, band: '30 to 39', percent: '17 to 19' },
	{ below: 50, band: '40 to 49', percent: '26 to 33' },
	{ below: Infinity, band: '50 or more', percent: '41 to 49' }
] as const;

/**
 * Published rebound score: 15 if below 38 weeks, minus 7 a day of age at start, minus 4 a mg/dL between the line and
 * the total at the end, plus 50. Its lines are those of 2004, so it is shown, and decides nothing.
 */
export function reboundScore(known: {
	readonly weeks: number;
	readonly startAgeMs: number;
	readonly lineAtEnd: number;
	readonly totalAtEnd: number;
}): ReboundScore {
	const days = known.startAgeMs / DAY_MS;
	const score = (known.weeks < 38 ? 15 : 0) - 7 * days - 4 * (known.lineAtEnd - known.totalAtEnd) + 50;
	const { band, percent } = BANDS.find((one) => score < one.below) ?? BANDS[5];
	return {
		score,
		band,
		percent,
		source: 'Chang et al., Pediatrics 2017;139(3):e20162896; rates from secondary copies'
	};
}
