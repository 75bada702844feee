import { cautionShared } from './cautions';
import { LOW_ALBUMIN_GRAMS_PER_DECILITRE } from './risks';
import {
	lastWhere,
	plain,
	type Case,
	type Decision,
	type Outcome,
	type Reading,
	type Standard,
	type Treatment
} from './standard';
import type { AssessmentInput, Caution, Measurement, PhototherapyCourse } from './types';
import { valueIn } from './units';

const PAST_THE_LINES: Outcome = plain('judgement', 'past-the-lines');
const NO_READINGS: readonly Reading[] = [];
const NO_COURSE: Treatment = { courses: [], last: null, running: false, stopMs: NaN };

/**
 * The rule itself: from an input that was checked to what is owed, without words. `explain` puts it into words,
 * so that the rule stands in one place and a batch pays only for what it prints.
 */
export function decide(input: AssessmentInput, standard: Standard): Decision {
	const known = caseOf(input);
	const readings = read(known, standard);
	const isPastTheLines = readings.length < input.bilirubin.length;
	const deciding = isPastTheLines ? null : decidingOf(readings);
	const outcome = isPastTheLines ? PAST_THE_LINES : outcomeOf(deciding, readings, known, standard);
	const cautions: Caution[] = [];
	const decision: Decision = { case: known, readings, deciding, outcome, cautions };
	standard.caution(decision, cautions);
	cautionShared(decision, standard, cautions);
	return decision;
}

function caseOf(input: AssessmentInput): Case {
	const albumin = input.albuminGramsPerDecilitre;
	const lowAlbumin =
		(albumin !== undefined && albumin < LOW_ALBUMIN_GRAMS_PER_DECILITRE) ||
		input.neurotoxicityRisks.includes('low-albumin');
	return {
		input,
		weeks: input.gestationalAge.weeks,
		atRisk: lowAlbumin || input.neurotoxicityRisks.length > 0,
		lowAlbumin,
		bornMs: input.bornAt.getTime(),
		dischargeMs: input.dischargeAt.getTime(),
		treatment: treatmentOf(input.phototherapy)
	};
}

function treatmentOf(given: readonly PhototherapyCourse[]): Treatment {
	if (given.length === 0) return NO_COURSE;
	const courses = given.length === 1 ? given : [...given].sort((a, b) => a.from.getTime() - b.from.getTime());
	const last = courses[courses.length - 1] ?? null;
	return { courses, last, running: last?.to === undefined, stopMs: last?.to?.getTime() ?? NaN };
}

function inOrder(a: Reading, b: Reading): number {
	return a.atMs - b.atMs;
}

/** Records mostly come in order, and looking is cheaper than sorting. */
function areInOrder(readings: readonly Reading[]): boolean {
	let before: Reading | undefined;
	for (const reading of readings) {
		if (before && inOrder(before, reading) > 0) return false;
		before = reading;
	}
	return true;
}

/** A value past the last published age is held against no line; `check` refuses it unless asked to let it through. */
function read(known: Case, standard: Standard): Reading[] {
	const given = known.input.bilirubin;
	const lastMs = known.bornMs + standard.coverage.lastAgeMs;
	const readings: Reading[] = [];
	for (let i = 0; i < given.length; i++) {
		const measurement = given[i];
		if (measurement && measurement.at.getTime() <= lastMs)
			readings.push(readingOf(measurement, i, known, standard));
	}
	if (!areInOrder(readings)) readings.sort(inOrder);
	for (let i = 0; i < readings.length; i++) {
		const reading = readings[i];
		if (reading && !reading.serum) {
			reading.distrust = standard.distrust(reading, i === 0 ? NO_READINGS : readings.slice(0, i), known);
		}
	}
	return readings;
}

function readingOf(measurement: Measurement, index: number, known: Case, standard: Standard): Reading {
	const atMs = measurement.at.getTime();
	const ageMs = atMs - known.bornMs;
	const total = valueIn(measurement.total, measurement.unit, standard.unit);
	const lines = standard.lines(known.weeks, known.atRisk, ageMs);
	const { difference, zone, atLine } = standard.weigh(total, lines);
	const serum = measurement.method === 'serum';
	const confirm = serum ? null : standard.confirm(total, difference);
	return {
		index,
		measurement,
		atMs,
		ageMs,
		serum,
		total,
		lines,
		difference,
		zone,
		atLine,
		distrust: null,
		confirm
	};
}

