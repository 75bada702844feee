/** The vocabulary of the guideline engine. Names in `AssessmentInput` and `Disposition` are a published interface. */

export const STANDARD_IDS = ['aap-2022', 'nice-cg98'] as const;
export type StandardId = (typeof STANDARD_IDS)[number];
export type BilirubinUnit = 'mg/dL' | 'umol/L';
export type Method = 'serum' | 'transcutaneous';
export type Feeding = 'breast' | 'formula' | 'mixed';

/** A bilirubin concentration: never a bare number. */
export interface Bilirubin {
	readonly value: number;
	readonly unit: BilirubinUnit;
}

export const NEUROTOXICITY_RISKS = [
	'isoimmune-hemolysis',
	'g6pd-deficiency',
	'other-hemolysis',
	'sepsis',
	'clinical-instability',
	'low-albumin'
] as const;
export type NeurotoxicityRisk = (typeof NEUROTOXICITY_RISKS)[number];

/** Risk factors for developing significant hyperbilirubinemia (they raise attention, they do not choose the curve). */
export const JAUNDICE_RISKS = [
	'jaundice-in-first-24-hours',
	'predischarge-bilirubin-near-threshold',
	'hemolysis-suspected',
	'phototherapy-before-discharge',
	'sibling-or-parent-treated',
	'family-red-cell-disorder',
	'exclusive-breastfeeding-low-intake',
	'scalp-hematoma-or-bruising',
	'down-syndrome',
	'macrosomia-maternal-diabetes',
	'ceftriaxone-or-sulfonamide',
	'lipid-infusion'
] as const;
export type JaundiceRisk = (typeof JAUNDICE_RISKS)[number];

/** Completed weeks and days; days 0 to 6. */
export interface GestationalAge {
	readonly weeks: number;
	readonly days: number;
}

export interface Measurement {
	/** Identifies the measurement to the caller; never interpreted. */
	readonly id?: string;
	readonly at: Date;
	readonly method: Method;
	readonly total: number;
	readonly direct?: number;
	readonly unit: BilirubinUnit;
}

export type PhototherapySetting = 'birth-stay' | 'readmission' | 'home';

export interface PhototherapyCourse {
	readonly from: Date;
	/** Absent while treatment is still running. */
	readonly to?: Date;
	readonly setting: PhototherapySetting;
}

export interface AssessmentInput {
	readonly standard: StandardId;
	readonly gestationalAge: GestationalAge;
	readonly bornAt: Date;
	/**
	 * When the newborn goes home, done or planned: from the birth stay, or, for a value taken at a later visit or
	 * readmission, from that one.
	 */
	readonly dischargeAt: Date;
	readonly neurotoxicityRisks: readonly NeurotoxicityRisk[];
	readonly jaundiceRisks: readonly JaundiceRisk[];
	readonly feeding: Feeding;
	readonly albuminGramsPerDecilitre?: number;
	readonly bilirubin: readonly Measurement[];
	readonly phototherapy: readonly PhototherapyCourse[];
	/**
	 * The instant of asking. Given, values in the future are refused; absent, the question of prolonged jaundice is asked
	 * as of the latest measurement.
	 */
	readonly now?: Date;
}

export type Disposition =
	| 'follow-up'
	| 'judgement'
	| 'measure-first'
	| 'confirm-serum'
	| 'delay-discharge'
	| 'phototherapy'
	| 'escalate'
	| 'exchange';

export type WindowTest = 'serum' | 'serum-or-transcutaneous' | 'judgement';

/** When the newborn must be seen or measured again. */
export interface FollowUpWindow {
	readonly from: Date;
	readonly until: Date;
	readonly test: WindowTest;
}

export interface Thresholds {
	readonly phototherapy: number;
	readonly escalation?: number;
	readonly exchange: number;
	readonly unit: BilirubinUnit;
}

/** One step of the reasoning: what went in, the rule, what came out, and where the rule is printed. */
export interface TraceStep {
	readonly rule: string;
	/** The rule in words, for a clinician to read. */
	readonly says: string;
	readonly inputs: Readonly<Record<string, string | number>>;
	readonly output: string;
	/** Document, and table, figure or recommendation number. */
	readonly source: string;
	/** How sure we are of the source: see the guideline README. */
	readonly confidence:
		'printed' | 'transcribed' | 'from memory' | 'common practice, no source' | 'our reading';
}

export type CautionSeverity = 'notice' | 'warning' | 'danger';

/** Something the clinician should see beside the result. */
export interface Caution {
	readonly code: string;
	readonly severity: CautionSeverity;
	readonly text: string;
	readonly source: string;
}

