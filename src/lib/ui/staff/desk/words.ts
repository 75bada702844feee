import type { AttemptChannel, AttemptOutcome } from '../../../domain/followup/attempt';
import type { VisitKind, VisitState } from '../../../domain/followup/visit';
import type { QueueGroup } from '../../../domain/followup/desk-queue';
import type { Language } from '../../../domain/messaging/language';
import { CHECK_IN_WORDS, VISIT_STATE_WORDS } from '../../../format/words';
import type { LastContact } from '../../../schemas/desk-view';

/** The desk's words for its own vocabulary. */
export const GROUP_WORDS: Readonly<Record<QueueGroup, string>> = {
	'needs-call': 'Needs a call',
	'did-not-come': 'Did not come',
	'needs-visit': 'Needs a visit',
	'not-confirmed': 'Not confirmed',
	undelivered: 'Messages not delivered'
};

/** What an empty group means. */
export const GROUP_EMPTY: Readonly<Record<QueueGroup, string>> = {
	'needs-call': 'No family has answered or written in a way that asks for a call.',
	'did-not-come': 'Every newborn whose visit has begun came, or was marked.',
	'needs-visit': 'Every newborn at home has a visit.',
	'not-confirmed': 'Every family with a visit has confirmed it.',
	undelivered: 'Every message reached its telephone or mail box.'
};

export const CHANNEL_WORDS: Readonly<Record<AttemptChannel, string>> = {
	call: 'Call',
	sms: 'Text from the desk’s own telephone',
	mail: 'Mail',
	'in-person': 'In person'
};

export const ATTEMPT_WORDS: Readonly<Record<AttemptOutcome, string>> = {
	reached: 'Reached',
	'no-answer': 'Nobody answered',
	'left-voicemail': 'Left a voice message',
	'wrong-number': 'Wrong number',
	refused: 'Did not want to talk',
	sent: 'Sent'
};

/** Languages as the staff name them. */
export const LANGUAGE_WORDS: Readonly<Record<Language, string>> = {
	en: 'English',
	es: 'Spanish',
	vi: 'Vietnamese',
	zh: 'Chinese',
	ar: 'Arabic'
};

const SIMPLE: Readonly<Record<'words' | 'text-sent' | 'mail-sent' | 'confirmed', string>> = {
	words: 'The family wrote',
	'text-sent': 'Text sent',
	'mail-sent': 'Mail sent',
	confirmed: 'Visit confirmed'
};

const CHANNEL_SHORT: Readonly<Record<AttemptChannel, string>> = {
	call: 'Call',
	sms: 'Text',
	mail: 'Mail',
	'in-person': 'In person'
};

/** "Call: nobody answered", "Check-in: call back", "Text sent". */
export function contactWords(contact: LastContact): string {
	switch (contact.kind) {
		case 'attempt':
			return `${CHANNEL_SHORT[contact.channel]}: ${ATTEMPT_WORDS[contact.outcome].toLowerCase()}`;
		case 'check-in':
			return `Check-in: ${CHECK_IN_WORDS[contact.result].toLowerCase()}`;
		default:
			return SIMPLE[contact.kind];
	}
}

/** States of a visit where there is little room. */
export const VISIT_STATE_SHORT: Readonly<Record<VisitState, string>> = {
	...VISIT_STATE_WORDS,
	booked: 'Not confirmed'
};

/** Kinds of visit where there is little room. */
export const VISIT_KIND_SHORT: Readonly<Record<VisitKind, string>> = {
	check: 'Check',
	'blood-draw': 'Blood draw',
	'feeding-help': 'Feeding help'
};
