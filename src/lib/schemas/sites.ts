import { parsePhoneNumberFromString } from 'libphonenumber-js/min';
import { IANAZone } from 'luxon';
import { z } from 'zod';
import { VISIT_KINDS } from '../domain/followup/visit';

/** A telephone number as typed, in the form it is stored in (E.164); null where it is none. Without a country: US. */
export function storedPhone(typed: string): string | null {
	const number = parsePhoneNumberFromString(typed, 'US');
	return number?.isPossible() ? number.number.toString() : null;
}

const phone = z
	.string()
	.trim()
	.min(1, 'Type the telephone number.')
	.refine((typed) => storedPhone(typed) !== null, 'This is not a telephone number.');

const words = (most: number, ask: string) =>
	z.string().trim().min(1, ask).max(most, `At most ${most} characters.`);

const siteFields = {
	name: words(160, 'Type the name.'),
	address: words(240, 'Type the address.'),
	phone,
	afterHoursPhone: phone,
	dutyEmail: z.email('Type an e-mail address.').trim().max(200),
	timeZone: z
		.string()
		.refine((zone) => IANAZone.isValidZone(zone), 'This is not a time zone, such as America/Chicago.')
};

export const siteSchema = z.object(siteFields);
export const newSiteSchema = z.object({
	kind: z.enum(['birth-unit', 'clinic'], 'Choose a birth unit or a clinic.'),
	...siteFields
});

const clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Type a time, such as 08:30.');

/** Minutes since midnight of a local `HH:MM`. */
export const minutesOf = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3));

export const openingSchema = z
	.object({
		weekday: z.number().int().min(1, 'Choose a day.').max(7, 'Choose a day.'),
		from: clock,
		until: clock,
		visitKind: z.enum(VISIT_KINDS, 'Choose a kind of visit.'),
		placeMinutes: z.number().int().min(5, 'At least 5 minutes.').max(240, 'At most 240 minutes.'),
		placesAtOnce: z.number().int().min(1, 'At least 1.').max(20, 'At most 20.')
	})
	.refine((opening) => opening.from < opening.until, {
		path: ['until'],
		error: 'The end has to be after the beginning.'
	})
	.refine((opening) => minutesOf(opening.until) - minutesOf(opening.from) >= opening.placeMinutes, {
		path: ['placeMinutes'],
		error: 'Not even one visit of this length fits between the two times.'
	});

/** What an empty form offers. */
export const NEW_OPENING: z.output<typeof openingSchema> = {
	weekday: 1,
	from: '',
	until: '',
	visitKind: 'check',
	placeMinutes: 30,
	placesAtOnce: 1
};

export const closedDaySchema = z.object({
	closedOn: z.iso.date('Choose a day.'),
	reason: words(160, 'Say why, in a word or two.')
});

export const rowSchema = z.object({ id: z.string().min(1).max(16) });
