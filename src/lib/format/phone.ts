import { parsePhoneNumberFromString } from 'libphonenumber-js/min';

/** A stored E.164 number as people read it: national form at home, international form from elsewhere. */
export function formatPhone(e164: string, homeCountryCode = '1'): string {
	const number = parsePhoneNumberFromString(e164);
	if (!number) return e164;
	return number.countryCallingCode === homeCountryCode
		? number.formatNational()
		: number.formatInternational();
}
