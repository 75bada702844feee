import type { Rule } from '../standard';
import type { WindowTest } from '../types';

/** Kemper AR et al. Management of hyperbilirubinemia in the newborn infant 35 or more weeks of gestation. */
export const EDITION = 'AAP 2022 (Kemper et al., Pediatrics 2022;150(3):e2022058859)';
const ARTICLE = 'AAP 2022, Pediatrics 2022;150(3):e2022058859';
const STATEMENTS = `${ARTICLE}, key action statements (AAP section page)`;
const FIGURE_7 = `${ARTICLE}, figure 7`;

/**
 * Figure 7: what follows for a difference (phototherapy line minus value, tenths of mg/dL) below each limit.
 * Hours count from the measurement for a test, from discharge or the measurement for a visit.
 */
export interface Band {
	readonly belowTenths: number;
	readonly rule: string;
	readonly fromHours: number;
	readonly untilHours: number;
	readonly test: WindowTest;
}

export const BANDS: readonly Band[] = [
	{ belowTenths: 20, rule: 'figure-7.0.1-1.9', fromHours: 4, untilHours: 24, test: 'serum' },
	{
		belowTenths: 35,
		rule: 'figure-7.2.0-3.4',
		fromHours: 4,
		untilHours: 24,
		test: 'serum-or-transcutaneous'
	},
	{
		belowTenths: 55,
		rule: 'figure-7.3.5-5.4',
		fromHours: 24,
		untilHours: 48,
		test: 'serum-or-transcutaneous'
	},
	{ belowTenths: 70, rule: 'figure-7.5.5-6.9', fromHours: 0, untilHours: 48, test: 'judgement' },
	{ belowTenths: Infinity, rule: 'figure-7.7.0', fromHours: 0, untilHours: 72, test: 'judgement' }
];
/** Bands from this one on ask for a visit, and only for a discharge before `VISIT_BEFORE_HOURS` of age. */
export const VISIT_FROM_TENTHS = 55;
export const VISIT_BEFORE_HOURS = 72;
/** Our reading: where a visit counted from discharge leaves less than this after a later value, it counts from the value. */
export const VISIT_LEAVES_HOURS = 4;
/** The lowest band before 24 hours of age. */
export const DELAY = { beforeHours: 24, fromHours: 4, untilHours: 8, rule: 'figure-7.delay' } as const;
/** The follow-up figure starts at 12 hours; a value before it is followed by one between 24 and 48 hours of age. */
export const EARLY = { beforeHours: 12, fromHours: 24, untilHours: 48, rule: 'before-12-hours' } as const;
export const ESCALATION_BELOW_EXCHANGE_TENTHS = 20;
export const CONFIRM = { withinTenths: 30, fromTenths: 150 } as const;
export const STOP_BELOW_START_LINE_TENTHS = 20;
export const TCB_AFTER_PHOTOTHERAPY_HOURS = 24;
/** After treatment: hours since the end of phototherapy. */
export const AFTER_TREATMENT = {
	soon: { fromHours: 6, untilHours: 12 },
	nextDay: { fromHours: 12, untilHours: 24 },
	days: { fromHours: 24, untilHours: 48 },
	startedBeforeHours: 48
} as const;
/** Direct bilirubin from which the liver question is open, and conjugated bilirubin that is abnormal (from memory). */
export const DIRECT_FROM_TENTHS = 10;
export const CONJUGATED_FROM_TENTHS = 3;
export const HOME_DAILY_HOURS = 24;
export const HOME = { fromWeek: 38, fromHours: 48, overLineTenths: 10, admitOverLineTenths: 10 } as const;
/** Kuzniewicz et al., Pediatrics 2021;147(5):e2020019778: last value 0 to 1 mg/dL below the line. */
export const CROSSING_WITHIN_TENTHS = 10;
export const RATE = { firstDay: 0.3, later: 0.2 } as const;
/** Bilirubin (mg/dL) to albumin (g/dL) ratio at which exchange may be considered. */
export const ALBUMIN_RATIO = { termNoRisk: 8.0, termRisk: 7.2, earlyNoRisk: 7.2, earlyRisk: 6.8 } as const;
const AT_TWO_WEEKS = { days: 14, rule: 'prolonged.formula', measures: true };
const COLOUR_AT_TWO_WEEKS = { days: 14, rule: 'prolonged.colour', measures: false };
const AT_THREE_WEEKS = { days: 21, rule: 'prolonged.breast', measures: true };
/** By feeding; mixed feeding is read as the earlier of the two. */
export const PROLONGED = {
	formula: [AT_TWO_WEEKS],
	mixed: [AT_TWO_WEEKS, AT_THREE_WEEKS],
	breast: [COLOUR_AT_TWO_WEEKS, AT_THREE_WEEKS]
} as const;

