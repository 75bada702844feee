import type {
	Feeding,
	GestationalAge,
	JaundiceRisk,
	Method,
	BilirubinUnit,
	NeurotoxicityRisk,
	PhototherapySetting
} from '../guideline/types';
import type { Language } from '../messaging/language';

/** What a nurse enters of a newborn before discharge; instants are absolute, the form has resolved their zone. */
export interface DischargeFacts {
	readonly recordNumber: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly bornAt: Date;
	readonly birthTimeZone: string;
	readonly gestationalAge: GestationalAge;
	readonly feeding: Feeding;
	readonly birthWeightGrams: number | null;
	readonly weights: readonly { readonly id?: string; readonly weighedAt: Date; readonly grams: number }[];
	readonly neurotoxicityRisks: readonly NeurotoxicityRisk[];
	readonly jaundiceRisks: readonly JaundiceRisk[];
	readonly albuminGramsPerDecilitre: number | null;
	readonly directAntiglobulin: 'positive' | 'negative' | 'not-done';
	readonly measurements: readonly MeasurementFacts[];
	readonly phototherapy: readonly {
		readonly id?: string;
		readonly startedAt: Date;
		readonly endedAt: Date | null;
		readonly setting: PhototherapySetting;
	}[];
	readonly plannedDischargeAt: Date;
	readonly clinicId: string;
	readonly carers: readonly CarerFacts[];
}

export interface MeasurementFacts {
	/** Present for one already on record. */
	readonly id?: string;
	readonly method: Method;
	readonly measuredAt: Date;
	readonly total: number;
	readonly direct: number | null;
	readonly unit: BilirubinUnit;
}

/** In the order of calling. */
export interface CarerFacts {
	readonly name: string;
	readonly relation: string;
	/** E.164. */
	readonly phone: string | null;
	readonly email: string | null;
	readonly language: Language;
	readonly consentsToSms: boolean;
	readonly consentsToMail: boolean;
}
