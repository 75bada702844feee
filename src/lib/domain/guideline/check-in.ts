import { ageHours, dayOfAge } from './age';
import {
	DIAPERS,
	FEEDS_FROM_DAY,
	FEEDS_IN_24_HOURS,
	FIRST_DAY_HOURS,
	HOURS_WITHOUT_WET,
	PROLONGED_DAYS,
	SOURCES,
	TEMPERATURE,
	WEIGHT
} from './editions/check-in';
import type { CheckInAnswers, CheckInContext, CheckInReason, CheckInResult, CheckInTriage } from './types';

/** Least number of wet and dirty diapers in 24 hours on a day of age, counted from 1. */
export function expectedDiapers(day: number): { readonly wet: number; readonly dirty: number } {
	const row = DIAPERS[Math.min(Math.max(day, 1), DIAPERS.length) - 1];
	return row ?? { wet: 0, dirty: 0 };
}

interface Facts {
	readonly answers: CheckInAnswers;
	readonly hours: number;
	readonly day: number;
	readonly context: CheckInContext;
}

interface TriageRule {
	readonly field: keyof CheckInAnswers;
	readonly result: Exclude<CheckInResult, 'as-planned'>;
	readonly text: string;
	readonly source: string;
	readonly asks: (facts: Facts) => boolean;
}

const rule = (
	result: TriageRule['result'],
	field: TriageRule['field'],
	[text, source]: readonly [string, string],
	asks: TriageRule['asks']
): TriageRule => ({ result, field, text, source, asks });

const isYellow = ({ answers }: Facts): boolean =>
	answers.yellowArea !== 'none' || answers.eyesYellow !== 'no';
const isFaceOrChest = ({ answers }: Facts): boolean =>
	answers.yellowArea === 'face' || answers.yellowArea === 'chest';

/** Lost weight as a share of birth weight; 0 when not known, all of it when the weight given is no number. */
function lostShare({ answers, context }: Facts): number {
	if (Number.isNaN(answers.weightGrams)) return 1;
	if (answers.weightGrams === undefined || !context.birthWeightGrams) return 0;
	return (context.birthWeightGrams - answers.weightGrams) / context.birthWeightGrams;
}

const EMERGENCY: readonly TriageRule[] = [
	rule(
		'emergency',
		'waking',
		['The baby cannot be woken.', SOURCES.danger],
		({ answers }) => answers.waking === 'cannot-be-woken'
	),
	rule(
		'emergency',
		'tone',
		['The baby is limp or arches the neck or back.', SOURCES.danger],
		({ answers }) => answers.tone !== 'normal'
	),
	rule(
		'emergency',
		'cry',
		['The cry is high-pitched.', SOURCES.danger],
		({ answers }) => answers.cry === 'high-pitched'
	),
	rule(
		'emergency',
		'breathing',
		['There are pauses in breathing.', SOURCES.danger],
		({ answers }) => answers.breathing === 'pauses'
	),
	rule('emergency', 'seizure', ['The baby had a seizure.', SOURCES.danger], ({ answers }) => answers.seizure),
	rule(
		'emergency',
		'suck',
		['The baby will not feed.', SOURCES.danger],
		({ answers }) => answers.suck === 'will-not-feed'
	),
	rule(
		'emergency',
		'temperatureCelsius',
		['Fever of 38.0 °C or more.', SOURCES.fever],
		({ answers }) => !((answers.temperatureCelsius ?? 0) < TEMPERATURE.feverFrom)
	)
];

