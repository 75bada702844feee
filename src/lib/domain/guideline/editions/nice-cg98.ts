import type { Rule } from '../standard';

export const EDITION = 'NICE CG98 (2010, updated to October 2023)';
const GUIDELINE = 'NICE CG98 Jaundice in newborn babies under 28 days';
const FULL = 'NICE CG98 full guideline 2010';
const SUMMARY = 'NICE CG98 (2016 wording) in a GP reference summary';

/** Rules in µmol/L and hours. */
export const SERUM_ONLY = { untilHours: 24, belowWeek: 35, overMicromoles: 250 } as const;
export const REPEAT = {
	withinMicromoles: 50,
	withRiskHours: 18,
	withoutRiskHours: 24,
	fromWeek: 38
} as const;
export const FIRST_DAY_REPEAT_HOURS = 6;
export const REBOUND = { fromHours: 12, untilHours: 18 } as const;
export const STOP_BELOW_LINE_MICROMOLES = 50;
export const RATE_PER_HOUR = 8.5;
export const KERNICTERUS = { overMicromoles: 340, fromWeek: 37 } as const;
export const INTENSIFY = { withinMicromoles: 50, fromHours: 72 } as const;
export const EXTRA_LOOK_UNTIL_HOURS = 48;
export const RAISED_CONJUGATED_MICROMOLES = 25;
export const PROLONGED = { termDays: 14, pretermDays: 21, termFromWeek: 37 } as const;
export const LAST_AGE_DAYS = 28;

export const TABLE_SOURCE = `${GUIDELINE}, threshold table (38 weeks or more) and treatment threshold graphs (23 to 37 weeks)`;

