import type { CheckInAnswers, YellowArea } from '../../../domain/guideline/types';

const AREAS: Readonly<Record<YellowArea, string>> = {
	none: 'nowhere',
	face: 'face',
	chest: 'chest',
	belly: 'belly',
	'arms-or-legs': 'arms or legs',
	'hands-or-feet': 'hands or feet'
};
const CHANGES = { less: 'less', same: 'the same', more: 'more', 'not-sure': 'not sure' } as const;
const DEPTHS = { pale: 'pale', clear: 'clear', 'deep-or-orange': 'deep or orange', none: 'none' } as const;
const EYES = { no: 'white', yes: 'yellow', 'yes-and-more': 'yellow, more than before' } as const;
const STOOLS = {
	'black-or-green': 'black or green',
	yellow: 'yellow',
	brown: 'brown',
	'pale-or-white': 'pale or white',
	'none-yet': 'none yet'
} as const;
const WAKING = {
	'wakes-for-feeds': 'wakes for feeds',
	'hard-to-wake': 'hard to wake',
	'cannot-be-woken': 'cannot be woken'
} as const;
const SUCK = { strong: 'strong', weak: 'weak', 'will-not-feed': 'will not feed' } as const;

export interface AnswerLine {
	readonly field: keyof CheckInAnswers;
	readonly asks: string;
	readonly says: string;
}

/** The parents' answers in the staff's words, in the order in which they are asked. */
export function answerLines(answers: CheckInAnswers): AnswerLine[] {
	return [
		{ field: 'yellowArea', asks: 'Yellow', says: AREAS[answers.yellowArea] },
		{ field: 'yellowChange', asks: 'Compared with before', says: CHANGES[answers.yellowChange] },
		{ field: 'yellowDepth', asks: 'Depth', says: DEPTHS[answers.yellowDepth] },
		{ field: 'eyesYellow', asks: 'Eyes', says: EYES[answers.eyesYellow] },
		{ field: 'feedsIn24Hours', asks: 'Feeds in 24 h', says: String(answers.feedsIn24Hours) },
		{ field: 'wetIn24Hours', asks: 'Wet diapers', says: String(answers.wetIn24Hours) },
		{ field: 'dirtyIn24Hours', asks: 'Dirty diapers', says: String(answers.dirtyIn24Hours) },
		{ field: 'hoursSinceWet', asks: 'Hours since wet', says: String(answers.hoursSinceWet) },
		{ field: 'stoolColour', asks: 'Stool', says: STOOLS[answers.stoolColour] },
		{ field: 'urineColour', asks: 'Urine', says: answers.urineColour },
		{ field: 'waking', asks: 'Waking', says: WAKING[answers.waking] },
		{ field: 'suck', asks: 'Suck', says: SUCK[answers.suck] },
		{ field: 'cry', asks: 'Cry', says: answers.cry === 'normal' ? 'normal' : 'high-pitched' },
		{ field: 'tone', asks: 'Tone', says: answers.tone },
		{ field: 'breathing', asks: 'Breathing', says: answers.breathing === 'normal' ? 'normal' : 'pauses' },
		{ field: 'seizure', asks: 'Seizure', says: answers.seizure ? 'yes' : 'no' },
		{
			field: 'temperatureCelsius',
			asks: 'Temperature',
			says:
				answers.temperatureCelsius === undefined ? 'not taken' : `${answers.temperatureCelsius.toFixed(1)} °C`
		},
		{
			field: 'weightGrams',
			asks: 'Weight',
			says: answers.weightGrams === undefined ? 'not weighed' : `${answers.weightGrams} g`
		},
		{ field: 'worried', asks: 'Worried', says: answers.worried ? 'yes' : 'no' }
	];
}
