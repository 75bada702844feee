import type { DischargeFacts } from '../domain/followup/discharge';
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	type BilirubinUnit,
	type Feeding,
	type GestationalAge
} from '../domain/guideline/types';
import type { DischargeForm } from './discharge-fields';
import { readCarers } from './discharge-carers';
import { readCourses, readMeasurements, readWeights } from './discharge-rows';
import { IssueList, oneOf, parseGrams, parseNumber, readInstant, type FormIssue } from './discharge-values';

const FEEDINGS: readonly Feeding[] = ['breast', 'formula', 'mixed'];
const UNITS: readonly BilirubinUnit[] = ['mg/dL', 'umol/L'];
const ANTIGLOBULIN = ['positive', 'negative', 'not-done'] as const;

/** Completed weeks and days; the standard says later whether it covers them. */
export function readGestation(form: DischargeForm, list: IssueList): GestationalAge | null {
	const weeks = parseNumber(form.gestationWeeks);
	const days = form.gestationDays.trim() === '' ? 0 : parseNumber(form.gestationDays);
	if (weeks === null || !Number.isInteger(weeks)) {
		return list.add('gestationWeeks', 'Give the gestational age in completed weeks, for example 38.');
	}
	if (days === null || !Number.isInteger(days) || days > 6) {
		return list.add('gestationDays', 'Days go from 0 to 6.');
	}
	return { weeks, days };
}

export function readBorn(form: DischargeForm, list: IssueList): Date | null {
	const typed = { on: form.bornOn, time: form.bornTime, timeZone: form.timeZone };
	return readInstant(typed, { onField: 'bornOn', timeField: 'bornTime', what: 'birth' }, list);
}

export function readUnit(form: DischargeForm): BilirubinUnit {
	return oneOf(UNITS, form.unit) ?? 'mg/dL';
}

export function readAlbumin(form: DischargeForm, list: IssueList): number | null {
	if (form.albumin.trim() === '') return null;
	return (
		parseNumber(form.albumin) ?? list.add('albumin', 'Write albumin as a number in g/dL, for example 3.2.')
	);
}

export function readRisks(form: DischargeForm) {
	return {
		neurotoxicityRisks: NEUROTOXICITY_RISKS.filter((risk) => form.neurotoxicityRisks.includes(risk)),
		jaundiceRisks: JAUNDICE_RISKS.filter((risk) => form.jaundiceRisks.includes(risk))
	};
}

function needText(form: DischargeForm, list: IssueList): void {
	if (form.familyName.trim() === '') list.add('familyName', 'Give the family name.');
	if (form.recordNumber.trim() === '') list.add('recordNumber', 'Give the record number.');
}

function readBirthWeight(form: DischargeForm, list: IssueList): number | null {
	if (form.birthWeightGrams.trim() === '') return null;
	return (
		parseGrams(form.birthWeightGrams) ??
		list.add('birthWeightGrams', 'Write the weight in grams, for example 3240.')
	);
}

export interface DischargeReading {
	/** Null while anything is wrong. */
	readonly facts: DischargeFacts | null;
	readonly issues: readonly FormIssue[];
}

/**
 * Makes facts of what was typed, or says everything that is wrong with it, field by field.
 * It reads only; whether the values can be assessed is the standard's to say.
 */
export function readDischarge(form: DischargeForm): DischargeReading {
	const list = new IssueList();
	needText(form, list);
	const bornAt = readBorn(form, list);
	const gestationalAge = readGestation(form, list);
	const birthWeightGrams = readBirthWeight(form, list);
	const measurements = readMeasurements(form, readUnit(form), list).map(({ row: _row, ...facts }) => facts);
	const phototherapy = readCourses(form, list);
	const albuminGramsPerDecilitre = readAlbumin(form, list);
	const feeding = oneOf(FEEDINGS, form.feeding) ?? list.add('feeding', 'Say how the newborn is fed.');
	const weights = readWeights(form, list);
	const carers = readCarers(form, list);
	const plannedDischargeAt = readInstant(
		{ on: form.dischargeOn, time: form.dischargeTime, timeZone: form.timeZone },
		{ onField: 'dischargeOn', timeField: 'dischargeTime', what: 'the planned discharge' },
		list
	);
	if (form.clinicId === '') list.add('clinicId', 'Choose the clinic that will see the newborn.');
	if (list.issues.length > 0 || !bornAt || !gestationalAge || !feeding || !plannedDischargeAt) {
		return { facts: null, issues: list.issues };
	}
	const facts: DischargeFacts = {
		recordNumber: form.recordNumber.trim(),
		familyName: form.familyName.trim(),
		givenName: form.givenName.trim(),
		bornAt,
		birthTimeZone: form.timeZone,
		gestationalAge,
		feeding,
		birthWeightGrams,
		weights,
		...readRisks(form),
		albuminGramsPerDecilitre,
		directAntiglobulin: oneOf(ANTIGLOBULIN, form.directAntiglobulin) ?? 'not-done',
		measurements,
		phototherapy,
		plannedDischargeAt,
		clinicId: form.clinicId,
		carers
	};
	return { facts, issues: [] };
}
