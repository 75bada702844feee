import type { CallAim } from '../../../domain/followup/call-script';
import type { FollowUpWindow } from '../../../domain/guideline/types';
import { formatDayTime, formatSpan, type TimeStyle } from '../../../format/time';
import { windowTestLabel } from '../../../format/values';
import type { CallPanel } from '../../../schemas/desk-panel';

export interface ScriptPart {
	readonly aim: CallAim;
	/** What the call has to bring about. */
	readonly title: string;
	/** What to say or do, in order. */
	readonly lines: readonly string[];
}

type Facts = Readonly<Record<'visit' | 'span' | 'offer' | 'clinic' | 'emergency' | 'test', string>> & {
	readonly laterCheckAsks: string;
	readonly wish: string;
};

function spanWords(window: FollowUpWindow | null, isPast: boolean, style: TimeStyle): string {
	if (!window) return 'when the pediatrician says';
	if (isPast) return 'as soon as can be; the window has passed, so the pediatrician approves the time';
	return `between ${formatSpan(window.from, window.until, style).replace(' to ', ' and ')}`;
}

function factsOf({ row, clinic, laterCheckAsks, nowAt }: CallPanel): Facts {
	const style = { timeZone: row.timeZone };
	const isPast = row.window !== null && row.window.until < nowAt;
	return {
		visit: row.visit ? formatDayTime(row.visit.startsAt, style) : 'no visit yet',
		span: spanWords(row.window, isPast, style),
		offer: isPast ? 'When could you come at the earliest?' : 'Which of these times can you come?',
		clinic: clinic.name,
		emergency: clinic.emergencyNumber,
		test: row.window ? windowTestLabel(row.window.test) : 'by clinical judgement',
		laterCheckAsks: laterCheckAsks ?? 'whether the yellow colour is gone, and the colour of stool and urine',
		wish: row.visit?.otherTimeWish ? ` They wrote: “${row.visit.otherTimeWish}”.` : ''
	};
}

/** Common practice, no source; the warning signs are those of the parents' check-in. */
const PARTS: Readonly<Record<CallAim, (facts: Facts) => Omit<ScriptPart, 'aim'>>> = {
	'emergency-answer': (f) => ({
		title: 'An answer that cannot wait',
		lines: [
			`Ask whether they have called ${f.emergency}. If not: “Please hang up and call ${f.emergency} now.”`,
			'Tell the pediatrician on duty at once, whatever the family says.'
		]
	}),
	'seen-today': (f) => ({
		title: 'To be seen today',
		lines: [
			`“You told us something that we want to look at today.” Offer the first free place at ${f.clinic}.`,
			'No place today, or they cannot come: tell the pediatrician before you end the call.'
		]
	}),
	'did-not-come': (f) => ({
		title: 'The family did not come',
		lines: [
			`“We expected you at ${f.clinic}. Is the newborn well?” Pass on to the pediatrician what you hear.`,
			`Make a new visit. The newborn has to be seen ${f.span}.`
		]
	}),
	'not-marked': (f) => ({
		title: 'The visit has begun',
		lines: [
			`The visit was for ${f.visit}. If the newborn is here, mark it as arrived.`,
			'If not, call: “We were expecting you. Are you on your way?” Then mark it as did not come.'
		]
	}),
	'answer-call-back': () => ({
		title: 'Call back about the check-in',
		lines: [
			'Read the answer below. “You answered our questions; I am calling about that.”',
			'Write down what they say and pass it on to the pediatrician. Do not judge it on the telephone.'
		]
	}),
	'family-wrote': () => ({
		title: 'The family wrote',
		lines: ['Read the thread first. Answer in the thread or on the telephone, then settle it here.']
	}),
	'other-time': (f) => ({
		title: 'They ask for another time',
		lines: [`The visit is ${f.visit} and stands until it is moved.${f.wish}`, `Offer a time ${f.span}.`]
	}),
	'make-visit': (f) => ({
		title: 'Make the visit',
		lines: [
			`The newborn has to be seen ${f.span}. Test: ${f.test}.`,
			`“Your baby needs a check for jaundice at ${f.clinic}. ${f.offer}”`
		]
	}),
	'get-confirmation': (f) => ({
		title: 'Get the confirmation',
		lines: [
			`“The visit is ${f.visit} at ${f.clinic}. Can you come?”`,
			`If not, move it to a time ${f.span}. Do not leave them without one.`
		]
	}),
	'check-number': () => ({
		title: 'Messages do not arrive',
		lines: [
			'Check telephone number and mail address with the family; the nurse or pediatrician can correct them.',
			'Tell them the visit by word of mouth, and ask whether they want messages.'
		]
	}),
	'later-check': (f) => ({
		title: 'Ask as arranged',
		lines: [`Ask: ${f.laterCheckAsks}.`, 'Write down the answer and tell the pediatrician.']
	})
};

/** What to say in this call: one part for each aim, the most pressing first. */
export function scriptOf(panel: CallPanel): ScriptPart[] {
	const facts = factsOf(panel);
	return panel.aims.map((aim) => ({ aim, ...PARTS[aim](facts) }));
}
