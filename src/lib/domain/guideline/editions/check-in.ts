/** Published facts the check-in is judged by; sources beside each, marks of confidence in the README. */

/** Least diapers in 24 hours by day of age 1, 2, 3, 4, 5, then 6 and later (HSE Ireland; day 5 dirty is day 4's figure). */
export const DIAPERS = [
	{ wet: 1, dirty: 1 },
	{ wet: 2, dirty: 2 },
	{ wet: 3, dirty: 3 },
	{ wet: 4, dirty: 3 },
	{ wet: 5, dirty: 3 },
	{ wet: 6, dirty: 3 }
] as const;

/** Feeds: 8 to 12 in 24 hours (two or more secondary copies); held from day 2 on (our reading). */
export const FEEDS_IN_24_HOURS = 8;
export const FEEDS_FROM_DAY = 2;

export const HOURS_WITHOUT_WET = 8;
export const FIRST_DAY_HOURS = 24;
export const TEMPERATURE = { feverFrom: 38, lowBelow: 36 } as const;
/** Over 10 % loss is a concern; birth weight is back by 10 to 14 days (public-health unit pages). */
export const WEIGHT = { concernShare: 0.1, regainedByDays: 14 } as const;
/** Still jaundiced: 2 weeks formula-fed (and mixed), 3 weeks breastfed (AAP 2022). */
export const PROLONGED_DAYS = { formula: 14, mixed: 14, breast: 21 } as const;

export const SOURCES = {
	danger: 'UK parents’ leaflet and AAP 2004 wording of encephalopathy signs (secondary copies)',
	fever: 'Fever of a newborn as an emergency: site policy, common practice, no source',
	firstDay: 'NICE CG98; Seattle Children’s parents’ page',
	sameDay: 'Seattle Children’s parents’ page',
	colour: 'UK leaflets, NICE CG98, Seattle Children’s: same day at any age',
	diapers: 'HSE Ireland, feeding and diapers',
	feeds: 'Feeding guidance, two or more secondary copies',
	weight: 'Public-health unit pages on weight',
	prolonged: 'AAP 2022 key action statements',
	product: 'Site policy; common practice, no source'
} as const;
