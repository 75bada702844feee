/**
 * The fast way from parsed JSON to the engine's input. It knows only whether the record fits the published schema:
 * where it does not, the schema itself is asked for the reasons, so that both ways give the same answers.
 */
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	STANDARD_IDS,
	type AssessmentInput,
	type BilirubinUnit,
	type Feeding,
	type GestationalAge,
	type JaundiceRisk,
	type Measurement,
	type Method,
	type NeurotoxicityRisk,
	type PhototherapyCourse,
	type PhototherapySetting,
	type StandardId
} from '../../src/lib/domain/guideline/types';
import { LONGEST_ID } from '../../src/lib/schemas/assessment';
import { parseInstant } from '../../src/lib/schemas/instant';

export interface ReadRecord {
	readonly id: string;
	readonly input: AssessmentInput;
}

const NEUROTOXICITY: ReadonlySet<unknown> = new Set(NEUROTOXICITY_RISKS);
const JAUNDICE: ReadonlySet<unknown> = new Set(JAUNDICE_RISKS);
const STANDARDS: ReadonlySet<unknown> = new Set(STANDARD_IDS);
const FIELDS = 10;

/** The record, or null when it does not fit the published schema. */
export function readRecord(raw: unknown): ReadRecord | null {
	if (!isObject(raw)) return null;
	const { id, standard, neurotoxicityRisks, jaundiceRisks, feeding } = raw;
	const albumin = raw['albuminGramsPerDecilitre'];
	if (typeof id !== 'string' || id.length < 1 || id.length > LONGEST_ID) return null;
	if (!isStandard(standard) || !isFeeding(feeding)) return null;
	if (!isNeurotoxicity(neurotoxicityRisks) || !isJaundice(jaundiceRisks)) return null;
	if (albumin !== undefined && !isNumber(albumin)) return null;
	if (Object.keys(raw).length !== (albumin === undefined ? FIELDS : FIELDS + 1)) return null;
	const gestationalAge = readGestationalAge(raw['gestationalAge']);
	const bornAt = readInstant(raw['bornAt']);
	const dischargeAt = readInstant(raw['dischargeAt']);
	if (!gestationalAge || !bornAt || !dischargeAt) return null;
	const bilirubin = readList(raw['bilirubin'], readMeasurement);
	const phototherapy = readList(raw['phototherapy'], readCourse);
	if (!bilirubin || !phototherapy) return null;
	const known = {
		standard,
		gestationalAge,
		bornAt,
		dischargeAt,
		neurotoxicityRisks,
		jaundiceRisks,
		feeding,
		bilirubin,
		phototherapy
	};
	return { id, input: albumin === undefined ? known : { ...known, albuminGramsPerDecilitre: albumin } };
}

function isObject(raw: unknown): raw is Record<string, unknown> {
	return typeof raw === 'object' && raw !== null && !Array.isArray(raw);
}

function isNumber(raw: unknown): raw is number {
	return typeof raw === 'number' && Number.isFinite(raw);
}

function isStandard(raw: unknown): raw is StandardId {
	return STANDARDS.has(raw);
}

function isFeeding(raw: unknown): raw is Feeding {
	return raw === 'breast' || raw === 'formula' || raw === 'mixed';
}

function isMethod(raw: unknown): raw is Method {
	return raw === 'serum' || raw === 'transcutaneous';
}

function isUnit(raw: unknown): raw is BilirubinUnit {
	return raw === 'mg/dL' || raw === 'umol/L';
}

function isSetting(raw: unknown): raw is PhototherapySetting {
	return raw === 'birth-stay' || raw === 'readmission' || raw === 'home';
}

function hasOnly(raw: unknown, known: ReadonlySet<unknown>): boolean {
	if (!Array.isArray(raw)) return false;
	for (const item of raw) if (!known.has(item)) return false;
	return true;
}

function isNeurotoxicity(raw: unknown): raw is NeurotoxicityRisk[] {
	return hasOnly(raw, NEUROTOXICITY);
}

function isJaundice(raw: unknown): raw is JaundiceRisk[] {
	return hasOnly(raw, JAUNDICE);
}

const ZERO = 48;

function readGestationalAge(raw: unknown): GestationalAge | null {
	if (typeof raw !== 'string' || raw.length !== 4 || raw.charCodeAt(2) !== 43) return null;
	const tens = raw.charCodeAt(0) - ZERO;
	const ones = raw.charCodeAt(1) - ZERO;
	const days = raw.charCodeAt(3) - ZERO;
	if (!(tens >= 0 && tens <= 9 && ones >= 0 && ones <= 9 && days >= 0 && days <= 6)) return null;
	return { weeks: tens * 10 + ones, days };
}

function readInstant(raw: unknown): Date | null {
	if (typeof raw !== 'string') return null;
	const ms = parseInstant(raw);
	return Number.isNaN(ms) ? null : new Date(ms);
}

function readList<T>(raw: unknown, read: (item: unknown) => T | null): T[] | null {
	if (!Array.isArray(raw)) return null;
	const items: T[] = [];
	for (const one of raw) {
		const item = read(one);
		if (item === null) return null;
		items.push(item);
	}
	return items;
}

function readMeasurement(raw: unknown): Measurement | null {
	if (!isObject(raw)) return null;
	const { method, total, direct, unit } = raw;
	if (!isMethod(method) || !isNumber(total) || !isUnit(unit)) return null;
	const at = readInstant(raw['at']);
	if (!at) return null;
	const count = Object.keys(raw).length;
	if (direct === undefined) return count === 4 ? { at, method, total, unit } : null;
	return isNumber(direct) && count === 5 ? { at, method, total, direct, unit } : null;
}

function readCourse(raw: unknown): PhototherapyCourse | null {
	if (!isObject(raw)) return null;
	const { setting } = raw;
	const from = readInstant(raw['from']);
	if (!from || !isSetting(setting)) return null;
	const count = Object.keys(raw).length;
	if (raw['to'] === undefined) return count === 2 ? { from, setting } : null;
	const to = readInstant(raw['to']);
	return to && count === 3 ? { from, to, setting } : null;
}
