import {
	JAUNDICE_RISK_DEFINITIONS,
	NEUROTOXICITY_RISK_DEFINITIONS,
	placeOf
} from '../../../domain/guideline';
import type {
	Assessment,
	BilirubinUnit,
	DirectFractionFinding,
	Feeding,
	FollowUpWindow,
	JaundiceRisk,
	Method,
	NeurotoxicityRisk,
	PhototherapySetting
} from '../../../domain/guideline/types';
import type { Stage } from '../../../domain/followup/states';
import { ageHoursAt } from '../../../format/duration';
import { formatDayTime } from '../../../format/time';
import {
	formatBilirubin,
	formatBilirubinNumber,
	formatWeight,
	formatWeightChange,
	methodLabel,
	unitLabel
} from '../../../format/values';
import { FEEDING_WORDS } from '../../../format/words';
import { windowWords } from './result-words';

/** The lines of the printed summary: what a clinician who takes over needs. */

interface Value {
	readonly id: string;
	readonly method: Method;
	readonly measuredAt: Date;
	readonly total: number;
	readonly direct: number | null;
	readonly unit: BilirubinUnit;
	readonly status: 'final' | 'entered-in-error';
	readonly struckBecause: string | null;
}

interface Weight {
	readonly grams: number;
	readonly weighedAt: Date;
}

interface Course {
	readonly startedAt: Date;
	readonly endedAt: Date | null;
	readonly setting: PhototherapySetting;
}

const hoursOld = (bornAt: Date, at: Date): string => `${Math.floor(ageHoursAt(bornAt, at))} h`;

export interface FactLine {
	readonly asks: string;
	readonly says: string;
}

/** Feeding, risks of both kinds, tests of blood group, and the weights at birth and discharge. */
export function factLines(
	newborn: {
		readonly bornAt: Date;
		readonly feeding: Feeding;
		readonly birthWeightGrams: number | null;
		readonly neurotoxicityRisks: readonly NeurotoxicityRisk[];
		readonly jaundiceRisks: readonly JaundiceRisk[];
		readonly albuminGramsPerDecilitre: number | null;
		readonly directAntiglobulin: 'positive' | 'negative' | 'not-done';
	},
	weights: readonly Weight[],
	handedOverAt: Date | null
): FactLine[] {
	const atDischarge = handedOverAt
		? weights.findLast(({ weighedAt }) => weighedAt <= handedOverAt)
		: undefined;
	const neurotoxicity = newborn.neurotoxicityRisks.map((risk) => NEUROTOXICITY_RISK_DEFINITIONS[risk].label);
	const jaundice = newborn.jaundiceRisks.map((risk) => JAUNDICE_RISK_DEFINITIONS[risk].label);
	return [
		{ asks: 'Feeding', says: FEEDING_WORDS[newborn.feeding] },
		{
			asks: 'Discharge',
			says: handedOverAt ? `at ${hoursOld(newborn.bornAt, handedOverAt)} of age` : 'not handed over yet'
		},
		{
			asks: 'Birth weight',
			says: newborn.birthWeightGrams === null ? 'not on record' : formatWeight(newborn.birthWeightGrams)
		},
		{ asks: 'Discharge weight', says: atDischarge ? formatWeight(atDischarge.grams) : 'not on record' },
		{ asks: 'Antiglobulin test', says: newborn.directAntiglobulin.replace('-', ' ') },
		...(newborn.albuminGramsPerDecilitre === null
			? []
			: [{ asks: 'Albumin', says: `${newborn.albuminGramsPerDecilitre.toFixed(1)} g/dL` }]),
		{ asks: 'Neurotoxicity risks', says: neurotoxicity.join('; ') || 'none listed' },
		{ asks: 'Risks for more jaundice', says: jaundice.join('; ') || 'none listed' }
	];
}

/** Age, time, value, line, difference of every value; a struck one says so. */
export function valueLines(
	values: readonly Value[],
	assessment: Assessment | null,
	bornAt: Date,
	timeZone: string
): string[][] {
	return values.map((value) => {
		const held = assessment?.measurements.find(({ measurement }) => measurement.id === value.id);
		const direct = value.direct === null ? '' : `, direct ${formatBilirubinNumber(value.direct, value.unit)}`;
		const written = `${methodLabel(value.method)} ${formatBilirubin({ value: value.total, unit: value.unit })}${direct}`;
		const start = [
			hoursOld(bornAt, value.measuredAt),
			formatDayTime(value.measuredAt, { timeZone }),
			written
		];
		if (value.status === 'entered-in-error') return [...start, 'struck', value.struckBecause ?? ''];
		if (!assessment || !held) return [...start, 'none', 'not held against a line'];
		const { thresholds, trusted } = held;
		return [
			...start,
			`${formatBilirubinNumber(thresholds.phototherapy, thresholds.unit)} ${unitLabel(thresholds.unit)}`,
			`${placeOf(held, assessment.standard).says}${trusted ? '' : '; not to be decided on'}`
		];
	});
}

/** Start and stop of each course with the ages. */
export function courseLines(courses: readonly Course[], bornAt: Date, timeZone: string): string[] {
	return courses.map(({ startedAt, endedAt, setting }) => {
		const start = `${setting.replace('-', ' ')}, from ${formatDayTime(startedAt, { timeZone })} (${hoursOld(bornAt, startedAt)})`;
		return endedAt
			? `${start} until ${formatDayTime(endedAt, { timeZone })} (${hoursOld(bornAt, endedAt)})`
			: `${start}, running`;
	});
}

/** Each weight with age and change against the birth weight. */
export function weightLines(weights: readonly Weight[], birthGrams: number | null, bornAt: Date): string[] {
	return weights.map(({ grams, weighedAt }) => {
		const change = birthGrams === null ? '' : `, ${formatWeightChange(grams, birthGrams)}`;
		return `${formatWeight(grams)} at ${hoursOld(bornAt, weighedAt)}${change}`;
	});
}

/** The first value after the last course ended; null where none ended or none was taken. */
export function firstAfterTreatment(
	values: readonly Value[],
	courses: readonly Course[],
	bornAt: Date
): string | null {
	const stopped = courses.at(-1)?.endedAt;
	if (!stopped) return null;
	const first = values.find((value) => value.status === 'final' && value.measuredAt > stopped);
	if (!first) return 'none yet';
	return `${methodLabel(first.method)} ${formatBilirubin({ value: first.total, unit: first.unit })} at ${hoursOld(bornAt, first.measuredAt)}, ${Math.floor(ageHoursAt(stopped, first.measuredAt))} h after stopping`;
}

const OWES_VISIT: readonly Stage[] = ['before-discharge', 'to-book', 'booked', 'confirmed', 'missed'];

/** Tests and visits still owed: the window, a serum confirmation, the direct fraction. */
export function openTests(
	values: { readonly assessment: Assessment | null; readonly liver: DirectFractionFinding },
	window: FollowUpWindow | null,
	timeZone: string,
	stage: Stage
): string[] {
	const { assessment, liver } = values;
	const asksSerum =
		assessment?.disposition === 'confirm-serum' ? ['Serum bilirubin to confirm the last value.'] : [];
	const asksVisit =
		window && OWES_VISIT.includes(stage) ? [`Next look: ${windowWords(window, timeZone)}.`] : [];
	const asksLiver =
		liver.status === 'due' || liver.status === 'overdue' || liver.status === 'raised'
			? ['Total and direct (conjugated) bilirubin, and the question of the liver.']
			: [];
	return [...asksSerum, ...asksVisit, ...asksLiver];
}
