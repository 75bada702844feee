import type { KeyHint } from '../../keys';

/** The keys of every screen, for the help page; each screen also shows its own. */
export const HELP_KEYS: readonly KeyHint[] = [
	{ keys: ['/'], does: 'Search' },
	{ keys: ['j', 'k'], does: 'Next, previous row of a list' },
	{ keys: ['Enter'], does: 'Open the row' },
	{ keys: ['c'], does: 'Queue: write down a call' },
	{ keys: ['v'], does: 'Queue: to the visit' },
	{ keys: ['Esc'], does: 'Queue: close the call panel' },
	{ keys: ['[', ']'], does: 'Calendar: week before, week after' },
	{ keys: ['t'], does: 'Calendar: today' },
	{ keys: ['+', '−'], does: 'Hour line: closer, wider' },
	{ keys: ['←', '→'], does: 'Hour line: earlier, later' },
	{ keys: ['0'], does: 'Hour line: everything' }
];

/** The product's words, one for each thing. */
export const HELP_WORDS: readonly { readonly word: string; readonly means: string }[] = [
	{
		word: 'Follow-up',
		means: 'The whole loop of one newborn, from discharge until it is closed with an outcome.'
	},
	{
		word: 'Next step',
		means: 'What is owed now: one for each open follow-up, with who owes it and by when.'
	},
	{
		word: 'Window',
		means: 'The earliest and the latest time at which the newborn must be seen, and with which test.'
	},
	{
		word: 'Alert',
		means: 'Something owed beside the next step: a worrying answer, a message that did not arrive.'
	},
	{ word: 'Opening', means: 'A stretch of a clinic’s time with places for a kind of visit.' },
	{ word: 'Place', means: 'One bookable spot in an opening.' },
	{ word: 'Carer', means: 'A parent or other person with a telephone, in the order of calling.' },
	{ word: 'Check-in', means: 'The parents’ answers about yellowing and feeding, and what they led to.' },
	{
		word: 'Passed on',
		means: 'A due time was not met, so the step went on to the duty person. It stays in the queue.'
	},
	{
		word: 'Hour line',
		means: 'The newborn’s first days in hours, with values, window, visits, messages and check-ins.'
	}
];
