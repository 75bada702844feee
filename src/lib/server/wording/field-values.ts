import { DateTime } from 'luxon';
import { formatPhone } from '../../format/phone';
import type { Channel } from '../../domain/messaging/kinds';
import type { Language } from '../../domain/messaging/language';
import { render, type FieldValues } from '../../domain/messaging/template';
import type { CheckInResult } from '../../domain/guideline/types';
import { DEFAULT_WORDING } from './default-texts';

/** Digits stay Latin in every language: the numbers are dialled and the times are typed. */
const LOCALES: Readonly<Record<Language, string>> = {
	en: 'en-US',
	es: 'es-US',
	vi: 'vi-VN',
	zh: 'zh-CN',
	ar: 'ar-EG-u-nu-latn'
};

/** Sets the direction of what follows to left to right, so that the groups of a number keep their order in Arabic. */
const LEFT_TO_RIGHT = '\u200e';

/** Spaces that a message's alphabet lacks would turn the whole text into UCS-2. */
const plainSpaces = (text: string): string => text.replace(/[\u00a0\u202f\u2009]/g, ' ');

const local = (at: Date, timeZone: string, language: Language): DateTime =>
	DateTime.fromJSDate(at, { zone: timeZone }).setLocale(LOCALES[language]);

/** "Thursday, Dec 3" in the family's language, on the clinic's calendar. */
export const dayInWords = (at: Date, timeZone: string, language: Language): string =>
	plainSpaces(
		local(at, timeZone, language).toLocaleString({ weekday: 'long', month: 'short', day: 'numeric' })
	);

/** "10:20 AM" as the family's language writes it, on the clinic's clock. */
export const timeInWords = (at: Date, timeZone: string, language: Language): string =>
	plainSpaces(local(at, timeZone, language).toLocaleString({ hour: 'numeric', minute: '2-digit' }));

export function phoneInWords(e164: string, language: Language): string {
	const phone = formatPhone(e164);
	return language === 'ar' ? LEFT_TO_RIGHT + phone : phone;
}

/** What the fields of a wording are filled from. */
export interface FieldFacts {
	readonly language: Language;
	readonly channel: Channel;
	readonly clinic: {
		readonly name: string;
		readonly address: string;
		readonly phone: string;
		readonly afterHoursPhone: string;
		readonly timeZone: string;
	};
	readonly emergencyNumber: string;
	readonly link?: string | undefined;
	readonly visit?: { readonly startsAt: Date; readonly isConfirmed: boolean } | undefined;
	readonly checkInResult?: CheckInResult | undefined;
	readonly words?: string | undefined;
	/** Marks of the newborns that a number could mean, in the order of their numbers. */
	readonly choices?: readonly string[] | undefined;
	readonly finding?: string | undefined;
	readonly operations?: string | undefined;
}

/** The value of every field that the facts allow; a field without a fact is left out, and rendering refuses it. */
export function fieldValues(facts: FieldFacts): FieldValues {
	const { language, clinic } = facts;
	const common = {
		clinic: clinic.name,
		address: clinic.address,
		phone: phoneInWords(clinic.phone, language),
		nightPhone: phoneInWords(clinic.afterHoursPhone, language),
		emergency: facts.emergencyNumber
	};
	const optional = {
		link: facts.link,
		words: facts.words,
		finding: facts.finding,
		operations: facts.operations
	};
	return {
		...common,
		...present(optional),
		...visitValues(facts),
		...sentenceValues(facts, common)
	};
}

function present(values: Readonly<Record<string, string | undefined>>): FieldValues {
	return Object.fromEntries(
		Object.entries(values).flatMap(([name, value]) => (value ? [[name, value]] : []))
	);
}

function visitValues({ visit, clinic, language, channel }: FieldFacts): FieldValues {
	if (visit === undefined) return {};
	const reply = DEFAULT_WORDING[language].sentences.reply[channel];
	return {
		day: dayInWords(visit.startsAt, clinic.timeZone, language),
		time: timeInWords(visit.startsAt, clinic.timeZone, language),
		reply: visit.isConfirmed ? reply.confirmed : reply.open
	};
}

function sentenceValues({ checkInResult, choices, language }: FieldFacts, common: FieldValues): FieldValues {
	const { advice, choice } = DEFAULT_WORDING[language].sentences;
	const said = checkInResult === undefined ? null : render(advice[checkInResult], common);
	const listed = choices?.map((mark, index) => render(choice, { number: String(index + 1), mark }));
	return present({
		advice: said?.ok ? said.value : undefined,
		choices: listed?.flatMap((one) => (one.ok ? [one.value] : [])).join(', ')
	});
}
