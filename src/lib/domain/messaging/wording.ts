import type { Channel, MessageKind } from './kinds';
import { wordingFaults, type WordingFault } from './template';

/** What a wording of one kind may and must speak of. */
export interface KindWording {
	readonly channels: readonly Channel[];
	readonly allowed: readonly string[];
	readonly required: readonly string[];
	/** For an administrator: when the message goes out. */
	readonly when: string;
}

const BOTH: readonly Channel[] = ['sms', 'mail'];
const SMS: readonly Channel[] = ['sms'];
const ALWAYS = ['clinic', 'phone', 'nightPhone', 'emergency', 'link'];
const VISIT = [...ALWAYS, 'day', 'time', 'address', 'reply'];

const visit = (when: string, required: readonly string[] = ['day', 'time', 'clinic']): KindWording => ({
	channels: BOTH,
	allowed: VISIT,
	required,
	when
});

const plain = (when: string, required: readonly string[] = ['clinic'], channels = BOTH): KindWording => ({
	channels,
	allowed: ALWAYS,
	required,
	when
});

/** Every kind of message: over which channels, with which fields, and when. */
export const KIND_WORDING: Readonly<Record<MessageKind, KindWording>> = {
	'visit-booked': visit('As soon as a visit is made.', ['day', 'time', 'clinic', 'link']),
	'visit-moved': visit('As soon as a visit that the family knows of is moved.', [
		'day',
		'time',
		'clinic',
		'link'
	]),
	'visit-cancelled': visit('As soon as a visit that the family knows of is cancelled.', [
		'day',
		'time',
		'phone'
	]),
	'reminder-day-before': visit('At 10 in the morning on the day before the visit.'),
	'reminder-morning': visit('On the morning of the visit.', ['time', 'clinic']),
	'check-in-ask': plain('At 9 each morning at home, until the visit.', ['link', 'emergency']),
	'prolonged-check-ask': plain('At the ages that the prolonged-jaundice rule gives.', ['link', 'emergency']),
	'visit-missed': plain('In the same hour that a visit is marked as missed.', ['clinic', 'phone', 'link']),
	'visit-missed-again': plain(
		'To the second carer, and by mail, when the first message and call changed nothing.',
		['clinic', 'phone']
	),
	'answer-received': {
		channels: BOTH,
		allowed: [...ALWAYS, 'advice'],
		required: ['advice'],
		when: 'As soon as a family has answered the questions.'
	},
	'other-time-received': plain('As soon as a family asks for another time.', ['clinic', 'phone']),
	'follow-up-closed': plain(
		'An hour after a follow-up is closed; not where the newborn died, was not reached or was entered twice.',
		['phone', 'nightPhone']
	),
	'desk-words': {
		channels: BOTH,
		allowed: [...ALWAYS, 'words'],
		required: ['words'],
		when: 'When staff write to the family by hand.'
	},
	'help-answer': plain('In answer to a word that asks for help.', ['phone', 'emergency'], SMS),
	'stop-answer': plain('In answer to a word that stops messages.', ['clinic', 'phone'], SMS),
	'start-answer': plain('In answer to a word that lets messages begin again.', ['clinic'], SMS),
	'which-newborn': {
		channels: SMS,
		allowed: [...ALWAYS, 'choices'],
		required: ['choices'],
		when: 'When a number belongs to several newborns and the words do not say which.'
	},
	'emergency-advice': plain('At once, in answer to words that sound like an emergency.', [
		'emergency',
		'nightPhone'
	]),
	'duty-finding': {
		channels: ['mail'],
		allowed: ['clinic', 'finding', 'operations'],
		required: ['finding'],
		when: 'To the duty address of a site, when the watch finds something owed by nobody.'
	}
};

/** The field that only the mail's own people see; all other kinds go to families. */
export const isForFamilies = (kind: MessageKind): boolean => kind !== 'duty-finding';

/** Most parts that a text message may need with the longest real values: GSM-7, and UCS-2 where the script needs it. */
export const MOST_SEGMENTS = { 'GSM-7': 3, 'UCS-2': 5 } as const;

const FAULT_SENTENCES: Readonly<Record<WordingFault['code'], (what: string) => string>> = {
	'unknown-field': (what) => `There is no field {${what}} for this message.`,
	'required-field-absent': (what) => `The field {${what}} must be in the text.`,
	'stray-brace': (what) => `A single "${what}" is not part of a field. Take it out or complete the field.`
};

/** Sentences about what is wrong with a wording; empty when it may be saved. */
export function faultsOf(text: {
	readonly kind: MessageKind;
	readonly subject: string | null;
	readonly body: string;
}): string[] {
	const { allowed, required } = KIND_WORDING[text.kind];
	const faults = [
		...wordingFaults(text.body, { allowed, required }),
		...wordingFaults(text.subject ?? '', { allowed, required: [] })
	];
	return [...new Set(faults.map(({ code, what }) => FAULT_SENTENCES[code](what)))];
}
