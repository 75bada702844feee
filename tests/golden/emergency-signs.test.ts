import { describe, expect, it } from 'vitest';
import {
	EMERGENCY_SIGNS,
	emergencySignsSay,
	HOME_LIMITS,
	triageCheckIn,
	YELLOW_AREAS,
	type CheckInAnswers
} from '../../src/lib/domain/guideline/index';
import { WELL } from '../support/well-newborn';
import { at, BORN_AT } from './newborn';

/** On day 4, where a well newborn's answers ask for no more than the planned visit. */
const judged = (answers: Partial<CheckInAnswers>) =>
	triageCheckIn({ ...WELL, ...answers }, { bornAt: BORN_AT, now: at(80) });

/** Every answer that a family can choose, one at a time. */
const CHOICES: readonly Partial<CheckInAnswers>[] = [
	...YELLOW_AREAS.map((yellowArea) => ({ yellowArea })),
	...(['less', 'same', 'more', 'not-sure'] as const).map((yellowChange) => ({ yellowChange })),
	...(['pale', 'clear', 'deep-or-orange', 'none'] as const).map((yellowDepth) => ({ yellowDepth })),
	...(['no', 'yes', 'yes-and-more'] as const).map((eyesYellow) => ({ eyesYellow })),
	...[0, 7, 8].map((feedsIn24Hours) => ({ feedsIn24Hours })),
	...[0, 3].map((wetIn24Hours) => ({ wetIn24Hours })),
	...[0, 3].map((dirtyIn24Hours) => ({ dirtyIn24Hours })),
	...[7, 8, 30].map((hoursSinceWet) => ({ hoursSinceWet })),
	...(['black-or-green', 'yellow', 'brown', 'pale-or-white', 'none-yet'] as const).map((stoolColour) => ({
		stoolColour
	})),
	...(['pale', 'dark'] as const).map((urineColour) => ({ urineColour })),
	...(['wakes-for-feeds', 'hard-to-wake', 'cannot-be-woken'] as const).map((waking) => ({ waking })),
	...(['strong', 'weak', 'will-not-feed'] as const).map((suck) => ({ suck })),
	...(['normal', 'high-pitched'] as const).map((cry) => ({ cry })),
	...(['normal', 'limp', 'arching'] as const).map((tone) => ({ tone })),
	...(['normal', 'pauses'] as const).map((breathing) => ({ breathing })),
	...[true, false].map((seizure) => ({ seizure })),
	...[35.9, 36, 37.9, 38].map((temperatureCelsius) => ({ temperatureCelsius })),
	...[true, false].map((worried) => ({ worried }))
];

describe('the signs that families and staff are told', () => {
	it('starts from answers that ask for nothing', () => {
		expect(judged({})).toEqual({ result: 'as-planned', reasons: [] });
	});

	it.each(EMERGENCY_SIGNS.map((sign) => [sign.id, sign] as const))('%s is judged an emergency', (_, sign) => {
		expect(judged(sign.answer).result).toBe('emergency');
	});

	it('are all that the check-in judges an emergency, and no other', () => {
		const emergencies = CHOICES.filter((answer) => judged(answer).result === 'emergency');
		const sorted = (answers: readonly Partial<CheckInAnswers>[]) =>
			answers.map((answer) => JSON.stringify(answer)).sort();
		expect(sorted(emergencies)).toEqual(sorted(EMERGENCY_SIGNS.map(({ answer }) => answer)));
	});

	it('are told in one sentence', () => {
		expect(emergencySignsSay()).toBe(
			'cannot be woken, will not feed, is limp, arches the neck or back, has a high-pitched cry, has pauses in breathing, has a seizure, or has 38.0 °C or more'
		);
	});
});

describe('the limits that families are told are those by which their answers are judged', () => {
	it('for fever and cold, from both sides', () => {
		expect(judged({ temperatureCelsius: HOME_LIMITS.feverCelsius }).result).toBe('emergency');
		expect(judged({ temperatureCelsius: HOME_LIMITS.feverCelsius - 0.1 }).result).toBe('as-planned');
		expect(judged({ temperatureCelsius: HOME_LIMITS.coldCelsius - 0.1 }).result).toBe('today');
		expect(judged({ temperatureCelsius: HOME_LIMITS.coldCelsius }).result).toBe('as-planned');
		expect(HOME_LIMITS.feverFahrenheit).toBeCloseTo(100.4, 9);
		expect(HOME_LIMITS.coldFahrenheit).toBeCloseTo(96.8, 9);
	});

	it('for diapers and feeds, from both sides', () => {
		expect(judged({ hoursSinceWet: HOME_LIMITS.hoursWithoutWet }).result).toBe('today');
		expect(judged({ hoursSinceWet: HOME_LIMITS.hoursWithoutWet - 1 }).result).toBe('as-planned');
		expect(judged({ feedsIn24Hours: HOME_LIMITS.fewestFeeds }).result).toBe('as-planned');
		expect(judged({ feedsIn24Hours: HOME_LIMITS.fewestFeeds - 1 }).result).toBe('call-back');
	});
});
