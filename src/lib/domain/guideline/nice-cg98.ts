import * as edition from './editions/nice-cg98';
import { DAY_MS, HOUR_MS } from './age';
import { cautionNice } from './nice-cg98-cautions';
import { FIRST_WEEK, lines, rounded, rowOf, stopLevel } from './nice-cg98-lines';
import {
	lastWhere,
	plain,
	type Case,
	type Lines,
	type Outcome,
	type Reading,
	type Standard
} from './standard';
import type { WindowTest } from './types';

const RATE_LIMIT = { perHour: edition.RATE_PER_HOUR, inclusive: false, rule: 'rate' };
const TERM_CHECKS = [{ days: edition.PROLONGED.termDays, rule: 'prolonged.term', measures: true }];
const PRETERM_CHECKS = [{ days: edition.PROLONGED.pretermDays, rule: 'prolonged.preterm', measures: true }];

/** Differences to 0.1 µmol/L; "over" the line, so that a value equal to it is not treated. */
function weigh(total: number, at: Lines): ReturnType<Standard['weigh']> {
	const difference = rounded(at.phototherapy - total) + 0;
	const zone = rounded(total - at.exchange) > 0 ? 'exchange' : difference < 0 ? 'phototherapy' : 'below';
	return { difference, zone, atLine: difference <= 0 };
}

function confirm(total: number, difference: number): string | null {
	if (difference <= 0) return 'confirm.at-line';
	return rounded(total) > edition.SERUM_ONLY.overMicromoles ? 'confirm.high' : null;
}

function distrust(reading: Reading, earlier: readonly Reading[], known: Case): string | null {
	if (known.weeks < edition.SERUM_ONLY.belowWeek) return 'distrust.preterm';
	if (reading.ageMs <= edition.SERUM_ONLY.untilHours * HOUR_MS) return 'distrust.first-24-hours';
	if (known.treatment.courses.some((course) => course.from.getTime() <= reading.atMs)) {
		return 'distrust.after-phototherapy';
	}
	return earlier.some((other) => other.atLine) ? 'distrust.after-line' : null;
}

function follow(reading: Reading, readings: readonly Reading[], known: Case): Outcome {
	const test = testFor(reading, known);
	if (inFirstDay(reading, known) && !isSteady(reading, readings)) {
		return within(reading, edition.FIRST_DAY_REPEAT_HOURS, 'serum', 'first-24-hours');
	}
	if (reading.difference > edition.REPEAT.withinMicromoles) return plain('judgement', 'no-routine-repeat');
	if (known.weeks < edition.REPEAT.fromWeek) {
		return within(reading, edition.REPEAT.withRiskHours, test, 'repeat.preterm');
	}
	const hasRisk =
		known.input.feeding === 'breast' || known.input.jaundiceRisks.includes('sibling-or-parent-treated');
	return hasRisk
		? within(reading, edition.REPEAT.withRiskHours, test, 'repeat.18-hours')
		: within(reading, edition.REPEAT.withoutRiskHours, test, 'repeat.24-hours');
}

function inFirstDay(reading: Reading, known: Case): boolean {
	return (
		reading.ageMs <= edition.SERUM_ONLY.untilHours * HOUR_MS ||
		known.input.jaundiceRisks.includes('jaundice-in-first-24-hours')
	);
}

/** Steady or falling: not above the serum value before it. A single value shows neither. */
function isSteady(reading: Reading, readings: readonly Reading[]): boolean {
	const before = lastWhere(readings, (other) => other.serum && other.atMs < reading.atMs);
	return before !== undefined && rounded(reading.total) <= rounded(before.total);
}

/** Transcutaneous values are allowed at 35 weeks or more, after 24 hours, before any treatment or line. */
function testFor(reading: Reading, known: Case): WindowTest {
	const isAllowed =
		known.weeks >= edition.SERUM_ONLY.belowWeek &&
		reading.ageMs > edition.SERUM_ONLY.untilHours * HOUR_MS &&
		known.treatment.last === null &&
		!reading.atLine;
	return isAllowed ? 'serum-or-transcutaneous' : 'serum';
}

function within(reading: Reading, hours: number, test: WindowTest, rule: edition.NiceRule): Outcome {
	return {
		disposition: 'follow-up',
		rule,
		fromMs: reading.atMs,
		untilMs: reading.atMs + hours * HOUR_MS,
		test,
		also: []
	};
}

function afterTreatment(readings: readonly Reading[], known: Case): Outcome | null {
	const { stopMs } = known.treatment;
	const fromMs = stopMs + edition.REBOUND.fromHours * HOUR_MS;
	if (readings.some((reading) => reading.serum && reading.atMs >= fromMs)) return null;
	const untilMs = stopMs + edition.REBOUND.untilHours * HOUR_MS;
	return { disposition: 'follow-up', rule: 'after.rebound', fromMs, untilMs, test: 'serum', also: [] };
}

/** NICE CG98: 23+0 weeks and up, µmol/L, from birth to 28 days. */
export const niceCg98: Standard = {
	id: 'nice-cg98',
	title: 'NICE CG98',
	edition: edition.EDITION,
	unit: 'umol/L',
	coverage: {
		firstWeek: FIRST_WEEK,
		belowWeeks: 'NICE CG98 prints lines from 23 weeks of gestation. Ask a neonatologist.',
		firstAgeMs: 0,
		beforeFirstAge: 'Correct the instant of birth or of the measurement.',
		lastAgeMs: edition.LAST_AGE_DAYS * DAY_MS,
		afterLastAge:
			'NICE CG98 covers newborns under 28 days. Leave this value out of the assessment and follow the rules on prolonged jaundice: a clinician decides.'
	},
	rules: edition.RULES,
	usesRiskCurves: false,
	lines,
	lineSource: (weeks) => `row of ${rowOf(weeks)} weeks${weeks >= 38 ? ' or more' : ''}`,
	weigh,
	confirm,
	distrust,
	isNearLine: ({ confirm: asks, difference }) =>
		asks !== null || difference <= edition.REPEAT.withinMicromoles,
	follow,
	afterTreatment,
	underTreatment: () => plain('phototherapy', 'treatment.running'),
	caution: cautionNice,
	stopLevel,
	rateLimit: () => RATE_LIMIT,
	prolonged: ({ gestationalAge }) =>
		gestationalAge.weeks >= edition.PROLONGED.termFromWeek ? TERM_CHECKS : PRETERM_CHECKS,
	raisedDirect: { from: edition.RAISED_CONJUGATED_MICROMOLES, inclusive: false, rule: 'direct.raised' }
};
