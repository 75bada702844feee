import type { PolicyForm } from '$lib/schemas/policy';

type NumberKey = {
	[Key in keyof PolicyForm]: PolicyForm[Key] extends number ? Key : never;
}[keyof PolicyForm];

export interface PolicyNumber {
	readonly key: NumberKey;
	readonly label: string;
	readonly hint: string;
	readonly unit: 'h' | 'min';
}

export interface PolicySection {
	readonly title: string;
	readonly numbers: readonly PolicyNumber[];
}

/** The numbers of a policy in the order of a follow-up's life, each with what it does. */
export const POLICY_SECTIONS: readonly PolicySection[] = [
	{
		title: 'Making the visit',
		numbers: [
			{
				key: 'bookHoursAfterDischarge',
				label: 'Book after discharge',
				hint: 'The desk makes a visit that the nurse could not; never later than the middle of the window.',
				unit: 'h'
			},
			{
				key: 'confirmHoursBefore',
				label: 'Confirmed before the visit',
				hint: 'The family should have confirmed by then, or in half the time that is left.',
				unit: 'h'
			},
			{
				key: 'arrivalGraceMinutes',
				label: 'Wait at the clinic',
				hint: 'After the visit’s time, a newborn who is not there is owed a decision.',
				unit: 'min'
			}
		]
	},
	{
		title: 'A family that did not come',
		numbers: [
			{ key: 'reachShortHours', label: 'Reach, window up to 24 h', hint: 'Time to reach them.', unit: 'h' },
			{ key: 'reachMiddleHours', label: 'Reach, window up to 48 h', hint: 'Time to reach them.', unit: 'h' },
			{ key: 'reachLongHours', label: 'Reach, longer window', hint: 'Time to reach them.', unit: 'h' },
			{
				key: 'ladderMinutes',
				label: 'Between two tries',
				hint: 'From one rung of the ladder to the next; it shrinks with the window.',
				unit: 'min'
			}
		]
	},
	{
		title: 'Value and decision',
		numbers: [
			{
				key: 'recordHours',
				label: 'Record after arrival',
				hint: 'Value and decision are entered.',
				unit: 'h'
			},
			{ key: 'decideHours', label: 'Decide after a value', hint: 'Below the threshold.', unit: 'h' },
			{
				key: 'decideUrgentMinutes',
				label: 'Decide, at or above a threshold',
				hint: 'Hours count here.',
				unit: 'min'
			},
			{
				key: 'climbMinutes',
				label: 'Before it climbs',
				hint: 'An unmet due time waits this long at each person before the next is told.',
				unit: 'min'
			}
		]
	}
];
