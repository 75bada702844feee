import { z } from 'zod';

/*
 * The discharge form. Every value is text as it was typed, so that nothing is lost when it cannot be read, and rows
 * are parallel lists of text, so that the form also works without scripts. `discharge-read.ts` makes facts of it.
 */
const text = (longest = 120) => z.string().max(longest, `At most ${longest} signs.`).default('');
const rows = () => z.array(z.string().max(40)).max(30, 'At most 30 rows.').default([]);

export const dischargeFields = z.object({
	/** Zone of the birth unit; the server sets it. */
	timeZone: text(60),
	recordNumber: text(40),
	familyName: text(),
	givenName: text(),
	bornOn: text(10),
	bornTime: text(5),
	gestationWeeks: text(3),
	gestationDays: text(3),
	birthWeightGrams: text(10),

	/** One unit for all values: a standard refuses mixed ones. */
	unit: text(10),
	measurementMethod: rows(),
	measurementOn: rows(),
	measurementTime: rows(),
	measurementTotal: rows(),
	measurementDirect: rows(),

	courseId: rows(),
	courseSetting: rows(),
	courseFromOn: rows(),
	courseFromTime: rows(),
	courseToOn: rows(),
	courseToTime: rows(),

	neurotoxicityRisks: rows(),
	jaundiceRisks: rows(),
	directAntiglobulin: text(12),
	albumin: text(10),

	feeding: text(10),
	weightOn: rows(),
	weightTime: rows(),
	weightGrams: rows(),

	carer1Name: text(),
	carer1Relation: text(60),
	carer1Phone: text(40),
	carer1Email: text(200),
	carer1Language: text(5),
	carer1Sms: z.boolean().default(false),
	carer1Mail: z.boolean().default(false),
	carer2Name: text(),
	carer2Relation: text(60),
	carer2Phone: text(40),
	carer2Email: text(200),
	carer2Language: text(5),
	carer2Sms: z.boolean().default(false),
	carer2Mail: z.boolean().default(false),

	dischargeOn: text(10),
	dischargeTime: text(5),
	clinicId: text(40),
	/** `<ISO instant> <visit kind>`, `desk` to leave the visit to the clinic, or nothing yet. */
	place: text(60),
	againstAdviceWhy: text(300)
});

export type DischargeForm = z.infer<typeof dischargeFields>;
