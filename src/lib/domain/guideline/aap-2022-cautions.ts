import { DAY_MS, HOUR_MS } from './age';
import { stopLevel } from './aap-2022-treatment';
import * as edition from './editions/aap-2022';
import type { Decision } from './standard';
import { showedStopLevel } from './stopping';
import type { Caution, Measurement } from './types';
import { valueIn } from './units';

const CAUTIONS = {
	options: {
		code: 'options-near-line',
		severity: 'warning',
		text: 'Within 2 mg/dL of the line at 24 hours of age or more there are three ways: delay discharge and consider phototherapy; phototherapy at home if every criterion is met; or discharge without phototherapy with close follow-up.',
		source: 'AAP 2022, figure 7'
	},
	'crossing-likely': {
		code: 'crossing-likely',
		severity: 'warning',
		text: 'Of newborns whose last value before discharge was 0 to 1 mg/dL below the line (of 2004), 56 % crossed it afterwards.',
		source: 'Kuzniewicz et al., Pediatrics 2021;147(5):e2020019778'
	},
	'home-not-met': {
		code: 'home-phototherapy-not-met',
		severity: 'notice',
		text: 'Phototherapy at home: at least one criterion is not met (38 weeks or more, 48 hours old or more, no neurotoxicity risk factor, no earlier phototherapy, serum not more than 1 mg/dL over the line).',
		source: 'AAP 2022, from memory; an insurer policy repeats most of it'
	},
	'home-possible': {
		code: 'home-phototherapy-possible',
		severity: 'notice',
		text: 'Phototherapy at home may be considered if the newborn is also well and feeding, an LED device is at home without delay, and serum can be measured every day.',
		source: 'AAP 2022, from memory; an insurer policy repeats most of it'
	},
	escalate: {
		code: 'escalation-of-care',
		severity: 'danger',
		text: 'Emergency: neonatal intensive care; at once total and direct bilirubin, blood count, albumin, chemistries, type and crossmatch; intensive phototherapy and fluids by vein and mouth; serum at least every 2 hours. Immunoglobulin may be given in isoimmune disease.',
		source: 'AAP 2022, escalation of care'
	},
	exchange: {
		code: 'exchange-line',
		severity: 'danger',
		text: 'At or over the exchange line. Exchange is also asked at any value when there are signs of intermediate or advanced bilirubin encephalopathy.',
		source: 'AAP 2022, exchange transfusion'
	},
	workup: {
		code: 'workup',
		severity: 'notice',
		text: 'With phototherapy: hemoglobin, hematocrit or blood count; antiglobulin test if the mother is group O, Rh(D) negative or screen positive; G6PD activity if jaundice is unexplained and rises in spite of treatment, suddenly or late.',
		source: 'AAP 2022, one public copy'
	},
	ratio: {
		code: 'bilirubin-albumin-ratio',
		severity: 'danger',
		text: 'The ratio of bilirubin to albumin has reached the value at which exchange may be considered for this gestational age and risk.',
		source: 'AAP 2022, bilirubin to albumin ratio (two public copies)'
	},
	'measure-again': {
		code: 'measure-at-24-to-48-hours',
		severity: 'warning',
		text: 'Every newborn is measured between 24 and 48 hours of age, or before discharge if that is earlier; the last value here is younger.',
		source: 'AAP 2022 key action statements'
	},
	'stopped-early': {
		code: 'stopped-above-limit',
		severity: 'warning',
		text: 'Before stopping, serum was not shown to be at least 2 mg/dL below the line that applied when phototherapy began: rebound is likelier.',
		source: 'AAP 2022; Pediatrics 2019;144(1):e20183712'
	},
	admit: {
		code: 'admit-from-home',
		severity: 'danger',
		text: 'Under phototherapy at home serum rises while its gap to the line narrows, or is 1 mg/dL or more over the line: admit for phototherapy in hospital, without waiting for the next daily value.',
		source: 'AAP 2022, home phototherapy (one public copy)'
	},
	conjugated: {
		code: 'conjugated-or-direct',
		severity: 'warning',
		text: 'From 0.3 mg/dL a conjugated bilirubin is abnormal, a direct one only from 1.0: ask the laboratory which of the two it reports. If conjugated, this asks about the liver: prompt referral.',
		source: 'AAP 2022, from memory'
	},
	'may-stop': {
		code: 'may-stop-phototherapy',
		severity: 'notice',
		text: 'The last serum value is at least 2 mg/dL below the line that applied when phototherapy began: stopping is an option. Treat longer if rebound is likelier (before 38 weeks, begun before 48 hours, hemolysis).',
		source: 'AAP 2022; hospital pathway summary'
	},
	rebound: {
		code: 'rebound-likelier',
		severity: 'notice',
		text: 'Rebound after stopping is likelier before 38 weeks (10.2 % against 2.5 % when stopped 2 mg/dL below the starting line).',
		source: 'Chang and Newman, Pediatrics 2019;144(1):e20183712'
	}
} as const satisfies Record<string, Caution>;

