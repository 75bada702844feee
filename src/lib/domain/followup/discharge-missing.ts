import type { Disposition } from '../guideline/types';
import { allowsDischarge } from './transition';

/** What a discharge still lacks, in the order in which a nurse settles it. */
export const MISSING_THINGS = [
	'value',
	'serum-value',
	'decision',
	'birth-weight',
	'carer',
	'reachable-carer',
	'consent',
	'visit',
	'hand-over'
] as const;
export type MissingThing = (typeof MISSING_THINGS)[number];

export interface DischargeStanding {
	readonly disposition: Disposition | null;
	readonly hasValue: boolean;
	readonly hasBirthWeight: boolean;
	readonly carers: readonly {
		readonly phone: string | null;
		readonly email: string | null;
		readonly consentsToSms: boolean;
		readonly consentsToMail: boolean;
	}[];
	readonly hasVisit: boolean;
	readonly handedOver: boolean;
}

function family(carers: DischargeStanding['carers']): MissingThing[] {
	if (carers.length === 0) return ['carer'];
	if (!carers.some(({ phone, email }) => phone !== null || email !== null)) return ['reachable-carer'];
	return carers.some((carer) => carer.consentsToSms || carer.consentsToMail) ? [] : ['consent'];
}

/**
 * What is missing before the family may leave; after the hand-over nothing is the nurse's any more.
 * Without a value only the value is asked of the clinical part; a missing consent means that nobody is messaged.
 */
export function missingForDischarge(standing: DischargeStanding): MissingThing[] {
	if (standing.handedOver) return [];
	const { disposition } = standing;
	const missing: MissingThing[] = [];
	if (!standing.hasValue) missing.push('value');
	else if (disposition === 'confirm-serum' || disposition === 'measure-first') missing.push('serum-value');
	else if (!allowsDischarge(disposition)) missing.push('decision');
	if (!standing.hasBirthWeight) missing.push('birth-weight');
	missing.push(...family(standing.carers));
	if (!standing.hasVisit) missing.push('visit');
	missing.push('hand-over');
	return missing;
}
