import { formatGestationalAge, HOUR_MS, shownHours } from './age';
import { liverFinding, measuringCheck } from './liver';
import { exceedsLimit, forEachPair, projectedCrossingAt, risePerHour } from './rate';
import { SHARED_RULES } from './shared-rules';
import type { Decision, Lines, Outcome, Reading, Rule, Standard } from './standard';
import type {
	Assessment,
	DirectFractionFinding,
	Disposition,
	FollowUpWindow,
	MeasurementAssessment,
	RateOfRise,
	Thresholds,
	TraceStep
} from './types';

const round = (value: number, digits: number): number => Number(value.toFixed(digits));

/** The lines as they are published: no escalation where the standard has none. */
export function thresholdsOf(lines: Lines, standard: Standard): Thresholds {
	const { phototherapy, escalation, exchange } = lines;
	return Number.isNaN(escalation)
		? { phototherapy, exchange, unit: standard.unit }
		: { phototherapy, escalation, exchange, unit: standard.unit };
}

/** The window of an outcome; null where it has none. */
export function windowOf(outcome: Outcome): FollowUpWindow | null {
	if (Number.isNaN(outcome.untilMs)) return null;
	return { from: new Date(outcome.fromMs), until: new Date(outcome.untilMs), test: outcome.test };
}

/** One line that states a result; the last step of every trace ends with it. */
export function describeResult(disposition: Disposition, window: FollowUpWindow | null): string {
	if (!window) return `${disposition}, no window`;
	return `${disposition}, ${window.test} from ${window.from.toISOString()} until ${window.until.toISOString()}`;
}

/** Puts a decision into words and figures. */
export function explain(decision: Decision, standard: Standard): Assessment {
	const { deciding, outcome, readings } = decision;
	const window = windowOf(outcome);
	const rates = ratesOf(readings, standard, decision);
	const directFraction = liverFinding(decision.case.input, standard);
	return {
		standard: standard.id,
		edition: standard.edition,
		ageHours: deciding ? shownHours(deciding.ageMs) : null,
		thresholds: deciding ? thresholdsOf(deciding.lines, standard) : null,
		difference: deciding ? deciding.difference : null,
		decidingIndex: deciding ? deciding.index : null,
		disposition: outcome.disposition,
		window,
		measurements: measurementsOf(readings, standard),
		rates,
		directFraction,
		cautions: decision.cautions,
		trace: traceOf({ decision, standard, window, rates, directFraction })
	};
}

/** In the order given by the caller. */
function measurementsOf(readings: readonly Reading[], standard: Standard): MeasurementAssessment[] {
	return [...readings]
		.sort((a, b) => a.index - b.index)
		.map((reading) => ({
			measurement: reading.measurement,
			ageHours: shownHours(reading.ageMs),
			thresholds: thresholdsOf(reading.lines, standard),
			difference: reading.difference,
			trusted: reading.distrust === null,
			...(reading.distrust === null ? {} : { whyNotTrusted: ruleOf(standard, reading.distrust).says }),
			mustConfirmBySerum: reading.confirm !== null || reading.distrust !== null
		}));
}

function ratesOf(readings: readonly Reading[], standard: Standard, decision: Decision): RateOfRise[] {
	const rates: RateOfRise[] = [];
	forEachPair(readings, (earlier, later) => rates.push(rateOf(earlier, later, standard, decision.case)));
	return rates;
}

/** The rate of rise of a pair, its published limit, and where it leads. */
export function rateOf(
	earlier: Reading,
	later: Reading,
	standard: Standard,
	known: Pick<Decision['case'], 'weeks' | 'atRisk'>
): RateOfRise {
	const perHour = risePerHour(earlier, later);
	const crossing = projectedCrossingAt(
		later,
		perHour,
		(ageMs) => standard.lines(known.weeks, known.atRisk, ageMs).phototherapy,
		standard.coverage.lastAgeMs
	);
	return {
		fromIndex: earlier.index,
		toIndex: later.index,
		perHour: round(perHour, 2),
		unit: standard.unit,
		limitPerHour: standard.rateLimit(later.ageMs).perHour,
		exceedsLimit: exceedsLimit(perHour, later.ageMs, standard),
		...(crossing ? { projectedCrossingAt: crossing } : {})
	};
}

function ruleOf(standard: Standard, id: string): Rule {
	const rule = standard.rules[id] ?? SHARED_RULES[id];
	if (!rule) throw new Error(`${standard.id} has no rule ${id}`);
	return rule;
}

interface TraceContext {
	readonly decision: Decision;
	readonly standard: Standard;
	readonly window: FollowUpWindow | null;
	readonly rates: readonly RateOfRise[];
	readonly directFraction: DirectFractionFinding;
}

function traceOf(context: TraceContext): TraceStep[] {
	const { decision, standard } = context;
	const { deciding, outcome } = decision;
	return [
		...(decision.case.atRisk && standard.usesRiskCurves ? [riskStep(context)] : []),
		...decision.readings.map((reading) => readingStep(reading, context)),
		...decision.readings
			.filter((one) => one.distrust !== null)
			.map((reading) => distrustStep(reading, context)),
		...context.rates.map((rate) => rateStep(rate, context)),
		...(deciding ? [decidingStep(deciding, context)] : []),
		liverStep(context),
		...outcome.also.map((id) => alsoStep(id, context)),
		resultStep(context)
	];
}

