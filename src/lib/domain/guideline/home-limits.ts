import { FEEDS_IN_24_HOURS, HOURS_WITHOUT_WET, TEMPERATURE } from './editions/check-in';

/** Upper end of "8 to 12 feeds in 24 hours"; source and mark as for the lower end, which is the one that is judged. */
const MOST_FEEDS_IN_24_HOURS = 12;
/** When the yellow is strongest in most newborns born at term; common practice, no source. */
const STRONGEST_DAYS = { from: 3, until: 5 } as const;

const inFahrenheit = (celsius: number): number => (celsius * 9) / 5 + 32;

/** The figures that a family is told, from the data the check-in is judged by: said and judged are one number. */
export const HOME_LIMITS = {
	feverCelsius: TEMPERATURE.feverFrom,
	feverFahrenheit: inFahrenheit(TEMPERATURE.feverFrom),
	coldCelsius: TEMPERATURE.lowBelow,
	coldFahrenheit: inFahrenheit(TEMPERATURE.lowBelow),
	hoursWithoutWet: HOURS_WITHOUT_WET,
	fewestFeeds: FEEDS_IN_24_HOURS,
	mostFeeds: MOST_FEEDS_IN_24_HOURS,
	strongestFromDay: STRONGEST_DAYS.from,
	strongestUntilDay: STRONGEST_DAYS.until
} as const;
