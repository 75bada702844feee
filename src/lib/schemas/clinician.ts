import { z } from 'zod';
import { OUTCOMES } from '../domain/followup/states';

const reason = (ask: string) => z.string().trim().min(1, ask).max(600, 'At most 600 characters.');
const date = (ask: string) => z.string().regex(/^\d{4}-\d{2}-\d{2}$/, ask);
const time = (ask: string) => z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, ask);
const id = z.string().min(1).max(16);

/** A new bilirubin value as typed; the instant is local to the clinic. Blank numbers are null, so that nothing stands for nought. */
export const valueSchema = z
	.object({
		method: z.enum(['serum', 'transcutaneous'], 'Choose how it was measured.').nullable(),
		measuredOn: date('Type the date of the sample.'),
		measuredTime: time('Type the time of the sample, such as 09:40.'),
		total: z
			.number('Type a number.')
			.positive('The total must be more than nought.')
			.max(1100, 'This cannot be right: check value and unit.')
			.nullable(),
		direct: z
			.number('Type a number.')
			.min(0, 'This cannot be below nought.')
			.max(1100, 'This cannot be right: check value and unit.')
			.nullable(),
		unit: z.enum(['mg/dL', 'umol/L']),
		weightGrams: z
			.number('Type a number.')
			.int('Whole grams.')
			.min(300, 'At least 300 g.')
			.max(9000, 'At most 9,000 g.')
			.nullable()
	})
	.refine(({ method }) => method !== null, { path: ['method'], error: 'Choose how it was measured.' })
	.refine(({ total }) => total !== null, { path: ['total'], error: 'Type the total bilirubin.' })
	.refine(({ total, direct }) => total === null || direct === null || direct <= total, {
		path: ['direct'],
		error: 'The direct part cannot be more than the total.'
	});
export type ValueForm = z.output<typeof valueSchema>;

export const strikeSchema = z.object({
	measurementId: id,
	why: reason('Say why this value is struck.').max(200, 'At most 200 characters.')
});

export const SETTINGS = ['readmission', 'home'] as const;

export const acceptSchema = z.object({
	setting: z.enum(SETTINGS).default('readmission'),
	/** What was on the screen when it was accepted; another result in the meantime is shown before anything is saved. */
	shown: z.string().min(1).max(120),
	note: z.string().trim().max(600, 'At most 600 characters.')
});

/** Outcomes that a decision may close with; "not reached" needs the ladder and "entered twice" the other follow-up. */
export const DECIDED_OUTCOMES = ['jaundice-settled', 'care-transferred', 'moved-away', 'died'] as const;

export const decisionSchema = z
	.object({
		then: z.enum(['repeat', 'treat', 'check-later', 'close'], 'Choose what happens next.').nullable(),
		fromOn: z.string(),
		fromTime: z.string(),
		untilOn: z.string(),
		untilTime: z.string(),
		test: z.enum(['serum', 'serum-or-transcutaneous', 'judgement']).default('serum-or-transcutaneous'),
		setting: z.enum(SETTINGS).default('readmission'),
		laterOn: z.string(),
		laterTime: z.string().default('09:00'),
		asks: z.string().trim().max(200, 'At most 200 characters.'),
		outcome: z.enum(DECIDED_OUTCOMES).default('jaundice-settled'),
		reason: z.string().trim().max(600, 'At most 600 characters.')
	})
	.refine(({ then }) => then !== null, { path: ['then'], error: 'Choose what happens next.' })
	.refine(({ then, asks }) => then !== 'check-later' || asks !== '', {
		path: ['asks'],
		error: 'Say what is asked or checked then.'
	});
export type DecisionForm = z.output<typeof decisionSchema>;

export const endTreatmentSchema = z.object({
	endedOn: date('Type the date.'),
	endedTime: time('Type the time, such as 14:20.')
});

export const closeSchema = z.object({
	outcome: z
		.enum(
			OUTCOMES.filter((outcome) => outcome !== 'entered-twice'),
			'Choose an outcome.'
		)
		.nullable(),
	why: reason('Say why the follow-up closes.')
});

export const reopenSchema = z.object({ why: reason('Say why the follow-up opens again.') });

export const mergeSchema = z.object({
	intoId: z.string().min(1, 'Choose the follow-up that stays.').max(16),
	why: reason('Say why the two are the same newborn.')
});

export const settleSchema = z.object({
	alertId: id,
	how: z.string().trim().min(1, 'Say what was done.').max(300, 'At most 300 characters.')
});

/** What may be asked of the measures: one site and a period, as in the page's address. */
export const measuresSchema = z.object({
	site: z.string().max(16).default(''),
	days: z.enum(['7', '30', '90', '365']).default('30')
});
