import { ARABIC, CHINESE, VIETNAMESE } from './draft-words';
import type { CheckInResult } from '../../domain/guideline/types';
import type { VisitKind, VisitState } from '../../domain/followup/visit';

/** The words that stand on a picture, one dictionary a language. Only `plain` is shown to families. */
export interface HourLineWords {
	readonly locale: string;
	readonly title: string;
	readonly now: string;
	readonly born: string;
	readonly visit: string;
	readonly asTable: string;
	readonly when: string;
	readonly what: string;
	readonly nothing: string;
	readonly visitKinds: Readonly<Record<VisitKind, string>>;
	readonly visitStates: Readonly<Record<VisitState, string>>;
	readonly checkIn: string;
	readonly checkInResults: Readonly<Record<CheckInResult, string>>;
}

export const ENGLISH: HourLineWords = {
	locale: 'en',
	title: 'The first days, hour by hour',
	now: 'now',
	born: 'Born',
	visit: 'Visit',
	asTable: 'The same as a table',
	when: 'When',
	what: 'What',
	nothing: 'No visit yet.',
	visitKinds: { check: 'check', 'blood-draw': 'blood draw', 'feeding-help': 'feeding help' },
	visitStates: {
		booked: 'not confirmed yet',
		confirmed: 'confirmed',
		arrived: 'came',
		missed: 'did not come',
		cancelled: 'cancelled',
		moved: 'moved'
	},
	checkIn: 'Check-in',
	checkInResults: {
		emergency: 'emergency',
		today: 'to be seen today',
		'call-back': 'call back',
		'as-planned': 'as planned'
	}
};

// Written by the project, not yet read by a translator.
export const SPANISH: HourLineWords = {
	locale: 'es',
	title: 'Los primeros días, hora por hora',
	now: 'ahora',
	born: 'Nacimiento',
	visit: 'Cita',
	asTable: 'Lo mismo en una tabla',
	when: 'Cuándo',
	what: 'Qué',
	nothing: 'Todavía no hay cita.',
	visitKinds: {
		check: 'control',
		'blood-draw': 'análisis de sangre',
		'feeding-help': 'ayuda con la alimentación'
	},
	visitStates: {
		booked: 'sin confirmar',
		confirmed: 'confirmada',
		arrived: 'vinieron',
		missed: 'no vinieron',
		cancelled: 'cancelada',
		moved: 'cambiada'
	},
	checkIn: 'Preguntas',
	checkInResults: {
		emergency: 'emergencia',
		today: 'hay que verlo hoy',
		'call-back': 'les llamamos',
		'as-planned': 'sigan con la cita'
	}
};

/** The dictionary of a language; English where there is none. */
export function hourLineWords(locale: string): HourLineWords {
	const all = [ENGLISH, SPANISH, VIETNAMESE, CHINESE, ARABIC];
	return all.find((words) => locale.startsWith(words.locale)) ?? ENGLISH;
}
