/** What each measure counts, out of what, and where it comes from. */
export const DEFINITIONS = {
	seenInside: {
		unit: 'newborns',
		definition:
			'The first visit that was kept had been booked inside the first window. Left out: entered twice, and those not seen while their window is still open. A follow-up that closed without a visit counts as not seen.',
		source: 'Common practice, no source; no published benchmark was found.'
	},
	confirmed: {
		unit: 'visits',
		definition: 'Visits whose time has come, not moved or cancelled, that the family confirmed in any way.',
		source: 'Common practice, no source.'
	},
	missed: {
		unit: 'visits',
		definition: 'The same visits, marked as “did not come”.',
		source: 'Common practice, no source.'
	},
	reached: {
		unit: 'missed visits',
		definition: 'After the missed visit a try reached the family, or the newborn came to a later visit.',
		source: 'Common practice, no source.'
	},
	overLine: {
		unit: 'first visits with a value',
		definition:
			'First value taken from two hours before arrival to a day after it (serum before transcutaneous), equal to or above the phototherapy line of its own hour.',
		source: 'The line: the standard in force. The count: common practice, no source.'
	},
	overdue: {
		unit: 'follow-ups',
		definition: 'As of now, whatever the period.',
		source: 'Common practice, no source.'
	},
	firstVisit: {
		unit: 'visits',
		definition: 'From the hand-over by the birth unit to the arrival at the first visit that was kept.',
		source:
			'For scale: in 39 US practices in 2006, 37 % of newborns had a timely first visit (Pediatrics 2009;124:548; its limit, before 6 days of age, is from memory).'
	}
} as const;

export const PERIODS = [
	{ value: '7', label: '7 days' },
	{ value: '30', label: '30 days' },
	{ value: '90', label: '90 days' },
	{ value: '365', label: '365 days' }
] as const;
