import { TEMPERATURE } from './editions/check-in';
import type { CheckInAnswers } from './types';

export const EMERGENCY_SIGN_IDS = [
	'cannot-be-woken',
	'will-not-feed',
	'limp',
	'arching',
	'high-pitched-cry',
	'pauses-in-breathing',
	'seizure',
	'fever'
] as const;
export type EmergencySignId = (typeof EMERGENCY_SIGN_IDS)[number];

/** A sign at which a family calls the emergency number at once. */
export interface EmergencySign {
	readonly id: EmergencySignId;
	/** For staff: on the telephone and on the help page. */
	readonly says: string;
	/** The answer of the check-in that states it; a test holds that it is judged an emergency. */
	readonly answer: Partial<CheckInAnswers>;
}

const SIGNS: Readonly<Record<EmergencySignId, Omit<EmergencySign, 'id'>>> = {
	'cannot-be-woken': { says: 'cannot be woken', answer: { waking: 'cannot-be-woken' } },
	'will-not-feed': { says: 'will not feed', answer: { suck: 'will-not-feed' } },
	limp: { says: 'is limp', answer: { tone: 'limp' } },
	arching: { says: 'arches the neck or back', answer: { tone: 'arching' } },
	'high-pitched-cry': { says: 'has a high-pitched cry', answer: { cry: 'high-pitched' } },
	'pauses-in-breathing': { says: 'has pauses in breathing', answer: { breathing: 'pauses' } },
	seizure: { says: 'has a seizure', answer: { seizure: true } },
	fever: {
		says: `has ${TEMPERATURE.feverFrom.toFixed(1)} °C or more`,
		answer: { temperatureCelsius: TEMPERATURE.feverFrom }
	}
};

/** Every sign that the check-in judges an emergency, in the order in which they are told. */
export const EMERGENCY_SIGNS: readonly EmergencySign[] = EMERGENCY_SIGN_IDS.map((id) => ({
	id,
	...SIGNS[id]
}));

/** "cannot be woken, will not feed, …, or has 38.0 °C or more", to follow "a newborn who". */
export function emergencySignsSay(): string {
	return new Intl.ListFormat('en', { type: 'disjunction' }).format(EMERGENCY_SIGNS.map(({ says }) => says));
}
