import { DAY_MS, HOUR_MS } from './age';
import { FIRST_HOUR, LAST_HOUR, lines } from './aap-2022-lines';
import * as edition from './editions/aap-2022';
import { rapidRise } from './rate';
import {
	lastWhere,
	plain,
	type Case,
	type Outcome,
	type Reading,
	type Standard,
	type StopAsked
} from './standard';
import type { WindowTest } from './types';

const HEMOLYSIS: ReadonlySet<string> = new Set(['isoimmune-hemolysis', 'g6pd-deficiency', 'other-hemolysis']);

/** Known, or suspected: listed, or from a rise that suggests it. */
function hasHemolysis(readings: readonly Reading[], known: Case): boolean {
	return (
		known.input.neurotoxicityRisks.some((risk) => HEMOLYSIS.has(risk)) ||
		known.input.jaundiceRisks.includes('hemolysis-suspected') ||
		rapidRise(readings, { rateLimit }) !== 'none'
	);
}

/** Limit of the rate of rise for a pair that ends at this age. */
export function rateLimit(endAgeMs: number): ReturnType<Standard['rateLimit']> {
	return endAgeMs <= DAY_MS ? FIRST_DAY : LATER;
}
const FIRST_DAY = { perHour: edition.RATE.firstDay, inclusive: true, rule: 'rate.first-24-hours' };
const LATER = { perHour: edition.RATE.later, inclusive: true, rule: 'rate.later' };

interface Owed {
	readonly fromHours: number;
	readonly untilHours: number;
	readonly test: WindowTest;
	readonly rule: edition.AapRule;
}

const SOON: Owed = { ...edition.AFTER_TREATMENT.soon, test: 'serum', rule: 'after.soon' };
const NEXT_DAY: Owed = { ...edition.AFTER_TREATMENT.nextDay, test: 'serum', rule: 'after.next-day' };
const IN_DAYS: Owed = {
	...edition.AFTER_TREATMENT.days,
	test: 'serum-or-transcutaneous',
	rule: 'after.days'
};

/** The published tests after the kind of treatment that was given, earliest first. */
function owedAfter(readings: readonly Reading[], known: Case): readonly Owed[] {
	const inBirthStay = known.treatment.courses.filter((course) => course.setting === 'birth-stay');
	if (inBirthStay.length === 0) return [IN_DAYS];
	if (known.treatment.last?.setting !== 'birth-stay') return [NEXT_DAY];
	const beforeMs = known.bornMs + edition.AFTER_TREATMENT.startedBeforeHours * HOUR_MS;
	const isEarly = inBirthStay.some((course) => course.from.getTime() < beforeMs);
	return isEarly || hasHemolysis(readings, known) ? [SOON, NEXT_DAY] : [NEXT_DAY];
}

/**
 * What is still owed after the last course ended; null when every published test was taken. Each test needs a trusted
 * value of its own: one taken late does not stand for the next as well, unless by then the next was over too.
 */
export function afterTreatment(readings: readonly Reading[], known: Case): Outcome | null {
	const { stopMs } = known.treatment;
	let usedMs = -Infinity;
	for (const owed of owedAfter(readings, known)) {
		const fromMs = stopMs + owed.fromHours * HOUR_MS;
		const untilMs = stopMs + owed.untilHours * HOUR_MS;
		if (usedMs >= untilMs) continue;
		const answer = readings.find((one) => one.distrust === null && one.atMs >= fromMs && one.atMs > usedMs);
		if (!answer) return stillOwed(owed, { fromMs, untilMs, usedMs });
		usedMs = answer.atMs;
	}
	return null;
}

/** Two tests less than six hours apart would say little: our reading, where the first was taken late. */
function stillOwed(owed: Owed, at: { fromMs: number; untilMs: number; usedMs: number }): Outcome {
	const spacedMs = at.usedMs + edition.AFTER_TREATMENT.soon.fromHours * HOUR_MS;
	return {
		disposition: 'follow-up',
		rule: owed.rule,
		fromMs: Math.max(at.fromMs, at.usedMs),
		untilMs: Math.max(at.untilMs, spacedMs),
		test: owed.test,
		also: spacedMs > at.untilMs ? ['after.spaced'] : []
	};
}

/** While treatment runs: at home a serum value every day, counted from the last one or from the start. */
export function underTreatment(readings: readonly Reading[], known: Case): Outcome {
	const course = known.treatment.last;
	if (course?.setting !== 'home') return plain('phototherapy', 'treatment.running');
	const lastSerum = lastWhere(readings, (reading) => reading.serum);
	if (lastSerum && mustBeAdmitted(lastSerum, readings, course.from.getTime()))
		return plain('phototherapy', 'treatment.home-admit');
	const anchorMs = Math.max(course.from.getTime(), lastSerum?.atMs ?? 0);
	const untilMs = anchorMs + edition.HOME_DAILY_HOURS * HOUR_MS;
	const latestMs = readings[readings.length - 1]?.atMs ?? 0;
	// Another kind of value came after the day for serum was over: it is overdue, not planned.
	if (latestMs > untilMs) return plain('confirm-serum', 'treatment.home', ['confirm.not-trusted']);
	return {
		disposition: 'phototherapy',
		rule: 'treatment.home',
		fromMs: anchorMs,
		untilMs,
		test: 'serum',
		also: []
	};
}

/** At home: serum 1 mg/dL or more over the line, or rising while the gap to the line narrows. */
function mustBeAdmitted(last: Reading, readings: readonly Reading[], startMs: number): boolean {
	if (last.atMs < startMs) return false;
	if (Math.round(last.difference * 10) <= -edition.HOME.admitOverLineTenths) return true;
	const before = lastWhere(readings, (one) => one.serum && one.atMs < last.atMs);
	return before !== undefined && last.total > before.total && last.difference < before.difference;
}

/**
 * The value in mg/dL at or below which stopping is an option: 2 mg/dL under the line that applied when
 * phototherapy began. Null when it began outside the table.
 */
export function stopLevel({ weeks, atRisk, startAgeMs }: StopAsked): number | null {
	if (!(startAgeMs >= FIRST_HOUR * HOUR_MS && startAgeMs <= LAST_HOUR * HOUR_MS)) return null;
	const line = lines(weeks, atRisk, startAgeMs).phototherapy;
	return Math.round(line * 10 - edition.STOP_BELOW_START_LINE_TENTHS) / 10;
}
