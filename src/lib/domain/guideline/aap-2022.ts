import * as edition from './editions/aap-2022';
import { cautionAap } from './aap-2022-cautions';
import { HOUR_MS } from './age';
import { exchangeCurve, FIRST_HOUR, LAST_HOUR, lines, photoCurve } from './aap-2022-lines';
import { afterTreatment, rateLimit, stopLevel, underTreatment } from './aap-2022-treatment';
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

/** Tenths of mg/dL between a line and a total; a half counts towards the line, the side of caution. */
function tenthsBelow(line: number, total: number): number {
	return Math.ceil((line - total) * 10 - 0.5 - 1e-7) + 0;
}

function weigh(total: number, at: Lines): ReturnType<Standard['weigh']> {
	const below = tenthsBelow(at.phototherapy, total);
	const belowExchange = tenthsBelow(at.exchange, total);
	const zone =
		belowExchange <= 0
			? 'exchange'
			: belowExchange <= edition.ESCALATION_BELOW_EXCHANGE_TENTHS
				? 'escalate'
				: below <= 0
					? 'phototherapy'
					: 'below';
	return { difference: below / 10, zone, atLine: below <= 0 };
}

function confirm(total: number, difference: number): string | null {
	if (Math.round(difference * 10) <= edition.CONFIRM.withinTenths) return 'confirm.near-line';
	return Math.floor(total * 10 + 0.5 + 1e-7) >= edition.CONFIRM.fromTenths ? 'confirm.high' : null;
}

function distrust(reading: Reading, earlier: readonly Reading[], known: Case): string | null {
	for (const course of known.treatment.courses) {
		if (reading.atMs < course.from.getTime()) continue;
		if (course.to === undefined || reading.atMs < course.to.getTime()) return 'distrust.under-phototherapy';
		if (reading.atMs < course.to.getTime() + edition.TCB_AFTER_PHOTOTHERAPY_HOURS * HOUR_MS) {
			return 'distrust.after-phototherapy';
		}
	}
	const serum = lastWhere(earlier, (other) => other.serum);
	if (serum?.atLine && !treatedBetween(known, serum.atMs, reading.atMs)) return 'distrust.after-serum';
	return null;
}

function treatedBetween(known: Case, fromMs: number, untilMs: number): boolean {
	return known.treatment.courses.some(
		(course) => course.to && course.to.getTime() > fromMs && course.to.getTime() <= untilMs
	);
}

function follow(reading: Reading, _readings: readonly Reading[], known: Case): Outcome {
	const tenths = Math.round(reading.difference * 10);
	const band = edition.BANDS.find((one) => tenths < one.belowTenths);
	if (!band) throw new RangeError(`no band for ${tenths}`);
	if (band === edition.BANDS[0] && reading.ageMs < edition.DELAY.beforeHours * HOUR_MS) {
		const { rule, fromHours, untilHours } = edition.DELAY;
		return windowFrom(reading.atMs, { fromHours, untilHours, test: 'serum', rule }, 'delay-discharge');
	}
	let outcome: Outcome;
	if (tenths < edition.VISIT_FROM_TENTHS) outcome = windowFrom(reading.atMs, band, 'follow-up');
	else if (known.dischargeMs - known.bornMs < edition.VISIT_BEFORE_HOURS * HOUR_MS) {
		outcome = visit(reading, band, known);
	} else outcome = plain('judgement', 'figure-7.judgement');
	return serumSoonAfterTreatment(beforeFigure(outcome, reading, known), known);
}

/** From when a visit counts: from discharge, unless that leaves next to nothing after a value taken later. */
function visitAnchorMs(reading: Reading, band: edition.Band, known: Case): number {
	const anchorMs = Math.min(known.dischargeMs, reading.atMs);
	const leftMs = anchorMs + band.untilHours * HOUR_MS - reading.atMs;
	return leftMs >= edition.VISIT_LEAVES_HOURS * HOUR_MS ? anchorMs : reading.atMs;
}

