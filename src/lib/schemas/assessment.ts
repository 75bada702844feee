import { z } from 'zod';
import {
	JAUNDICE_RISKS,
	NEUROTOXICITY_RISKS,
	STANDARD_IDS,
	type Assessment,
	type AssessmentInput,
	type Refusal
} from '../domain/guideline/types';
import { INSTANT, parseInstant } from './instant';

/** The published interface of an assessment, in and out. Others build on these names: add, never rename. */

export const UNITS = ['mg/dL', 'umol/L'] as const;
export const METHODS = ['serum', 'transcutaneous'] as const;
export const FEEDINGS = ['breast', 'formula', 'mixed'] as const;
export const SETTINGS = ['birth-stay', 'readmission', 'home'] as const;
export const GESTATIONAL_AGE = /^\d{2}\+[0-6]$/;
export const LONGEST_ID = 200;
/** How many records one request may carry. */
export const MOST_RECORDS = 1000;

const instant = z
	.string()
	.regex(INSTANT, 'Give ISO 8601 date and time with the offset, for example 2026-03-01T08:30:00+01:00.')
	.refine((text) => !Number.isNaN(parseInstant(text)), 'There is no such date.')
	.meta({ format: 'date-time', description: 'ISO 8601 with offset' });

const measurement = z.strictObject({
	at: instant,
	method: z.enum(METHODS),
	total: z.number().describe('Total bilirubin; the direct part is not taken off'),
	direct: z.number().optional().describe('Direct or conjugated part'),
	unit: z.enum(UNITS)
});

const course = z.strictObject({
	from: instant,
	to: instant.optional().describe('Absent while phototherapy runs'),
	setting: z.enum(SETTINGS)
});

export const assessmentInputSchema = z
	.strictObject({
		id: z.string().min(1).max(LONGEST_ID),
		standard: z.enum(STANDARD_IDS),
		gestationalAge: z
			.string()
			.regex(GESTATIONAL_AGE, 'Write completed weeks+days, for example 38+4.')
			.describe('Completed weeks and days, for example 38+4'),
		bornAt: instant,
		dischargeAt: instant,
		neurotoxicityRisks: z.array(z.enum(NEUROTOXICITY_RISKS)),
		jaundiceRisks: z.array(z.enum(JAUNDICE_RISKS)),
		feeding: z.enum(FEEDINGS),
		albuminGramsPerDecilitre: z.number().optional(),
		bilirubin: z.array(measurement),
		phototherapy: z.array(course)
	})
	.meta({ title: 'One newborn to assess' });

export type AssessmentRecord = z.infer<typeof assessmentInputSchema>;

const instantOut = z.string().meta({ format: 'date-time', description: 'ISO 8601 in UTC' });

const thresholds = z.strictObject({
	phototherapy: z.number(),
	escalation: z.number().optional().describe('Absent where the standard has none'),
	exchange: z.number(),
	unit: z.enum(UNITS)
});

const traceStep = z.strictObject({
	rule: z.string(),
	says: z.string(),
	inputs: z.record(z.string(), z.union([z.string(), z.number()])),
	output: z.string(),
	source: z.string(),
	confidence: z.enum(['printed', 'transcribed', 'from memory', 'common practice, no source', 'our reading'])
});

const caution = z.strictObject({
	code: z.string(),
	severity: z.enum(['notice', 'warning', 'danger']),
	text: z.string(),
	source: z.string()
});

export const assessmentOutputSchema = z
	.strictObject({
		id: z.string(),
		standard: z.enum(STANDARD_IDS),
		edition: z.string(),
		ageHours: z
			.number()
			.nullable()
			.describe('Of the deciding measurement, cut to two decimals; null without one'),
		thresholds: thresholds.nullable().describe('At that age; null without a measurement'),
		difference: z
			.number()
			.nullable()
			.describe('Phototherapy threshold minus total, in the unit of the thresholds'),
		disposition: z.enum([
			'follow-up',
			'judgement',
			'measure-first',
			'confirm-serum',
			'delay-discharge',
			'phototherapy',
			'escalate',
			'exchange'
		]),
		window: z
			.strictObject({
				from: instantOut,
				until: instantOut,
				test: z.enum(['serum', 'serum-or-transcutaneous', 'judgement'])
			})
			.nullable(),
		cautions: z.array(caution),
		trace: z.array(traceStep).optional().describe('Only when asked for')
	})
	.meta({ title: 'One result' });

export type AssessmentOutput = z.infer<typeof assessmentOutputSchema>;

const refusal = z.strictObject({ code: z.string(), field: z.string(), message: z.string() });

export const refusedRecordSchema = z
	.strictObject({
		id: z.string().nullable().describe('Null where the record could not be read'),
		error: refusal.extend({ others: z.array(refusal).optional().describe('Further reasons, if any') })
	})
	.meta({ title: 'A refused record, in the place of its result' });

export type RefusedRecord = z.infer<typeof refusedRecordSchema>;

/** The record as the engine takes it; the record has passed the schema. */
export function toAssessmentInput(record: AssessmentRecord): AssessmentInput {
	const [weeks, days] = record.gestationalAge.split('+');
	return {
		standard: record.standard,
		gestationalAge: { weeks: Number(weeks), days: Number(days) },
		bornAt: new Date(parseInstant(record.bornAt)),
		dischargeAt: new Date(parseInstant(record.dischargeAt)),
		neurotoxicityRisks: record.neurotoxicityRisks,
		jaundiceRisks: record.jaundiceRisks,
		feeding: record.feeding,
		...(record.albuminGramsPerDecilitre === undefined
			? {}
			: { albuminGramsPerDecilitre: record.albuminGramsPerDecilitre }),
		bilirubin: record.bilirubin.map(({ at, ...rest }) => ({ at: new Date(parseInstant(at)), ...rest })),
		phototherapy: record.phototherapy.map(({ from, to, setting }) => ({
			from: new Date(parseInstant(from)),
			...(to === undefined ? {} : { to: new Date(parseInstant(to)) }),
			setting
		}))
	};
}

/** The published form of a result; the trace only when asked for. */
export function toAssessmentOutput(id: string, assessment: Assessment, withTrace: boolean): AssessmentOutput {
	const { standard, edition, ageHours, thresholds: lines, difference, disposition, window } = assessment;
	return {
		id,
		standard,
		edition,
		ageHours,
		thresholds: lines,
		difference,
		disposition,
		window: window && {
			from: window.from.toISOString(),
			until: window.until.toISOString(),
			test: window.test
		},
		cautions: [...assessment.cautions],
		...(withTrace ? { trace: assessment.trace.map((step) => ({ ...step, inputs: { ...step.inputs } })) } : {})
	};
}

/** The published form of a refusal. */
export function toRefusedRecord(id: string | null, refusals: readonly Refusal[]): RefusedRecord {
	const [first, ...others] = refusals;
	const error = first ?? { code: 'unknown', field: '', message: 'The record was refused.' };
	return { id, error: others.length > 0 ? { ...error, others } : { ...error } };
}