/** A measurement held against the thresholds of its own age. */
export interface MeasurementAssessment {
	readonly measurement: Measurement;
	readonly ageHours: number;
	readonly thresholds: Thresholds;
	/** Phototherapy threshold minus total, in the standard's unit; negative when over the line. */
	readonly difference: number;
	/** False where the standard says not to decide on this value (for instance transcutaneous under phototherapy). */
	readonly trusted: boolean;
	readonly whyNotTrusted?: string;
	readonly mustConfirmBySerum: boolean;
}

/** Rate of rise between two measurements, with the published limit it is held against. */
export interface RateOfRise {
	readonly fromIndex: number;
	readonly toIndex: number;
	readonly perHour: number;
	readonly unit: BilirubinUnit;
	readonly limitPerHour: number;
	readonly exceedsLimit: boolean;
	/** When, at this rate, the phototherapy threshold would be met; a projection, not a finding. */
	readonly projectedCrossingAt?: Date;
}

/** The liver question, apart from the neurotoxicity question. */
export interface DirectFractionFinding {
	readonly status: 'not-due' | 'due' | 'overdue' | 'raised' | 'normal';
	/** When a total with direct fraction is due if jaundice persists. */
	readonly dueAt?: Date;
	readonly text: string;
	readonly source: string;
}

export interface Assessment {
	readonly standard: StandardId;
	readonly edition: string;
	/** Age, thresholds and difference of the measurement that decides; null when nothing was measured. */
	readonly ageHours: number | null;
	readonly thresholds: Thresholds | null;
	readonly difference: number | null;
	readonly decidingIndex: number | null;
	readonly disposition: Disposition;
	readonly window: FollowUpWindow | null;
	readonly measurements: readonly MeasurementAssessment[];
	readonly rates: readonly RateOfRise[];
	readonly directFraction: DirectFractionFinding;
	readonly cautions: readonly Caution[];
	/** Ordered; the last step's output states the disposition and the window. */
	readonly trace: readonly TraceStep[];
}

/** A typed refusal: what is wrong, where, and what to do instead. */
export interface Refusal {
	readonly code: string;
	/** Path of the offending field, for instance `bilirubin[1].total`. */
	readonly field: string;
	readonly message: string;
}

/** One point of a threshold curve, for charts. */
export interface CurvePoint {
	readonly hour: number;
	readonly phototherapy: number;
	readonly escalation?: number;
	readonly exchange: number;
}

// ------------------------------------------------------------------ the parents' check-in

export const YELLOW_AREAS = ['none', 'face', 'chest', 'belly', 'arms-or-legs', 'hands-or-feet'] as const;
export type YellowArea = (typeof YELLOW_AREAS)[number];

export interface CheckInAnswers {
	readonly yellowArea: YellowArea;
	/** Compared with the last look. */
	readonly yellowChange: 'less' | 'same' | 'more' | 'not-sure';
	readonly yellowDepth: 'pale' | 'clear' | 'deep-or-orange' | 'none';
	readonly eyesYellow: 'no' | 'yes' | 'yes-and-more';
	readonly feedsIn24Hours: number;
	readonly wetIn24Hours: number;
	readonly dirtyIn24Hours: number;
	readonly hoursSinceWet: number;
	readonly stoolColour: 'black-or-green' | 'yellow' | 'brown' | 'pale-or-white' | 'none-yet';
	readonly urineColour: 'pale' | 'dark';
	readonly waking: 'wakes-for-feeds' | 'hard-to-wake' | 'cannot-be-woken';
	readonly suck: 'strong' | 'weak' | 'will-not-feed';
	readonly cry: 'normal' | 'high-pitched';
	readonly tone: 'normal' | 'limp' | 'arching';
	readonly breathing: 'normal' | 'pauses';
	readonly seizure: boolean;
	/** Degrees Celsius, absent when not taken. */
	readonly temperatureCelsius?: number;
	/** Grams, absent when not weighed. */
	readonly weightGrams?: number;
	readonly worried: boolean;
}

export type CheckInResult = 'emergency' | 'today' | 'call-back' | 'as-planned';

export interface CheckInReason {
	readonly field: keyof CheckInAnswers;
	readonly result: CheckInResult;
	readonly text: string;
	readonly source: string;
}

export interface CheckInTriage {
	readonly result: CheckInResult;
	/** Every answer that asked for more than `as-planned`, worst first. */
	readonly reasons: readonly CheckInReason[];
}

export interface CheckInContext {
	readonly bornAt: Date;
	readonly now: Date;
	readonly birthWeightGrams?: number;
	/** Sets the age of the prolonged-jaundice question; absent, the earlier one. */
	readonly feeding?: Feeding;
}