const step = (id: string, rule: Rule, inputs: TraceStep['inputs'], output: string): TraceStep => ({
	rule: id,
	says: rule.says,
	inputs,
	output,
	source: rule.source,
	confidence: rule.confidence
});

function riskStep({ decision, standard }: TraceContext): TraceStep {
	const { neurotoxicityRisks, albuminGramsPerDecilitre } = decision.case.input;
	return step(
		'risk-curve',
		ruleOf(standard, 'risk-curve'),
		{
			neurotoxicityRisks: neurotoxicityRisks.join(', ') || 'none listed',
			...(albuminGramsPerDecilitre === undefined ? {} : { albuminGramsPerDecilitre })
		},
		'lines with a neurotoxicity risk factor'
	);
}

function readingStep(reading: Reading, { decision, standard }: TraceContext): TraceStep {
	const { measurement, lines, ageMs } = reading;
	const { weeks, atRisk, input } = decision.case;
	const escalation = Number.isNaN(lines.escalation) ? '' : `, escalation ${lines.escalation}`;
	const rule = ruleOf(standard, 'thresholds');
	return {
		rule: 'thresholds',
		says: rule.says,
		inputs: {
			at: measurement.at.toISOString(),
			method: measurement.method,
			total: measurement.total,
			unit: measurement.unit,
			ageHours: shownHours(ageMs),
			gestationalAge: formatGestationalAge(input.gestationalAge)
		},
		output: `phototherapy ${lines.phototherapy}${escalation}, exchange ${lines.exchange} ${standard.unit}; difference ${reading.difference}`,
		source: `${rule.source}; ${standard.lineSource(weeks, atRisk, ageMs)}`,
		confidence: rule.confidence
	};
}

function distrustStep(reading: Reading, { standard }: TraceContext): TraceStep {
	const id = reading.distrust ?? '';
	return step(
		id,
		ruleOf(standard, id),
		{ at: reading.measurement.at.toISOString(), method: reading.measurement.method },
		'this value does not decide'
	);
}

function rateStep(rate: RateOfRise, { decision, standard }: TraceContext): TraceStep {
	const later = decision.readings.find((one) => one.index === rate.toIndex);
	const id = standard.rateLimit(later?.ageMs ?? 0).rule;
	const crossing = rate.projectedCrossingAt
		? `; a projection only: at this steady rate the line would be met at ${rate.projectedCrossingAt.toISOString()}`
		: '';
	const earlier = decision.readings.find((one) => one.index === rate.fromIndex);
	const methods =
		earlier?.serum === later?.serum ? '' : '; the two methods differ by themselves, read with care';
	const compared = rate.exceedsLimit ? 'reaches or passes the limit' : 'within the limit';
	return step(
		id,
		ruleOf(standard, id),
		{
			from: `bilirubin[${rate.fromIndex}]`,
			to: `bilirubin[${rate.toIndex}]`,
			limitPerHour: rate.limitPerHour
		},
		`${rate.perHour} ${rate.unit} an hour, ${compared}${methods}${crossing}`
	);
}

function decidingStep(deciding: Reading, { standard }: TraceContext): TraceStep {
	return step(
		'deciding-value',
		ruleOf(standard, 'deciding-value'),
		{ at: deciding.measurement.at.toISOString(), method: deciding.measurement.method },
		`bilirubin[${deciding.index}] decides: difference ${deciding.difference} ${standard.unit}`
	);
}

function liverStep({ decision, standard, directFraction }: TraceContext): TraceStep {
	const { input } = decision.case;
	const id =
		directFraction.status === 'raised' ? standard.raisedDirect.rule : measuringCheck(input, standard).rule;
	const { feeding, gestationalAge } = input;
	return step(
		id,
		ruleOf(standard, id),
		{ feeding, gestationalAge: formatGestationalAge(gestationalAge) },
		`liver question: ${directFraction.status}, asked at ${directFraction.dueAt?.toISOString() ?? 'no date'}`
	);
}

/** A rule that moved the result; with it, this is what follows. */
function alsoStep(id: string, { standard, decision, window }: TraceContext): TraceStep {
	const { disposition } = decision.outcome;
	return step(id, ruleOf(standard, id), timesOf(decision), describeResult(disposition, window));
}

function timesOf({ case: known, deciding }: Decision): Record<string, string | number> {
	return {
		dischargeAt: known.input.dischargeAt.toISOString(),
		ageAtDischargeHours: round(Math.floor((known.dischargeMs - known.bornMs) / (HOUR_MS / 100)) / 100, 2),
		...(deciding ? { measuredAt: deciding.measurement.at.toISOString() } : {}),
		...(Number.isNaN(known.treatment.stopMs)
			? {}
			: { phototherapyStoppedAt: new Date(known.treatment.stopMs).toISOString() })
	};
}

function resultStep({ decision, standard, window }: TraceContext): TraceStep {
	const { outcome, deciding } = decision;
	return step(
		outcome.rule,
		ruleOf(standard, outcome.rule),
		{ ...(deciding ? { difference: deciding.difference, unit: standard.unit } : {}), ...timesOf(decision) },
		describeResult(outcome.disposition, window)
	);
}