type Made = Omit<Decision, 'cautions'>;

/** What AAP 2022 wants the clinician to see beside the result. */
export function cautionAap(decision: Made, cautions: Caution[]): void {
	const { outcome, deciding, case: known } = decision;
	if (outcome.disposition === 'exchange') cautions.push(CAUTIONS.exchange);
	if (outcome.disposition === 'exchange' || outcome.disposition === 'escalate')
		cautions.push(CAUTIONS.escalate);
	if (outcome.rule === 'zone.phototherapy') cautions.push(CAUTIONS.workup);
	if (isLikelyToCross(decision)) cautions.push(CAUTIONS['crossing-likely']);
	cautionHome(decision, cautions);
	if (deciding && ratioReached(decision)) cautions.push(CAUTIONS.ratio);
	if (
		deciding &&
		deciding.ageMs < DAY_MS &&
		known.dischargeMs > known.bornMs + DAY_MS &&
		known.treatment.last === null
	) {
		cautions.push(CAUTIONS['measure-again']);
	}
	if (known.treatment.last) cautionTreatment(decision, cautions);
	if (known.input.bilirubin.some(isPerhapsConjugated)) cautions.push(CAUTIONS.conjugated);
}

/** Abnormal if it is a conjugated value, normal if it is a direct one. */
function isPerhapsConjugated({ direct, unit }: Measurement): boolean {
	if (direct === undefined) return false;
	const tenths = Math.round(valueIn(direct, unit, 'mg/dL') * 10);
	return tenths >= edition.CONJUGATED_FROM_TENTHS && tenths < edition.DIRECT_FROM_TENTHS;
}

/** The study took newborns without treatment in the birth stay and their last value before discharge. */
function isLikelyToCross({ deciding, case: known }: Made): boolean {
	if (!deciding || deciding.zone !== 'below' || deciding.atMs > known.dischargeMs) return false;
	return (
		known.treatment.last === null && Math.round(deciding.difference * 10) <= edition.CROSSING_WITHIN_TENTHS
	);
}

function cautionHome({ outcome, deciding, case: known }: Made, cautions: Caution[]): void {
	const isNear = outcome.rule === 'figure-7.0.1-1.9';
	const isOver =
		outcome.rule === 'zone.phototherapy' && deciding !== null && deciding.atMs > known.dischargeMs;
	if (isNear) cautions.push(CAUTIONS.options);
	if (!deciding || (!isNear && !isOver)) return;
	const isMet =
		known.weeks >= edition.HOME.fromWeek &&
		deciding.ageMs >= edition.HOME.fromHours * HOUR_MS &&
		!known.atRisk &&
		known.treatment.last === null &&
		Math.round(deciding.difference * 10) >= -edition.HOME.overLineTenths;
	cautions.push(isMet ? CAUTIONS['home-possible'] : CAUTIONS['home-not-met']);
}

/** The cut-off of the bilirubin to albumin ratio for gestational age and risk. */
export function albuminRatioLimit(weeks: number, atRisk: boolean): number {
	const { termNoRisk, termRisk, earlyNoRisk, earlyRisk } = edition.ALBUMIN_RATIO;
	if (weeks >= 38) return atRisk ? termRisk : termNoRisk;
	return atRisk ? earlyRisk : earlyNoRisk;
}

/**
 * Whether bilirubin (mg/dL) to albumin (g/dL) has reached the ratio at which exchange may be considered.
 * `albuminRatioReached({ total: 24, albumin: 3, weeks: 39, atRisk: false })` is true (8.0).
 */
export function albuminRatioReached(known: {
	total: number;
	albumin: number;
	weeks: number;
	atRisk: boolean;
}): boolean {
	return known.total / known.albumin >= albuminRatioLimit(known.weeks, known.atRisk) - 1e-9;
}

function ratioReached({ deciding, case: known }: Made): boolean {
	const albumin = known.input.albuminGramsPerDecilitre;
	if (albumin === undefined || !deciding) return false;
	return albuminRatioReached({ total: deciding.total, albumin, weeks: known.weeks, atRisk: known.atRisk });
}

function cautionTreatment({ readings, outcome, case: known }: Made, cautions: Caution[]): void {
	const { running } = known.treatment;
	const isLow = showedStopLevel(readings, known, { stopLevel });
	if (outcome.rule === 'treatment.home-admit') cautions.push(CAUTIONS.admit);
	else if (running && isLow) cautions.push(CAUTIONS['may-stop']);
	if (!running && !isLow) cautions.push(CAUTIONS['stopped-early']);
	if (!running && known.weeks < 38) cautions.push(CAUTIONS.rebound);
}
