import type {
	AssessmentInput,
	BilirubinUnit,
	Caution,
	Disposition,
	Measurement,
	PhototherapyCourse,
	StandardId,
	TraceStep,
	WindowTest
} from './types';

/** A published sentence in our words, with its place in print and how sure we are of it. */
export interface Rule {
	readonly says: string;
	readonly source: string;
	readonly confidence: TraceStep['confidence'];
}

/** How far a value has got: below the line, or at which line. */
export type Zone = 'below' | 'phototherapy' | 'escalate' | 'exchange';

/** The lines at one age. Units are the standard's; `escalation` is NaN where the standard has none. */
export interface Lines {
	readonly phototherapy: number;
	readonly escalation: number;
	readonly exchange: number;
}

/** A measurement held against the lines of its own age, in the standard's unit. */
export interface Reading {
	readonly index: number;
	readonly measurement: Measurement;
	readonly atMs: number;
	readonly ageMs: number;
	readonly serum: boolean;
	readonly total: number;
	readonly lines: Lines;
	/** Phototherapy line minus total, rounded to the standard's step. */
	readonly difference: number;
	readonly zone: Zone;
	/** At or over the phototherapy line (NICE treats "over", but asks for serum from "at"). */
	readonly atLine: boolean;
	/** Rule that forbids deciding on this value. */
	distrust: string | null;
	/** Rule that asks for a serum value to confirm this one. */
	readonly confirm: string | null;
}

/** What is known of phototherapy, courses in order of time. */
export interface Treatment {
	readonly courses: readonly PhototherapyCourse[];
	readonly last: PhototherapyCourse | null;
	readonly running: boolean;
	/** When the last course ended; NaN without a course or while it runs. */
	readonly stopMs: number;
}

/** The input with what every rule asks for worked out once. Milliseconds are since 1970. */
export interface Case {
	readonly input: AssessmentInput;
	readonly weeks: number;
	/** A neurotoxicity risk is present, listed or by albumin. */
	readonly atRisk: boolean;
	readonly lowAlbumin: boolean;
	readonly bornMs: number;
	readonly dischargeMs: number;
	readonly treatment: Treatment;
}

/** What a rule asks for. Without a window `fromMs` and `untilMs` are NaN. */
export interface Outcome {
	readonly disposition: Disposition;
	readonly rule: string;
	readonly fromMs: number;
	readonly untilMs: number;
	readonly test: WindowTest;
	/** Further rules that moved the window or the test, in order. */
	readonly also: readonly string[];
}

export interface Decision {
	readonly case: Case;
	/** In order of time; of two at one instant the serum value comes last. */
	readonly readings: readonly Reading[];
	readonly deciding: Reading | null;
	readonly outcome: Outcome;
	readonly cautions: readonly Caution[];
}

/** Limits of what a standard covers, each with what to do outside it. */
export interface Coverage {
	readonly firstWeek: number;
	readonly belowWeeks: string;
	readonly firstAgeMs: number;
	readonly beforeFirstAge: string;
	readonly lastAgeMs: number;
	readonly afterLastAge: string;
}

/** Ages in milliseconds: when phototherapy began, and the one asked about. */
export interface StopAsked {
	readonly weeks: number;
	readonly atRisk: boolean;
	readonly startAgeMs: number;
	readonly ageMs: number;
}

/** An age at which persisting jaundice is asked about: for colour of stool and urine, or for a measurement too. */
export interface ProlongedCheck {
	readonly days: number;
	readonly rule: string;
	readonly measures: boolean;
}

/** A standard: one module of this shape and one data file. Add it to `registry.ts`. */
export interface Standard {
	readonly id: StandardId;
	readonly title: string;
	readonly edition: string;
	readonly unit: BilirubinUnit;
	readonly coverage: Coverage;
	readonly rules: Readonly<Record<string, Rule>>;
	/** Whether neurotoxicity risks choose the curve. */
	readonly usesRiskCurves: boolean;
	/** The lines at an age inside the coverage. */
	lines(weeks: number, atRisk: boolean, ageMs: number): Lines;
	/** Names the row of the table that `lines` used, for the trace. */
	lineSource(weeks: number, atRisk: boolean, ageMs: number): string;
	/** The total in the standard's unit, rounded to its step, and its place against the lines. */
	weigh(total: number, lines: Lines): { difference: number; zone: Zone; atLine: boolean };
	confirm(total: number, difference: number): string | null;
	/** Why a transcutaneous value must not decide, given the readings before it; null when it may. */
	distrust(reading: Reading, earlier: readonly Reading[], known: Case): string | null;
	/** Whether a value that must not decide stands so near the line that serum is asked for all the same. */
	isNearLine(reading: Reading): boolean;
	/** What to do about a trusted value below the phototherapy line, apart from any treatment. */
	follow(reading: Reading, readings: readonly Reading[], known: Case): Outcome;
	/** What is still owed after the last course ended; null when done. */
	afterTreatment(readings: readonly Reading[], known: Case): Outcome | null;
	/** What is owed while treatment runs. */
	underTreatment(readings: readonly Reading[], known: Case): Outcome;
	/** Adds what the clinician should see beside the result. */
	caution(decision: Omit<Decision, 'cautions'>, cautions: Caution[]): void;
	/** The total at or below which stopping phototherapy is an option, in the standard's unit; null outside what is printed. */
	stopLevel(asked: StopAsked): number | null;
	/** Limit of the rate of rise per hour for a pair ending at this age, in the standard's unit. */
	rateLimit(endAgeMs: number): { perHour: number; inclusive: boolean; rule: string };
	/** Ages in days at which persisting jaundice is asked about. */
	prolonged(input: Pick<AssessmentInput, 'gestationalAge' | 'feeding'>): readonly ProlongedCheck[];
	/** Direct or conjugated fraction from which the liver question is open, in the standard's unit. */
	readonly raisedDirect: { from: number; inclusive: boolean; rule: string };
}

export const NO_RULES: readonly string[] = [];

/** An outcome without a window. */
export function plain(disposition: Disposition, rule: string, also: readonly string[] = NO_RULES): Outcome {
	return { disposition, rule, fromMs: NaN, untilMs: NaN, test: 'judgement', also };
}

/** The last reading that passes a test, undefined when none does. */
export function lastWhere(
	readings: readonly Reading[],
	passes: (reading: Reading) => boolean
): Reading | undefined {
	for (let i = readings.length - 1; i >= 0; i--) {
		const reading = readings[i];
		if (reading && passes(reading)) return reading;
	}
	return undefined;
}