export const RULES = {
	thresholds: {
		says: 'The treatment lines for the completed weeks of gestation at this age: the printed six-hourly values at 38 weeks or more, the graph from birth to 72 hours below, straight between points and flat after the last. Total bilirubin is used.',
		source: TABLE_SOURCE,
		confidence: 'transcribed'
	},
	'zone.exchange': {
		says: 'Serum bilirubin over the exchange line: exchange transfusion with intensified phototherapy, an emergency.',
		source: TABLE_SOURCE,
		confidence: 'printed'
	},
	'zone.escalate': {
		says: 'This standard has no separate escalation line.',
		source: TABLE_SOURCE,
		confidence: 'printed'
	},
	'zone.phototherapy': {
		says: 'Serum bilirubin over the phototherapy line: phototherapy. Serum again 4 to 6 hours after starting, then every 6 to 12 hours once steady or falling.',
		source: `${TABLE_SOURCE}; the intervals from memory`,
		confidence: 'printed'
	},
	'confirm.at-line': {
		says: 'A transcutaneous value at or over a treatment line is to be followed by serum, as is every later value.',
		source: `${FULL} p. 115; ${SUMMARY}`,
		confidence: 'printed'
	},
	'confirm.high': {
		says: 'A transcutaneous value over 250 µmol/L is to be confirmed by serum.',
		source: `${FULL} p. 115; ${SUMMARY}`,
		confidence: 'printed'
	},
	'confirm.not-trusted': {
		says: 'The only values, or a later value near the line, are ones that must not decide: take serum now.',
		source: 'Follows from the rules on transcutaneous values',
		confidence: 'our reading'
	},
	'distrust.first-24-hours': {
		says: 'In the first 24 hours only serum is used.',
		source: `${FULL} p. 115; ${SUMMARY}`,
		confidence: 'printed'
	},
	'distrust.preterm': {
		says: 'Below 35 weeks of gestation only serum is used.',
		source: `${FULL} p. 115; ${SUMMARY}`,
		confidence: 'printed'
	},
	'distrust.after-line': {
		says: 'Once a value was at or over a treatment line, every later value is serum.',
		source: `${FULL} p. 115; ${SUMMARY}`,
		confidence: 'printed'
	},
	'distrust.after-phototherapy': {
		says: 'From the start of phototherapy on, every value is serum: treatment means that a line was reached.',
		source: `${FULL} p. 115; ${SUMMARY}; applied to every treated newborn`,
		confidence: 'our reading'
	},
	'first-24-hours': {
		says: 'Jaundice in the first 24 hours: serum every 6 hours until it is below the line and steady or falling, with a medical review within 6 hours. A value taken in the first 24 hours is read as jaundice suspected then.',
		source: `${FULL} p. 13; NICE QS57`,
		confidence: 'printed'
	},
	'repeat.18-hours': {
		says: 'At 38 weeks or more, over 24 hours old and well, within 50 µmol/L below the phototherapy line, with a brother or sister who needed phototherapy or exclusive breastfeeding intended: measure again within 18 hours.',
		source: SUMMARY,
		confidence: 'transcribed'
	},
	'repeat.24-hours': {
		says: 'At 38 weeks or more, over 24 hours old and well, within 50 µmol/L below the phototherapy line, without those risk factors: measure again within 24 hours.',
		source: SUMMARY,
		confidence: 'transcribed'
	},
	'repeat.preterm': {
		says: 'Within 50 µmol/L below the phototherapy line before 38 weeks: no interval is printed; the shorter one for term newborns, 18 hours, is used.',
		source: `${SUMMARY}, left open`,
		confidence: 'our reading'
	},
	'no-routine-repeat': {
		says: 'More than 50 µmol/L below the phototherapy line: no routine repeat; whether and when to look again is a clinical judgement.',
		source: SUMMARY,
		confidence: 'transcribed'
	},
	'measure-first': {
		says: 'No bilirubin was measured. Measure within 6 hours if the newborn is or looks jaundiced (serum within 2 hours in the first 24 hours); do not judge by eye. No follow-up date can be given without a value.',
		source: `${FULL} p. 13; NICE QS57`,
		confidence: 'printed'
	},
	'treatment.running': {
		says: 'Phototherapy is running: serum 4 to 6 hours after starting, then every 6 to 12 hours once steady or falling. Stop at 50 µmol/L or more below the line.',
		source: `${FULL} p. 135; the intervals from memory`,
		confidence: 'printed'
	},
	'treatment.still-over': {
		says: 'The last value, taken during the treatment that has ended, is still over the line.',
		source: `Follows from ${FULL} p. 135`,
		confidence: 'our reading'
	},
	'after.rebound': {
		says: 'Serum bilirubin 12 to 18 hours after phototherapy stopped, for rebound.',
		source: `${FULL} p. 135`,
		confidence: 'printed'
	},
	'after.figure': {
		says: 'After the rebound test the rules for values below the line hold; the earlier limit counts.',
		source: `${GUIDELINE}, left open`,
		confidence: 'our reading'
	},
	rate: {
		says: 'A rise of more than 8.5 µmol/L an hour raises the risk of kernicterus and calls for intensified phototherapy.',
		source: GUIDELINE,
		confidence: 'from memory'
	},
	'direct.raised': {
		says: 'A conjugated bilirubin over 25 µmol/L asks about the liver and the flow of bile: expert advice promptly. It is a separate question from the treatment lines, which use the total.',
		source: GUIDELINE,
		confidence: 'from memory'
	},
	'prolonged.term': {
		says: 'Jaundice for more than 14 days at 37 weeks or more: look for pale stools and dark urine, measure conjugated bilirubin, blood count, blood group and antiglobulin test, check the metabolic screening.',
		source: `${GUIDELINE}, prolonged jaundice`,
		confidence: 'transcribed'
	},
	'prolonged.preterm': {
		says: 'Jaundice for more than 21 days before 37 weeks: look for pale stools and dark urine, measure conjugated bilirubin, blood count, blood group and antiglobulin test, check the metabolic screening.',
		source: `${GUIDELINE}, prolonged jaundice`,
		confidence: 'transcribed'
	}
} as const satisfies Record<string, Rule>;

export type NiceRule = keyof typeof RULES;
