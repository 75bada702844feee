import { HOUR_MS } from './age';
import { EARLIEST_CHECK_MS, isRaisedDirect, liverStatus } from './liver';
import { rapidRise } from './rate';
import { LOW_ALBUMIN_GRAMS_PER_DECILITRE } from './risks';
import type { Decision, Reading, Standard } from './standard';
import type { Caution, JaundiceRisk, Measurement } from './types';
import { valueIn } from './units';

/** The texts are fixed, so that a batch can write them without making them anew; values stand in the trace. */
const SHARED = {
	'untrusted-value': {
		code: 'untrusted-value',
		severity: 'warning',
		text: 'At least one value must not be used to decide; it is marked with the reason.',
		source: 'See the trace'
	},
	'check-unit': {
		code: 'check-unit',
		severity: 'warning',
		text: 'A value in µmol/L is so low that it may have been typed from a report in mg/dL. Check the unit.',
		source: 'common practice, no source'
	},
	'rapid-rise': {
		code: 'rapid-rise',
		severity: 'danger',
		text: 'Bilirubin rises faster than the published limit, which suggests hemolysis. Do a direct antiglobulin test if none was done, and look for the cause.',
		source: 'AAP 2022 key action statements; NICE CG98 (from memory)'
	},
	'rapid-rise-two-methods': {
		code: 'rapid-rise-two-methods',
		severity: 'warning',
		text: 'Bilirubin seems to rise faster than the published limit, but the two values were taken by different methods, which differ by themselves. Repeat by one method.',
		source: 'AAP 2022 key action statements; NICE CG98 (from memory); the reserve is our reading'
	},
	'hearing-test': {
		code: 'hearing-test',
		severity: 'warning',
		text: 'A value reached the exchange line: a risk indicator for later hearing loss. Screen by automated auditory brainstem response and keep monitoring after a pass.',
		source: 'J Early Hear Detect Interv 2024;9(2); diagnostic follow-up by 9 months from memory (JCIH 2019)'
	},
	'direct-raised': {
		code: 'direct-raised',
		severity: 'danger',
		text: 'The direct (conjugated) bilirubin is raised. This asks about the liver and the flow of bile (biliary atresia, hepatitis): prompt referral. It is apart from the treatment lines.',
		source: 'AAP 2022 and NASPGHAN 2017 (1.0 mg/dL); NICE CG98 (25 µmol/L, from memory)'
	},
	'direct-over-half': {
		code: 'direct-over-half',
		severity: 'danger',
		text: 'The direct part is more than half of the total: ask an expert before treating. The total is still held against the lines.',
		source: 'AAP 2022, one public copy'
	},
	'prolonged-due': {
		code: 'prolonged-due',
		severity: 'warning',
		text: 'If still jaundiced at this age: measure total and direct (or conjugated) bilirubin, and ask for pale stools and dark urine.',
		source: 'AAP 2022 key action statements; NICE CG98, prolonged jaundice'
	},
	'low-albumin': {
		code: 'low-albumin',
		severity: 'warning',
		text: 'Albumin is below 3.0 g/dL: more bilirubin is unbound than the number shows. It counts as a neurotoxicity risk factor where the standard has risk curves.',
		source: 'AAP 2022, neurotoxicity risk factors'
	},
	'albumin-differs': {
		code: 'albumin-differs',
		severity: 'notice',
		text: 'Low albumin is listed as a risk, but the value given is 3.0 g/dL or more. The risk was kept; correct whichever is wrong.',
		source: 'our reading'
	},
	'no-lower-line': {
		code: 'no-lower-line',
		severity: 'notice',
		text: 'This standard has no lower lines for neurotoxicity risk factors. Weigh them by clinical judgement.',
		source: 'NICE CG98, threshold table'
	},
	unstable: {
		code: 'unstable',
		severity: 'danger',
		text: 'Sepsis or clinical instability is listed. Follow-up dates are written for newborns who are well enough to go home: review before discharge.',
		source: 'common practice, no source'
	},
	'window-before-discharge': {
		code: 'window-before-discharge',
		severity: 'warning',
		text: 'The window ends before the planned discharge: measure again before the newborn goes home.',
		source: 'our reading'
	},
	'course-missing': {
		code: 'phototherapy-course-missing',
		severity: 'danger',
		text: 'Phototherapy before discharge is listed, but no course is entered. Enter when it began and ended: the tests owed after treatment are missing from this result.',
		source: 'AAP 2022 and NICE CG98, after phototherapy'
	},
	'past-the-lines': {
		code: 'past-the-lines',
		severity: 'warning',
		text: 'The latest value lies past the last published hour, so no line applies to it. A clinician decides; measure total and direct (or conjugated) bilirubin while jaundice lasts.',
		source: 'The published figures of the standard in force end at this age'
	},
	'past-the-lines-high': {
		code: 'past-the-lines-high',
		severity: 'danger',
		text: 'A value past the last published hour would reach the last published phototherapy line. No line is printed for this age, and the value asks for a clinician at once.',
		source: 'our reading: the lines no longer change over their last hours'
	},
	'transcutaneous-very-high': {
		code: 'transcutaneous-very-high',
		severity: 'danger',
		text: 'The transcutaneous value is itself at the escalation or exchange line. Take serum at once and prepare treatment meanwhile.',
		source: 'AAP 2022 and NICE CG98: serum decides; the haste is common practice, no source'
	}
} as const satisfies Record<string, Caution>;

