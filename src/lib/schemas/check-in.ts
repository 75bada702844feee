import { z } from 'zod';
import { YELLOW_AREAS, type CheckInAnswers } from '../domain/guideline/types';

/** Messages are text keys of the catalogue. */
const CHOOSE = { error: 'public_error_choose' } as const;
const NUMBER = { error: 'public_error_number' } as const;
const yesOrNo = z.enum(['yes', 'no'], CHOOSE).transform((answer) => answer === 'yes');
const count = z
	.string(NUMBER)
	.regex(/^\d{1,2}$/, NUMBER)
	.transform(Number)
	.refine((value) => value <= 30, NUMBER);

const optionalText = z
	.string()
	.optional()
	.transform((value) => value?.trim().replace(',', '.') || undefined);

/** Degrees Celsius from what was typed in either unit; a number that no living newborn has is refused. */
function celsius(typed: string | undefined, unit: 'C' | 'F'): number | null | undefined {
	if (typed === undefined) return undefined;
	const value = Number(typed);
	const inCelsius = unit === 'F' ? ((value - 32) * 5) / 9 : value;
	return inCelsius >= 30 && inCelsius <= 43.4 ? toTenths(inCelsius) : null;
}

/** A low temperature is cut and a high one rounded, so that neither crosses a limit of the check-in to the calm side. */
function toTenths(inCelsius: number): number {
	return (inCelsius < 37 ? Math.floor(inCelsius * 10 + 1e-6) : Math.round(inCelsius * 10)) / 10;
}

/** The parents' check-in as posted; every question must be answered, nothing is filled in for them. */
export const checkInSchema = z
	.object({
		submissionKey: z.string().regex(/^[a-z0-9]{16}$/, CHOOSE),
		yellowArea: z.enum(YELLOW_AREAS, CHOOSE),
		yellowChange: z.enum(['less', 'same', 'more', 'not-sure'], CHOOSE),
		yellowDepth: z.enum(['none', 'pale', 'clear', 'deep-or-orange'], CHOOSE),
		eyesYellow: z.enum(['no', 'yes', 'yes-and-more'], CHOOSE),
		feedsIn24Hours: count,
		wetIn24Hours: count,
		dirtyIn24Hours: count,
		hoursSinceWet: count,
		stoolColour: z.enum(['black-or-green', 'yellow', 'brown', 'pale-or-white', 'none-yet'], CHOOSE),
		urineColour: z.enum(['pale', 'dark'], CHOOSE),
		waking: z.enum(['wakes-for-feeds', 'hard-to-wake', 'cannot-be-woken'], CHOOSE),
		suck: z.enum(['strong', 'weak', 'will-not-feed'], CHOOSE),
		cry: z.enum(['normal', 'high-pitched'], CHOOSE),
		tone: z.enum(['normal', 'limp', 'arching'], CHOOSE),
		breathing: z.enum(['normal', 'pauses'], CHOOSE),
		seizure: yesOrNo,
		worried: yesOrNo,
		temperatureCelsius: optionalText,
		temperatureUnit: z.enum(['C', 'F']).catch('C'),
		weightGrams: optionalText
			.transform((typed) => (typed === undefined ? undefined : Number(typed)))
			.refine((grams) => grams === undefined || (Number.isInteger(grams) && grams >= 500 && grams <= 8_000), {
				error: 'public_error_weight'
			})
	})
	.transform((form, issues): { submissionKey: string; answers: CheckInAnswers } => {
		const { submissionKey, temperatureUnit, temperatureCelsius: typed, ...answers } = form;
		const temperatureCelsius = celsius(typed, temperatureUnit);
		if (temperatureCelsius === null) {
			issues.addIssue({ code: 'custom', path: ['temperatureCelsius'], message: 'public_error_temperature' });
			return z.NEVER;
		}
		return { submissionKey, answers: { ...answers, temperatureCelsius } };
	});

/** The wish for another time, in the carer's own words. */
export const otherTimeSchema = z.object({ wish: z.string().trim().max(280).default('') });
