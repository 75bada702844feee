import { parsePhoneNumberFromString, type CountryCode } from 'libphonenumber-js/min';
import type { CarerFacts } from '../domain/followup/discharge';
import { LANGUAGES } from '../domain/messaging/language';
import type { DischargeForm } from './discharge-fields';
import { oneOf, type IssueList } from './discharge-values';

const HOME_COUNTRY: CountryCode = 'US';
const MAIL = /^[^\s@]+@[^\s@]+\.[^\s@]+$/;

export const CARER_KEYS = ['carer1', 'carer2'] as const;
export type CarerKey = (typeof CARER_KEYS)[number];

function readPhone(typed: string, field: string, list: IssueList): string | null {
	if (typed === '') return null;
	const number = parsePhoneNumberFromString(typed, HOME_COUNTRY);
	if (number?.isPossible()) return number.number;
	return list.add(
		field,
		'This is not a telephone number. Write it with the area code, for example 512 555 0143.'
	);
}

/** A stored number as people of the home country type it. */
export function phoneAsTyped(e164: string): string {
	const number = parsePhoneNumberFromString(e164, HOME_COUNTRY);
	return number?.countryCallingCode === '1'
		? number.formatNational()
		: (number?.formatInternational() ?? e164);
}

function readMail(typed: string, field: string, list: IssueList): string | null {
	if (typed === '' || MAIL.test(typed)) return typed || null;
	return list.add(field, 'This is not an e-mail address. Write it like name@example.org.');
}

function readCarer(form: DischargeForm, key: CarerKey, list: IssueList): CarerFacts | null {
	const name = form[`${key}Name`].trim();
	const typedPhone = form[`${key}Phone`].trim();
	const typedMail = form[`${key}Email`].trim();
	if (name === '' && typedPhone === '' && typedMail === '') return null;
	if (name === '') list.add(`${key}Name`, 'Give this person’s name.');
	const phone = readPhone(typedPhone, `${key}Phone`, list);
	const email = readMail(typedMail, `${key}Email`, list);
	const consentsToSms = form[`${key}Sms`];
	const consentsToMail = form[`${key}Mail`];
	if (consentsToSms && typedPhone === '') list.add(`${key}Phone`, 'Text messages need a telephone number.');
	if (consentsToMail && typedMail === '') list.add(`${key}Email`, 'E-mail needs an address.');
	return {
		name,
		relation: form[`${key}Relation`].trim() || 'parent',
		phone,
		email,
		language: oneOf(LANGUAGES, form[`${key}Language`]) ?? 'en',
		consentsToSms,
		consentsToMail
	};
}

/** The family in the order of calling; persons about whom nothing was typed are left out. */
export function readCarers(form: DischargeForm, list: IssueList): CarerFacts[] {
	return CARER_KEYS.flatMap((key) => readCarer(form, key, list) ?? []);
}
