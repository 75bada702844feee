import type { DefaultWording } from '../default-wording';

/** English, the source of the other languages. Draft: no clinician or editor has reviewed it yet. */
export const en: DefaultWording = {
	sentences: {
		reply: {
			sms: {
				open: 'Reply 1 to confirm, 2 for another time.',
				confirmed: 'Reply 2 if you need another time.'
			},
			mail: {
				open: 'Please open the link below. There you can say yes or ask for another time.',
				confirmed: 'Thank you for saying yes. If you need another time, open the link below.'
			}
		},
		advice: {
			emergency: 'Call {emergency} now. Do not wait for us.',
			today:
				'Your baby needs to be seen today. We will call you within 30 minutes. No call? Call {nightPhone}.',
			'call-back': 'We will call you. If things get worse, call {nightPhone}.',
			'as-planned': 'Please go on as planned. If things change, call {nightPhone}.'
		},
		choice: '{number} = {mark}'
	},
	texts: {
		'visit-booked': {
			sms: "{clinic}: your baby's visit is {day}, {time}. {reply} {link} STOP ends texts.",
			mail: {
				subject: "Your baby's visit: {day}, {time}",
				body: 'Your baby has a visit.\n\nWhen: {day}, {time}\nWhere: {clinic}, {address}\n\n{reply}\n\n{link}\n\nThe file with this mail puts the visit in your calendar.\n\nCall us at {phone}. At night, call {nightPhone}. If your baby is very ill, call {emergency}.'
			}
		},
		'visit-moved': {
			sms: "{clinic}: your baby's visit has moved. It is now {day}, {time}. {reply} {link}",
			mail: {
				subject: "Your baby's visit has moved: {day}, {time}",
				body: "Your baby's visit has a new time.\n\nWhen: {day}, {time}\nWhere: {clinic}, {address}\n\n{reply}\n\n{link}\n\nThe file with this mail puts the new time in your calendar.\n\nCall us at {phone}. At night, call {nightPhone}. If your baby is very ill, call {emergency}."
			}
		},
		'visit-cancelled': {
			sms: '{clinic}: the visit on {day}, {time} is off. Call {phone} to make a new time or to ask about it.',
			mail: {
				subject: 'Visit is off: {day}, {time}',
				body: 'The visit on {day}, {time} at {clinic} is off.\n\nPlease call {phone} to make a new time or to ask about it.\n\nThe file with this mail takes the visit out of your calendar.\n\nAt night, call {nightPhone}. If your baby is very ill, call {emergency}.'
			}
		},
		'reminder-day-before': {
			sms: "{clinic}: your baby's visit is {day}, {time}. {reply} {link}",
			mail: {
				subject: "Your baby's visit: {day}, {time}",
				body: 'We will see you and your baby soon.\n\nWhen: {day}, {time}\nWhere: {clinic}, {address}\n\n{reply}\n\n{link}\n\nCall us at {phone}. At night, call {nightPhone}.'
			}
		},
		'reminder-morning': {
			sms: "Today, {time}: your baby's visit at {clinic}. {reply} Late or lost? Call {phone}. {link}",
			mail: {
				subject: "Today, {time}: your baby's visit",
				body: 'We will see you and your baby today.\n\nWhen: {day}, {time}\nWhere: {clinic}, {address}\n\n{reply}\n\n{link}\n\nLate or lost? Call {phone}.'
			}
		},
		'check-in-ask': {
			sms: '{clinic}: how is your baby today? Please answer a few short questions: {link} Hard to wake, limp or not feeding? Call {emergency} now.',
			mail: {
				subject: 'How is your baby today?',
				body: 'How is your baby today?\n\nPlease answer a few short questions. It takes 2 minutes.\n\n{link}\n\nIs your baby hard to wake, limp or not feeding? Call {emergency} now.\n\nYou can call {clinic} at {phone}. At night, call {nightPhone}.'
			}
		},
		'prolonged-check-ask': {
			sms: '{clinic}: it is time to look at your baby again. Please answer a few short questions: {link} Hard to wake, limp or not feeding? Call {emergency} now.',
			mail: {
				subject: 'Time to look at your baby again',
				body: 'It is time to look at your baby again.\n\nPlease answer a few short questions. It takes 2 minutes.\n\n{link}\n\nIs your baby hard to wake, limp or not feeding? Call {emergency} now.\n\nYou can call {clinic} at {phone}. At night, call {nightPhone}.'
			}
		},
		'visit-missed': {
			sms: '{clinic}: we missed you and your baby today. Your baby still needs to be seen. Ask for a new time here: {link} or call {phone}.',
			mail: {
				subject: 'We missed you today',
				body: 'We missed you and your baby today. Your baby still needs to be seen.\n\nAsk for a new time here:\n\n{link}\n\nOr call {clinic} at {phone}. At night, call {nightPhone}. If your baby is very ill, call {emergency}.'
			}
		},
		'visit-missed-again': {
			sms: '{clinic}: we need to reach you about a visit. The baby still needs to be seen soon. Please call {phone} now. At night: {nightPhone}.',
			mail: {
				subject: 'Please call us about a visit',
				body: 'We need to reach you about a visit. The baby still needs to be seen soon.\n\nPlease call {clinic} at {phone} now. At night, call {nightPhone}.\n\nIf the baby is very ill, call {emergency}.'
			}
		},
		'answer-received': {
			sms: '{clinic}: we got your answers. {advice}',
			mail: {
				subject: 'We got your answers',
				body: 'We got your answers.\n\n{advice}\n\nYou can see them here:\n\n{link}\n\n{clinic}, {phone}'
			}
		},
		'other-time-received': {
			sms: '{clinic}: you asked for another time. We will call you. Until then, your old time is still yours. No call? Call {phone}.',
			mail: {
				subject: 'You asked for another time',
				body: 'You asked for another time. We will call you.\n\nUntil then, your old time is still yours.\n\nNo call? Call {clinic} at {phone}.'
			}
		},
		'follow-up-closed': {
			sms: '{clinic}: no more visits are planned here. You can still call us at {phone}, at night {nightPhone}. If your baby is very ill, call {emergency}.',
			mail: {
				subject: 'No more visits are planned',
				body: 'No more visits are planned at {clinic}.\n\nYou can still call us at {phone}. At night, call {nightPhone}.\n\nCall us if the skin or eyes turn more yellow, or if the poop is white or gray. If your baby is very ill, call {emergency}.'
			}
		},
		'desk-words': {
			sms: '{clinic}: {words}',
			mail: {
				subject: 'A note from {clinic}',
				body: '{words}\n\n{clinic}, {phone}\n\nPlease do not answer this mail. Call us, or open your page:\n\n{link}'
			}
		},
		'help-answer': {
			sms: '{clinic}: call {phone}, at night {nightPhone}. If your baby is very ill, call {emergency}. STOP ends texts.'
		},
		'stop-answer': {
			sms: '{clinic}: you will get no more texts. We may still call you. Reply START to get texts again. Our phone: {phone}.'
		},
		'start-answer': {
			sms: '{clinic}: you will get texts again. Reply STOP to end them or HELP for help.'
		},
		'which-newborn': {
			sms: 'Which baby do you mean? Reply with the number: {choices}.'
		},
		'emergency-advice': {
			sms: 'Is your baby hard to wake, limp, blue, or not breathing well? Call {emergency} now. Do not wait for us. We have told our staff. Our phone: {nightPhone}.',
			mail: {
				subject: 'If your baby is very ill, call {emergency} now',
				body: 'Is your baby hard to wake, limp, blue, or not breathing well? Call {emergency} now. Do not wait for us.\n\nWe have told our staff. You can call us at {nightPhone} day and night.'
			}
		},
		'duty-finding': {
			mail: {
				subject: '{clinic}: something is owed by nobody',
				body: 'The watch found this at {clinic}:\n\n{finding}\n\nSee it here: {operations}'
			}
		}
	}
};
