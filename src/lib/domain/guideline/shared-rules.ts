import type { Rule } from './standard';

/** Rules that hold under every standard, because none of them prints one. */
export const SHARED_RULES: Readonly<Record<string, Rule>> = {
	'deciding-value': {
		says: 'The latest value that may be trusted decides. Where none may be trusted, the latest can only ask for serum.',
		source: 'Neither standard prints which of several values decides',
		confidence: 'our reading'
	},
	'confirm.unanswered': {
		says: 'An earlier transcutaneous value asked for serum and none followed: a later transcutaneous value does not answer it.',
		source: 'Follows from the rules on transcutaneous values',
		confidence: 'our reading'
	},
	'past-the-lines': {
		says: 'The latest value lies past the last published hour and is held against no line: clinical judgement.',
		source: 'The published figures of the standard in force end at this age',
		confidence: 'our reading'
	}
};