const BY_RISK: Partial<Record<JaundiceRisk, Caution>> = {
	'jaundice-in-first-24-hours': {
		code: 'jaundice-in-first-24-hours',
		severity: 'danger',
		text: 'Jaundice in the first 24 hours is never taken as harmless: measure without delay and look for hemolysis.',
		source: 'AAP 2022 key action statements; NICE CG98'
	},
	'hemolysis-suspected': {
		code: 'hemolysis-suspected',
		severity: 'warning',
		text: 'Hemolysis is suspected: antiglobulin test, blood count, and G6PD activity where ancestry or family history suggests it. Confirmed hemolysis belongs among the neurotoxicity risks.',
		source: 'AAP 2022'
	},
	'family-red-cell-disorder': {
		code: 'family-red-cell-disorder',
		severity: 'notice',
		text: 'Family history or ancestry suggests an inherited red-cell disorder: think of G6PD deficiency when the rise is sudden, late, or goes on under phototherapy.',
		source: 'AAP 2022'
	},
	'scalp-hematoma-or-bruising': {
		code: 'scalp-hematoma-or-bruising',
		severity: 'notice',
		text: 'Blood in a scalp hematoma or bruise is broken down over days: bilirubin may rise later and higher than expected.',
		source: 'AAP 2022, risk factors; the course is common practice, no source'
	},
	'ceftriaxone-or-sulfonamide': {
		code: 'drug-displaces-bilirubin',
		severity: 'danger',
		text: 'Ceftriaxone and sulfonamides displace bilirubin from albumin: avoid them in a newborn with raised bilirubin.',
		source:
			'US label of ceftriaxone (secondary copy); a study of 27 term newborns found no displacement (J Pediatr 2023;254:91); sulfonamides: secondary copies'
	},
	'lipid-infusion': {
		code: 'lipid-infusion',
		severity: 'warning',
		text: 'Free fatty acids from a lipid infusion compete with bilirubin for albumin: more may be unbound than the number shows.',
		source: 'common practice, no source'
	},
	'exclusive-breastfeeding-low-intake': {
		code: 'low-intake',
		severity: 'notice',
		text: 'Exclusive breastfeeding with low intake: help with feeding and check the weight; do not give water or dextrose water to lower bilirubin.',
		source: 'AAP 2022 key action statements'
	}
};

/** Cautions that do not depend on the standard's own rules. */
export function cautionShared(
	decision: Omit<Decision, 'cautions'>,
	standard: Standard,
	cautions: Caution[]
): void {
	const { input } = decision.case;
	for (const risk of input.jaundiceRisks) {
		const caution = BY_RISK[risk];
		if (caution) cautions.push(caution);
	}
	cautionValues(decision, standard, cautions);
	if (decision.case.atRisk) cautionRisks(decision, standard, cautions);
	cautionOutcome(decision, cautions);
	if (decision.outcome.rule === 'past-the-lines') cautionPastTheLines(decision, standard, cautions);
	if (isCourseMissing(decision)) cautions.push(SHARED['course-missing']);
	if (isOfLiverAge(decision)) cautionLiver(decision, standard, cautions);
}

function cautionRisks(
	{ case: known }: Omit<Decision, 'cautions'>,
	standard: Standard,
	cautions: Caution[]
): void {
	const { neurotoxicityRisks, albuminGramsPerDecilitre: albumin } = known.input;
	if (known.lowAlbumin) cautions.push(SHARED['low-albumin']);
	if (
		albumin !== undefined &&
		albumin >= LOW_ALBUMIN_GRAMS_PER_DECILITRE &&
		neurotoxicityRisks.includes('low-albumin')
	) {
		cautions.push(SHARED['albumin-differs']);
	}
	if (!standard.usesRiskCurves) cautions.push(SHARED['no-lower-line']);
	if (neurotoxicityRisks.includes('sepsis') || neurotoxicityRisks.includes('clinical-instability')) {
		cautions.push(SHARED.unstable);
	}
}