function visit(reading: Reading, band: edition.Band, known: Case): Outcome {
	const anchorMs = visitAnchorMs(reading, band, known);
	const isNew = anchorMs > known.dischargeMs;
	const outcome = windowFrom(anchorMs, band, 'follow-up');
	// Of two bands counted from different instants, the closer one must not end later than the farther one.
	const last = edition.BANDS[edition.BANDS.length - 1] ?? band;
	const lastUntilMs = visitAnchorMs(reading, last, known) + last.untilHours * HOUR_MS;
	return {
		...outcome,
		untilMs: Math.min(outcome.untilMs, lastUntilMs),
		also: [isNew ? 'window.new-count' : 'window.visit-anchor']
	};
}

/** A value before the follow-up figure starts is followed by one between 24 and 48 hours of age. */
function beforeFigure(outcome: Outcome, reading: Reading, known: Case): Outcome {
	if (reading.ageMs >= edition.EARLY.beforeHours * HOUR_MS) return outcome;
	const untilMs = known.bornMs + edition.EARLY.untilHours * HOUR_MS;
	if (outcome.untilMs <= untilMs) return outcome;
	return {
		disposition: 'follow-up',
		rule: edition.EARLY.rule,
		fromMs: known.bornMs + edition.EARLY.fromHours * HOUR_MS,
		untilMs,
		test: 'serum-or-transcutaneous',
		also: [outcome.rule]
	};
}

function serumSoonAfterTreatment(outcome: Outcome, known: Case): Outcome {
	const trustedFromMs = known.treatment.stopMs + edition.TCB_AFTER_PHOTOTHERAPY_HOURS * HOUR_MS;
	if (outcome.test !== 'serum-or-transcutaneous' || !(outcome.fromMs < trustedFromMs)) return outcome;
	return { ...outcome, test: 'serum', also: [...outcome.also, 'test.serum-after-phototherapy'] };
}

function windowFrom(
	anchorMs: number,
	band: { fromHours: number; untilHours: number; test: WindowTest; rule: string },
	disposition: 'follow-up' | 'delay-discharge'
): Outcome {
	return {
		disposition,
		rule: band.rule,
		fromMs: anchorMs + band.fromHours * HOUR_MS,
		untilMs: anchorMs + band.untilHours * HOUR_MS,
		test: band.test,
		also: []
	};
}

/** AAP 2022: 35 weeks or more, mg/dL, 1 to 336 hours of age. */
export const aap2022: Standard = {
	id: 'aap-2022',
	title: 'AAP 2022',
	edition: edition.EDITION,
	unit: 'mg/dL',
	coverage: {
		firstWeek: 35,
		belowWeeks:
			'AAP 2022 covers 35 weeks of gestation or more. Use a standard for preterm newborns, or ask a neonatologist.',
		firstAgeMs: FIRST_HOUR * HOUR_MS,
		beforeFirstAge:
			'AAP 2022 prints no value before 1 hour of age. Leave this value out, judge it clinically (a cord value that is high asks about hemolysis) and measure again.',
		lastAgeMs: LAST_HOUR * HOUR_MS,
		afterLastAge:
			'The AAP 2022 figures end at 14 days (336 hours). Leave this value out of the assessment and follow the rules on prolonged jaundice: total and direct bilirubin, and a clinician decides.'
	},
	rules: edition.RULES,
	usesRiskCurves: true,
	lines,
	lineSource: (weeks, atRisk, ageMs) => {
		const risk = atRisk ? 'present' : 'none';
		return `rows "${photoCurve(weeks, risk)}" and "${exchangeCurve(weeks, risk)}", hour ${Math.floor(ageMs / HOUR_MS)}`;
	},
	weigh,
	confirm,
	distrust,
	isNearLine: ({ confirm: asks }) => asks !== null,
	follow,
	afterTreatment,
	underTreatment,
	caution: cautionAap,
	rateLimit,
	stopLevel,
	prolonged: ({ feeding }) => edition.PROLONGED[feeding],
	raisedDirect: { from: edition.DIRECT_FROM_TENTHS / 10, inclusive: true, rule: 'direct.raised' }
};