const TODAY: readonly TriageRule[] = [
	rule(
		'today',
		'yellowArea',
		['Yellow was seen in the first 24 hours.', SOURCES.firstDay],
		(facts) => facts.hours < FIRST_DAY_HOURS && isYellow(facts)
	),
	rule(
		'today',
		'yellowArea',
		['Yellow has reached the belly, arms, legs, hands or feet.', SOURCES.sameDay],
		(facts) => facts.answers.yellowArea !== 'none' && !isFaceOrChest(facts)
	),
	rule(
		'today',
		'yellowDepth',
		['The yellow is deep or orange.', SOURCES.sameDay],
		({ answers }) => answers.yellowDepth === 'deep-or-orange'
	),
	rule(
		'today',
		'yellowChange',
		['The yellow is getting stronger.', SOURCES.sameDay],
		({ answers }) => answers.yellowChange === 'more'
	),
	rule(
		'today',
		'eyesYellow',
		['The white of the eyes is yellow and more than before.', SOURCES.sameDay],
		({ answers }) => answers.eyesYellow === 'yes-and-more'
	),
	rule(
		'today',
		'waking',
		['The baby is hard to wake for feeds.', SOURCES.sameDay],
		({ answers }) => answers.waking === 'hard-to-wake'
	),
	rule(
		'today',
		'suck',
		['The baby sucks weakly.', SOURCES.sameDay],
		({ answers }) => answers.suck === 'weak'
	),
	rule(
		'today',
		'hoursSinceWet',
		['No wet diaper for 8 hours or more.', SOURCES.sameDay],
		({ answers }) => !(answers.hoursSinceWet < HOURS_WITHOUT_WET)
	),
	rule(
		'today',
		'temperatureCelsius',
		['Temperature under 36.0 °C.', SOURCES.sameDay],
		({ answers }) => (answers.temperatureCelsius ?? TEMPERATURE.lowBelow) < TEMPERATURE.lowBelow
	),
	rule(
		'today',
		'stoolColour',
		['The stool is pale, grey or white.', SOURCES.colour],
		({ answers }) => answers.stoolColour === 'pale-or-white'
	),
	rule(
		'today',
		'urineColour',
		['The urine is dark.', SOURCES.colour],
		({ answers }) => answers.urineColour === 'dark'
	),
	rule(
		'today',
		'weightGrams',
		['More than 10 % of birth weight is lost.', SOURCES.weight],
		(facts) => lostShare(facts) > WEIGHT.concernShare
	)
];

const CALL_BACK: readonly TriageRule[] = [
	rule(
		'call-back',
		'eyesYellow',
		['The white of the eyes is yellow.', SOURCES.product],
		({ answers }) => answers.eyesYellow === 'yes'
	),
	rule(
		'call-back',
		'feedsIn24Hours',
		['Fewer feeds than the day of age asks.', SOURCES.feeds],
		({ answers, day }) => day >= FEEDS_FROM_DAY && !(answers.feedsIn24Hours >= FEEDS_IN_24_HOURS)
	),
	rule(
		'call-back',
		'wetIn24Hours',
		['Fewer wet diapers than the day of age asks.', SOURCES.diapers],
		({ answers, day }) => !(answers.wetIn24Hours >= expectedDiapers(day).wet)
	),
	rule(
		'call-back',
		'dirtyIn24Hours',
		['Fewer dirty diapers than the day of age asks.', SOURCES.diapers],
		({ answers, day }) => !(answers.dirtyIn24Hours >= expectedDiapers(day).dirty)
	),
	rule(
		'call-back',
		'stoolColour',
		['The stool is still black or green, or none has come yet.', SOURCES.diapers],
		({ answers, day }) =>
			day >= DIAPERS.length &&
			(answers.stoolColour === 'black-or-green' || answers.stoolColour === 'none-yet')
	),
	rule(
		'call-back',
		'weightGrams',
		['Birth weight is not back at 14 days.', SOURCES.weight],
		(facts) => facts.hours >= WEIGHT.regainedByDays * 24 && lostShare(facts) > 0
	),
	rule(
		'call-back',
		'yellowArea',
		['Still yellow at the age of the prolonged-jaundice question.', SOURCES.prolonged],
		(facts) => facts.hours >= PROLONGED_DAYS[facts.context.feeding ?? 'formula'] * 24 && isYellow(facts)
	),
	rule('call-back', 'worried', ['The parent is worried.', SOURCES.product], ({ answers }) => answers.worried)
];

/** Worst first, so that the first match decides. */
const RULES: readonly TriageRule[] = [...EMERGENCY, ...TODAY, ...CALL_BACK];

/**
 * What the parents' answers ask for; the worst answer decides. It may bring a visit forward and never moves one back,
 * and `as-planned` does not say that the newborn is well. An answer that is no number counts as the worst.
 */
export function triageCheckIn(answers: CheckInAnswers, context: CheckInContext): CheckInTriage {
	const facts: Facts = {
		answers,
		context,
		hours: ageHours(context.bornAt, context.now),
		day: dayOfAge(context.bornAt, context.now)
	};
	const reasons: CheckInReason[] = RULES.filter((one) => one.asks(facts)).map(
		({ field, result, text, source }) => ({
			field,
			result,
			text,
			source
		})
	);
	return { result: reasons[0]?.result ?? 'as-planned', reasons };
}