function cautionValues(
	{ readings, case: known }: Omit<Decision, 'cautions'>,
	standard: Standard,
	cautions: Caution[]
): void {
	let hasUntrusted = false;
	let reachedExchange = false;
	let isLow = false;
	for (const { measurement, distrust, zone, serum, ageMs } of readings) {
		if (distrust !== null) hasUntrusted = true;
		if (serum && zone === 'exchange') reachedExchange = true;
		if (measurement.unit === 'umol/L' && measurement.total < 30 && ageMs >= 12 * HOUR_MS) isLow = true;
	}
	if (hasUntrusted) cautions.push(SHARED['untrusted-value']);
	if (isLow) cautions.push(SHARED['check-unit']);
	const rapid = rapidRise(readings, standard);
	if (rapid !== 'none')
		cautions.push(SHARED[rapid === 'one-method' ? 'rapid-rise' : 'rapid-rise-two-methods']);
	if (reachedExchange) cautions.push(SHARED['hearing-test']);
	cautionDirect(known.input.bilirubin, standard, cautions);
}

/** The liver question is asked at any age, so of every value, also one past the lines. */
function cautionDirect(bilirubin: readonly Measurement[], standard: Standard, cautions: Caution[]): void {
	let isRaised = false;
	let isOverHalf = false;
	for (const { direct, total, unit } of bilirubin) {
		if (direct === undefined || !isRaisedDirect(valueIn(direct, unit, standard.unit), standard)) continue;
		isRaised = true;
		if (direct * 2 > total) isOverHalf = true;
	}
	if (isRaised) cautions.push(SHARED['direct-raised']);
	if (isOverHalf) cautions.push(SHARED['direct-over-half']);
}

function cautionPastTheLines(
	{ case: known }: Omit<Decision, 'cautions'>,
	standard: Standard,
	cautions: Caution[]
): void {
	const { lastAgeMs } = standard.coverage;
	const last = standard.lines(known.weeks, known.atRisk, lastAgeMs);
	const isHigh = known.input.bilirubin.some(
		({ at, total, unit }) =>
			at.getTime() - known.bornMs > lastAgeMs &&
			standard.weigh(valueIn(total, unit, standard.unit), last).atLine
	);
	cautions.push(SHARED['past-the-lines']);
	if (isHigh) cautions.push(SHARED['past-the-lines-high']);
}

function isCourseMissing({ case: { input, treatment } }: Omit<Decision, 'cautions'>): boolean {
	return (
		input.jaundiceRisks.includes('phototherapy-before-discharge') &&
		!treatment.courses.some(({ setting }) => setting === 'birth-stay')
	);
}

function cautionOutcome(
	{ outcome, deciding, readings, case: known }: Omit<Decision, 'cautions'>,
	cautions: Caution[]
): void {
	if (hasVeryHighSkinValue(deciding, readings)) cautions.push(SHARED['transcutaneous-very-high']);
	const isPlanned = deciding !== null && deciding.atMs <= known.dischargeMs;
	if (isPlanned && outcome.disposition === 'follow-up' && outcome.untilMs <= known.dischargeMs) {
		cautions.push(SHARED['window-before-discharge']);
	}
}

/** A transcutaneous value at an emergency line that no serum value has answered. */
function hasVeryHighSkinValue(deciding: Reading | null, readings: readonly Reading[]): boolean {
	if (deciding === null) return false;
	for (let i = readings.length - 1; i >= 0; i--) {
		const reading = readings[i];
		if (!reading || reading.serum) return false;
		if (reading.zone === 'escalate' || reading.zone === 'exchange') return true;
	}
	return false;
}

/** Before the first check of any standard nothing is due, which is all that most of a batch needs to know. */
function isOfLiverAge({ readings, outcome, case: known }: Omit<Decision, 'cautions'>): boolean {
	if (outcome.rule === 'past-the-lines') return true;
	const askedMs = known.input.now?.getTime() ?? readings[readings.length - 1]?.atMs ?? -Infinity;
	return askedMs - known.bornMs >= EARLIEST_CHECK_MS;
}

function cautionLiver(
	{ case: known }: Omit<Decision, 'cautions'>,
	standard: Standard,
	cautions: Caution[]
): void {
	const liver = liverStatus(known.input, standard);
	if (liver === 'due' || liver === 'overdue') cautions.push(SHARED['prolonged-due']);
}
