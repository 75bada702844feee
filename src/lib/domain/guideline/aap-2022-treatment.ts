import { HOUR_MS } from './age';
import * as edition from './editions/aap-2022';
import { lastWhere, plain, type Case, type Outcome, type Reading } from './standard';
import type { WindowTest } from './types';

const HEMOLYSIS: ReadonlySet<string> = new Set(['isoimmune-hemolysis', 'g6pd-deficiency', 'other-hemolysis']);

function hasHemolysis(known: Case): boolean {
	return (
		known.input.neurotoxicityRisks.some((risk) => HEMOLYSIS.has(risk)) ||
		known.input.jaundiceRisks.includes('hemolysis-suspected')
	);
}

/** A trusted value taken at least so many hours after the end of treatment answers what was owed from then. */
function hasValueFrom(readings: readonly Reading[], fromMs: number): boolean {
	return readings.some((reading) => reading.distrust === null && reading.atMs >= fromMs);
}

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
function owedAfter(known: Case): readonly Owed[] {
	const inBirthStay = known.treatment.courses.filter((course) => course.setting === 'birth-stay');
	if (inBirthStay.length === 0) return [IN_DAYS];
	if (known.treatment.last?.setting !== 'birth-stay') return [NEXT_DAY];
	const beforeMs = known.bornMs + edition.AFTER_TREATMENT.startedBeforeHours * HOUR_MS;
	const isEarly = inBirthStay.some((course) => course.from.getTime() < beforeMs);
	return isEarly || hasHemolysis(known) ? [SOON, NEXT_DAY] : [NEXT_DAY];
}

/** What is still owed after the last course ended; null when every published test was taken. */
export function afterTreatment(readings: readonly Reading[], known: Case): Outcome | null {
	const { stopMs } = known.treatment;
	const next = owedAfter(known).find((owed) => !hasValueFrom(readings, stopMs + owed.fromHours * HOUR_MS));
	if (!next) return null;
	return {
		disposition: 'follow-up',
		rule: next.rule,
		fromMs: stopMs + next.fromHours * HOUR_MS,
		untilMs: stopMs + next.untilHours * HOUR_MS,
		test: next.test,
		also: []
	};
}

/** While treatment runs: at home a serum value every day, counted from the last one or from the start. */
export function underTreatment(readings: readonly Reading[], known: Case): Outcome {
	const course = known.treatment.last;
	if (course?.setting !== 'home') return plain('phototherapy', 'treatment.running');
	const lastSerum = lastWhere(readings, (reading) => reading.serum);
	const anchorMs = Math.max(course.from.getTime(), lastSerum?.atMs ?? 0);
	return {
		disposition: 'phototherapy',
		rule: 'treatment.home',
		fromMs: anchorMs,
		untilMs: anchorMs + edition.HOME_DAILY_HOURS * HOUR_MS,
		test: 'serum',
		also: []
	};
}
