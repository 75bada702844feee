import { publishedRange, thresholdsAt } from '../../src/lib/domain/guideline';
import type { Feeding, JaundiceRisk, Method, NeurotoxicityRisk } from '../../src/lib/domain/guideline/types';
import type { CarerFacts, DischargeFacts, MeasurementFacts } from '../../src/lib/domain/followup/discharge';
import type { Language } from '../../src/lib/domain/messaging/language';
import { hoursFrom, type Demo } from './context';

/** A value given by its distance below the phototherapy line (mg/dL), so that the engine itself chooses it. */
export interface DemoValue {
	readonly hour: number;
	readonly below: number;
	readonly method?: Method;
	readonly direct?: number;
}

export interface DemoNewborn {
	readonly family: string;
	readonly given: string;
	readonly weeks: number;
	readonly days?: number;
	readonly feeding?: Feeding;
	readonly risks?: readonly NeurotoxicityRisk[];
	readonly jaundiceRisks?: readonly JaundiceRisk[];
	readonly values: readonly DemoValue[];
	/** Age in hours at discharge. */
	readonly dischargeHour: number;
	readonly carer: string;
	readonly relation?: string;
	readonly language?: Language;
	readonly secondCarer?: string;
	readonly consentsToSms?: boolean;
	/** Twins share one telephone. */
	readonly telephone?: number;
	readonly clinic?: 0 | 1;
}

/** A serum value so many hours after birth, so far below the line. */
export const at = (hour: number, below: number): DemoValue => ({ hour, below });

let serial = 0;

/** A number from the range kept for fiction, 555-0100 to 555-0199, with the area code making it each family's own. */
function phone(index: number): string {
	return `+1${201 + Math.floor(index / 80)}5550${String(110 + (index % 80)).padStart(3, '0')}`;
}

/** The total that lies so far below the line of its age, to 0.1 mg/dL; past the lines, below the last one. */
export function totalBelowLine(newborn: DemoNewborn, { hour, below }: DemoValue): number {
	const { untilHour } = publishedRange('aap-2022');
	const lines = thresholdsAt(
		{
			standard: 'aap-2022',
			gestationalAge: { weeks: newborn.weeks, days: newborn.days ?? 0 },
			neurotoxicityRisks: newborn.risks ?? []
		},
		Math.min(hour, untilHour)
	);
	if (!lines.ok) throw new Error(lines.error[0]?.message);
	return Math.round((lines.value.phototherapy - below) * 10) / 10;
}

export function measurementOf(newborn: DemoNewborn, bornAt: Date, value: DemoValue): MeasurementFacts {
	return {
		method: value.method ?? 'serum',
		measuredAt: hoursFrom(bornAt, value.hour),
		total: totalBelowLine(newborn, value),
		direct: value.direct ?? null,
		unit: 'mg/dL'
	};
}

function carersOf(newborn: DemoNewborn, index: number): CarerFacts[] {
	const first: CarerFacts = {
		name: newborn.carer,
		relation: newborn.relation ?? 'mother',
		phone: phone(newborn.telephone ?? index),
		email: `family${index}@example.org`,
		language: newborn.language ?? 'en',
		consentsToSms: newborn.consentsToSms ?? true,
		consentsToMail: true
	};
	if (!newborn.secondCarer) return [first];
	const second = {
		...first,
		name: newborn.secondCarer,
		relation: 'father',
		phone: phone((newborn.telephone ?? index) + 400),
		email: `second${index}@example.org`
	};
	return [first, second];
}

/** The discharge form of a demo newborn, as a nurse would have filled it in. */
export function dischargeFacts(
	demo: Demo,
	newborn: DemoNewborn,
	asked: { dischargeAt: Date; until: Date }
): DischargeFacts {
	const index = serial++;
	const bornAt = hoursFrom(asked.dischargeAt, -newborn.dischargeHour);
	const birthWeightGrams = 2_500 + ((index * 137) % 1_500);
	const weighedAt = hoursFrom(bornAt, Math.min(24, newborn.dischargeHour - 1));
	return {
		recordNumber: `QH-${String(4_100 + index)}`,
		familyName: newborn.family,
		givenName: newborn.given,
		bornAt,
		birthTimeZone: demo.timeZone,
		gestationalAge: { weeks: newborn.weeks, days: newborn.days ?? 0 },
		feeding: newborn.feeding ?? 'breast',
		birthWeightGrams,
		weights: weighedAt <= asked.until ? [{ weighedAt, grams: Math.round(birthWeightGrams * 0.96) }] : [],
		neurotoxicityRisks: newborn.risks ?? [],
		jaundiceRisks: newborn.jaundiceRisks ?? [],
		albuminGramsPerDecilitre: null,
		directAntiglobulin: newborn.risks?.includes('isoimmune-hemolysis') ? 'positive' : 'negative',
		measurements: newborn.values.map((value) => measurementOf(newborn, bornAt, value)),
		phototherapy: [],
		plannedDischargeAt: asked.dischargeAt,
		clinicId: demo.clinics[newborn.clinic ?? 0].id,
		carers: carersOf(newborn, index)
	};
}