export const TABLE_SOURCE = `${ARTICLE}, supplemental hour-by-hour tables`;

export const RULES = {
	thresholds: {
		says: 'The lines for the completed weeks of gestation, with or without a neurotoxicity risk factor, at the completed hour of age. Total bilirubin is used; the direct part is not taken off.',
		source: `${TABLE_SOURCE}; the completed hour is the practice of two public copies, not a printed rule`,
		confidence: 'transcribed'
	},
	'risk-curve': {
		says: 'A neurotoxicity risk factor chooses the lower lines: isoimmune hemolytic disease, G6PD deficiency or other hemolysis, sepsis, clinical instability in the last 24 hours, or albumin under 3.0 g/dL.',
		source: `${ARTICLE}, neurotoxicity risk factors`,
		confidence: 'transcribed'
	},
	'zone.exchange': {
		says: 'Serum bilirubin at or over the exchange line: an emergency; exchange transfusion is to be considered at once, with escalation of care.',
		source: `${ARTICLE}, exchange tables`,
		confidence: 'transcribed'
	},
	'zone.escalate': {
		says: 'Serum bilirubin at or over 2 mg/dL below the exchange line: escalation of care, an emergency.',
		source: `${ARTICLE}, escalation of care`,
		confidence: 'transcribed'
	},
	'zone.phototherapy': {
		says: 'Serum bilirubin at or over the phototherapy line: phototherapy. A value equal to the line counts as reached. In hospital the first serum value follows within 12 hours of starting.',
		source: `${STATEMENTS}; "equal counts" as in public copies`,
		confidence: 'printed'
	},
	'confirm.near-line': {
		says: 'A transcutaneous value at or over the phototherapy line, or within 3 mg/dL below it, is to be confirmed by serum now. Serum, not transcutaneous, decides treatment.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'confirm.high': {
		says: 'A transcutaneous value of 15 mg/dL or more is to be confirmed by serum now.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'confirm.not-trusted': {
		says: 'The only values, or a later value near the line, are ones that must not decide: take serum now.',
		source: 'Follows from the rules on transcutaneous values',
		confidence: 'our reading'
	},
	'distrust.under-phototherapy': {
		says: 'A transcutaneous value taken under phototherapy does not decide.',
		source: `${ARTICLE}, transcutaneous measurement`,
		confidence: 'from memory'
	},
	'distrust.after-phototherapy': {
		says: 'Transcutaneous values may replace serum only once 24 hours have passed since phototherapy stopped.',
		source: `${ARTICLE}, after phototherapy`,
		confidence: 'from memory'
	},
	'distrust.after-serum': {
		says: 'After a serum value at or over the line, not followed by treatment, a transcutaneous value does not undo it.',
		source: `Follows from ${STATEMENTS}: serum decides phototherapy`,
		confidence: 'our reading'
	},
	'figure-7.delay': {
		says: 'Difference 0.1 to 1.9 before 24 hours of age: delay discharge, consider phototherapy, serum bilirubin in 4 to 8 hours.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.0.1-1.9': {
		says: 'Difference 0.1 to 1.9 at 24 hours of age or more: serum bilirubin in 4 to 24 hours; the moment inside it is a clinical and shared decision.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.2.0-3.4': {
		says: 'Difference 2.0 to 3.4: serum or transcutaneous bilirubin in 4 to 24 hours; the moment inside it is a clinical and shared decision.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.3.5-5.4': {
		says: 'Difference 3.5 to 5.4: serum or transcutaneous bilirubin in 1 to 2 days.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.5.5-6.9': {
		says: 'Difference 5.5 to 6.9, discharge before 72 hours of age: a visit within 2 days; whether to measure is a clinical judgement.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.7.0': {
		says: 'Difference 7.0 or more, discharge before 72 hours of age: a visit within 3 days; whether to measure is a clinical judgement.',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'figure-7.judgement': {
		says: 'Difference 5.5 or more, discharge at 72 hours of age or later: follow-up by clinical judgement (examination, risk factors, feeding, weight, family support).',
		source: FIGURE_7,
		confidence: 'transcribed'
	},
	'window.visit-anchor': {
		says: 'The text does not say from when a visit counts; it counts from discharge or from the measurement, whichever ends it earlier.',
		source: `${FIGURE_7}, left open`,
		confidence: 'our reading'
	},
	'window.new-count': {
		says: 'Counted from discharge, less than 4 hours would be left for the visit after this measurement, so it counts from the measurement.',
		source: `${FIGURE_7}, left open`,
		confidence: 'our reading'
	},
	'before-12-hours': {
		says: 'The follow-up figure starts at 12 hours of age: after an earlier value, bilirubin is measured between 24 and 48 hours of age; the earlier limit holds.',
		source: `${STATEMENTS}; ${FIGURE_7}`,
		confidence: 'transcribed'
	},
	'test.serum-after-phototherapy': {
		says: 'The window opens less than 24 hours after phototherapy stopped, so the test is serum.',
		source: `${ARTICLE}, after phototherapy`,
		confidence: 'from memory'
	},
	'measure-first': {
		says: 'No bilirubin was measured: measure transcutaneous or serum bilirubin between 24 and 48 hours of age, or before discharge if that is earlier. No follow-up date can be given without it.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'treatment.running': {
		says: 'Phototherapy is running. In hospital: serum within 12 hours of starting, then by age, risk, level and trend. It may stop once serum is at least 2 mg/dL below the line that applied when it began.',
		source: `${ARTICLE}, phototherapy`,
		confidence: 'transcribed'
	},
	'treatment.home': {
		says: 'Phototherapy at home is running: serum bilirubin every day. Admit if it rises and the gap to the line narrows, or if it is 1 mg/dL or more over the line.',
		source: `${ARTICLE}, home phototherapy`,
		confidence: 'transcribed'
	},
	'treatment.home-admit': {
		says: 'Phototherapy at home, and serum rises while its gap to the line narrows, or is 1 mg/dL or more over the line: admit for phototherapy in hospital.',
		source: `${ARTICLE}, home phototherapy`,
		confidence: 'transcribed'
	},
	'treatment.still-over': {
		says: 'The last value, taken during the treatment that has ended, is still at or over the line.',
		source: `Follows from ${STATEMENTS}`,
		confidence: 'our reading'
	},
	'after.soon': {
		says: 'Treated in the birth stay, and begun before 48 hours of age or with hemolysis known or suspected: serum bilirubin 6 to 12 hours after phototherapy stopped, and again the next day.',
		source: `${ARTICLE}, after phototherapy`,
		confidence: 'transcribed'
	},
	'after.next-day': {
		says: 'Treated in the birth stay (or treated again after it): bilirubin the day after phototherapy stopped. "The next day" is read as 12 to 24 hours after stopping, the earlier reading; until 24 hours the test is serum.',
		source: `${ARTICLE}, after phototherapy; the hours are our reading`,
		confidence: 'from memory'
	},
	'after.spaced': {
		says: 'The first test after stopping was taken late, so the second is asked for within 6 hours of it.',
		source: `${ARTICLE}, after phototherapy, left open`,
		confidence: 'our reading'
	},
	'after.days': {
		says: 'Readmitted without earlier treatment, or treated at home: bilirubin 1 to 2 days after phototherapy stopped, or a clinical visit in that time which decides on one.',
		source: `${ARTICLE}, after phototherapy`,
		confidence: 'from memory'
	},
	'after.figure': {
		says: 'The follow-up figure is printed for newborns without earlier phototherapy; after treatment it is used as well, and the earlier limit holds.',
		source: `${FIGURE_7}, left open`,
		confidence: 'our reading'
	},
	'rate.first-24-hours': {
		says: 'A rise of 0.3 mg/dL an hour or more in the first 24 hours suggests hemolysis.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'rate.later': {
		says: 'A rise of 0.2 mg/dL an hour or more after the first 24 hours suggests hemolysis. A pair that ends after 24 hours is held against this limit.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'direct.raised': {
		says: 'A direct bilirubin of 1.0 mg/dL or more is abnormal at any age and asks about the liver and the flow of bile: prompt referral. It is a separate question from the treatment lines, which use the total.',
		source: `${ARTICLE}; NASPGHAN 2017 (over 1.0 mg/dL)`,
		confidence: 'from memory'
	},
	'prolonged.formula': {
		says: 'Formula-fed and still jaundiced at 2 weeks: measure total and direct (or conjugated) bilirubin. Mixed feeding is read as the earlier of the two.',
		source: STATEMENTS,
		confidence: 'printed'
	},
	'prolonged.colour': {
		says: 'At 2 weeks ask for yellow eyes, pale stools and dark urine; a breastfed newborn who is well, reliably followed, with normal stools and urine may wait to 3 weeks for the measurement.',
		source: 'NASPGHAN 2017; AAP clinical report, Pediatrics 2025;155(3):e2024070077',
		confidence: 'transcribed'
	},
	'prolonged.breast': {
		says: 'Breastfed and still jaundiced at 3 to 4 weeks: measure total and direct (or conjugated) bilirubin. The earlier end, 3 weeks, is used.',
		source: STATEMENTS,
		confidence: 'printed'
	}
} as const satisfies Record<string, Rule>;

export type AapRule = keyof typeof RULES;