/** The latest value that may decide; without one, the latest value, which then can only ask for serum. */
function decidingOf(readings: readonly Reading[]): Reading | null {
	for (let i = readings.length - 1; i >= 0; i--) {
		const reading = readings[i];
		if (reading?.distrust === null) return reading;
	}
	return readings[readings.length - 1] ?? null;
}

function outcomeOf(
	deciding: Reading | null,
	readings: readonly Reading[],
	known: Case,
	standard: Standard
): Outcome {
	if (!deciding) return plain('measure-first', 'measure-first');
	const outcome = byValue(deciding, readings, known, standard);
	if (deciding === readings[readings.length - 1]) return outcome;
	const worrying = readings.filter(
		(one) => one.distrust !== null && one.atMs >= deciding.atMs && standard.isNearLine(one)
	);
	switch (outcome.disposition) {
		case 'exchange':
		case 'escalate':
			return outcome;
		case 'phototherapy':
			// Under light a skin value near the line is expected; one at the lines of an emergency is not.
			return worrying.some(isEmergency)
				? plain('phototherapy', outcome.rule, [...outcome.also, 'confirm.not-trusted'])
				: outcome;
		default:
			return worrying.length > 0 ? plain('confirm-serum', 'confirm.not-trusted') : outcome;
	}
}

const isEmergency = ({ zone }: Reading): boolean => zone === 'escalate' || zone === 'exchange';

function byValue(deciding: Reading, readings: readonly Reading[], known: Case, standard: Standard): Outcome {
	const { treatment } = known;
	if (deciding.serum && deciding.zone === 'exchange') return plain('exchange', 'zone.exchange');
	if (deciding.serum && deciding.zone === 'escalate') return plain('escalate', 'zone.escalate');
	if (treatment.running) return standard.underTreatment(readings, known);
	if (deciding.distrust !== null) return plain('confirm-serum', 'confirm.not-trusted', [deciding.distrust]);
	if (deciding.confirm !== null) return plain('confirm-serum', deciding.confirm);
	const asked = unanswered(deciding, readings, known);
	if (asked !== null) return plain('confirm-serum', 'confirm.unanswered', [asked]);
	if (treatment.last && deciding.atMs <= treatment.stopMs) {
		if (deciding.zone !== 'below' && deciding.atMs > treatment.last.from.getTime()) {
			return plain('phototherapy', 'zone.phototherapy', ['treatment.still-over']);
		}
		return standard.afterTreatment(readings, known) ?? plain('judgement', 'treatment.running');
	}
	if (deciding.zone !== 'below') return plain('phototherapy', 'zone.phototherapy');
	const outcome = standard.follow(deciding, readings, known);
	const owed = treatment.last ? standard.afterTreatment(readings, known) : null;
	return owed ? earlier(outcome, owed) : outcome;
}

/** The rule by which an earlier skin value asked for serum, where none followed and no treatment was begun since. */
function unanswered(deciding: Reading, readings: readonly Reading[], known: Case): string | null {
	if (deciding.serum) return null;
	const sinceMs = known.treatment.last?.from.getTime() ?? -Infinity;
	const serum = lastWhere(readings, (one) => one.serum);
	const asking = lastWhere(
		readings,
		(one) =>
			one.confirm !== null &&
			one.distrust === null &&
			one.atMs > sinceMs &&
			one.atMs > (serum?.atMs ?? -Infinity)
	);
	return asking?.confirm ?? null;
}

/** Of what the value asks for and what treatment still owes, the one that ends earlier. */
function earlier(outcome: Outcome, owed: Outcome): Outcome {
	if (outcome.disposition === 'delay-discharge' || outcome.untilMs <= owed.untilMs) {
		return { ...outcome, also: [...outcome.also, 'after.figure'] };
	}
	return owed;
}
