import type { DefaultWording } from '../default-wording';

/**
 * Spanish, in the formal "usted". Draft: not reviewed by a qualified translator. The text messages keep to letters of the
 * GSM alphabet (é, ñ, but not á, í, ó, ú) where plain Spanish allows it, since one other letter halves each part.
 */
export const es: DefaultWording = {
	sentences: {
		reply: {
			sms: {
				open: 'Responda 1 para confirmar, 2 para otra hora.',
				confirmed: 'Responda 2 si necesita otra hora.'
			},
			mail: {
				open: 'Abra el enlace de abajo. Puede decir que sí o pedir otra hora.',
				confirmed: 'Gracias por decir que sí. Si necesita otra hora, abra el enlace de abajo.'
			}
		},
		advice: {
			emergency: 'Llame ya al {emergency}. No nos espere.',
			today: 'Hay que ver a su bebé hoy. Le llamamos en 30 minutos. ¿No le llaman? Llame al {nightPhone}.',
			'call-back': 'Le vamos a llamar. Si algo empeora, llame al {nightPhone}.',
			'as-planned': 'Siga con el plan. Si algo cambia, llame al {nightPhone}.'
		},
		choice: '{number} = {mark}'
	},
	texts: {
		'visit-booked': {
			sms: '{clinic}: la cita de su bebé es el {day}, {time}. {reply} {link} STOP para no recibir mensajes.',
			mail: {
				subject: 'La cita de su bebé: {day}, {time}',
				body: 'Su bebé tiene una cita.\n\nCuándo: {day}, {time}\nDónde: {clinic}, {address}\n\n{reply}\n\n{link}\n\nEl archivo de este correo pone la cita en su calendario.\n\nLlame al {phone}. De noche, llame al {nightPhone}. Si su bebé está muy mal, llame al {emergency}.'
			}
		},
		'visit-moved': {
			sms: '{clinic}: la cita de su bebé tiene otra hora. Ahora es el {day}, {time}. {reply} {link}',
			mail: {
				subject: 'Nueva hora de la cita: {day}, {time}',
				body: 'La cita de su bebé tiene otra hora.\n\nCuándo: {day}, {time}\nDónde: {clinic}, {address}\n\n{reply}\n\n{link}\n\nEl archivo de este correo pone la nueva hora en su calendario.\n\nLlame al {phone}. De noche, llame al {nightPhone}. Si su bebé está muy mal, llame al {emergency}.'
			}
		},
		'visit-cancelled': {
			sms: '{clinic}: ya no hay cita el {day}, {time}. Llame al {phone} para pedir otra o para preguntar.',
			mail: {
				subject: 'Ya no hay cita: {day}, {time}',
				body: 'Ya no hay cita el {day}, {time} en {clinic}.\n\nLlame al {phone} para pedir otra o para preguntar.\n\nEl archivo de este correo quita la cita de su calendario.\n\nDe noche, llame al {nightPhone}. Si su bebé está muy mal, llame al {emergency}.'
			}
		},
		'reminder-day-before': {
			sms: '{clinic}: la cita de su bebé es el {day}, {time}. {reply} {link}',
			mail: {
				subject: 'La cita de su bebé: {day}, {time}',
				body: 'Pronto vemos a su bebé.\n\nCuándo: {day}, {time}\nDónde: {clinic}, {address}\n\n{reply}\n\n{link}\n\nLlame al {phone}. De noche, llame al {nightPhone}.'
			}
		},
		'reminder-morning': {
			sms: 'Hoy, {time}: cita de su bebé en {clinic}. {reply} ¿Llega tarde? Llame al {phone}. {link}',
			mail: {
				subject: 'Hoy, {time}: la cita de su bebé',
				body: 'Hoy vemos a su bebé.\n\nCuándo: {day}, {time}\nDónde: {clinic}, {address}\n\n{reply}\n\n{link}\n\n¿Llega tarde? Llame al {phone}.'
			}
		},
		'check-in-ask': {
			sms: '{clinic}: ¿qué tal su bebé hoy? Responda unas preguntas cortas: {link} ¿No despierta bien, no come o no tiene fuerza? Llame ya al {emergency}.',
			mail: {
				subject: '¿Qué tal su bebé hoy?',
				body: '¿Qué tal su bebé hoy?\n\nResponda unas preguntas cortas. Son 2 minutos.\n\n{link}\n\n¿No despierta bien, no come o no tiene fuerza? Llame ya al {emergency}.\n\nPuede llamar a {clinic} al {phone}. De noche, llame al {nightPhone}.'
			}
		},
		'prolonged-check-ask': {
			sms: '{clinic}: es hora de mirar otra vez a su bebé. Responda unas preguntas cortas: {link} ¿No despierta bien, no come o no tiene fuerza? Llame ya al {emergency}.',
			mail: {
				subject: 'Es hora de mirar otra vez a su bebé',
				body: 'Es hora de mirar otra vez a su bebé.\n\nResponda unas preguntas cortas. Son 2 minutos.\n\n{link}\n\n¿No despierta bien, no come o no tiene fuerza? Llame ya al {emergency}.\n\nPuede llamar a {clinic} al {phone}. De noche, llame al {nightPhone}.'
			}
		},
		'visit-missed': {
			sms: '{clinic}: hoy no vimos a su bebé. Hay que ver a su bebé pronto. Pida otra hora: {link} o llame al {phone}.',
			mail: {
				subject: 'Hoy no vimos a su bebé',
				body: 'Hoy no vimos a su bebé. Hay que ver a su bebé pronto.\n\nPida otra hora:\n\n{link}\n\nO llame a {clinic} al {phone}. De noche, llame al {nightPhone}. Si su bebé está muy mal, llame al {emergency}.'
			}
		},
		'visit-missed-again': {
			sms: '{clinic}: queremos hablar con usted de una cita. Hay que ver al bebé pronto. Llame ya al {phone}. De noche: {nightPhone}.',
			mail: {
				subject: 'Llame, por favor, por una cita',
				body: 'Queremos hablar con usted de una cita. Hay que ver al bebé pronto.\n\nLlame ya a {clinic} al {phone}. De noche, llame al {nightPhone}.\n\nSi el bebé está muy mal, llame al {emergency}.'
			}
		},
		'answer-received': {
			sms: '{clinic}: ya tenemos lo que nos dijo. {advice}',
			mail: {
				subject: 'Ya tenemos lo que nos dijo',
				body: 'Ya tenemos lo que nos dijo.\n\n{advice}\n\nLo puede ver en:\n\n{link}\n\n{clinic}, {phone}'
			}
		},
		'other-time-received': {
			sms: '{clinic}: usted pide otra hora. Le vamos a llamar. Por ahora su hora sigue igual. ¿No le llaman? Llame al {phone}.',
			mail: {
				subject: 'Usted pide otra hora',
				body: 'Usted pide otra hora. Le vamos a llamar.\n\nPor ahora su hora sigue igual.\n\n¿No le llaman? Llame a {clinic} al {phone}.'
			}
		},
		'follow-up-closed': {
			sms: '{clinic}: ya no hay otra cita con nosotros. Puede llamar al {phone}, de noche al {nightPhone}. Si su bebé se ve muy mal, llame al {emergency}.',
			mail: {
				subject: 'Ya no hay otra cita',
				body: 'Ya no hay otra cita en {clinic}.\n\nPuede llamar al {phone}. De noche, llame al {nightPhone}.\n\nLlame si la piel o los ojos se ponen más amarillos. Llame si la caca es blanca o gris. Si su bebé está muy mal, llame al {emergency}.'
			}
		},
		'desk-words': {
			sms: '{clinic}: {words}',
			mail: {
				subject: 'Una nota de {clinic}',
				body: '{words}\n\n{clinic}, {phone}\n\nNo responda a este correo. Llame, o abra su enlace:\n\n{link}'
			}
		},
		'help-answer': {
			sms: '{clinic}: llame al {phone}, de noche al {nightPhone}. Si su bebé se ve muy mal, llame al {emergency}. STOP para no recibir mensajes.'
		},
		'stop-answer': {
			sms: '{clinic}: ya no le mandamos mensajes. Le podemos llamar. Responda START para recibir mensajes de nuevo. Tel.: {phone}.'
		},
		'start-answer': {
			sms: '{clinic}: le mandamos mensajes de nuevo. Responda STOP para no recibir o HELP para ayuda.'
		},
		'which-newborn': {
			sms: '¿De qué bebé nos habla? Responda solo la cifra: {choices}.'
		},
		'emergency-advice': {
			sms: '¿Su bebé no despierta, no tiene fuerza, se ve azul o respira mal? Llame ya al {emergency}. No nos espere. Nuestro equipo ya lo sabe. Tel.: {nightPhone}.',
			mail: {
				subject: 'Si su bebé está muy mal, llame ya al {emergency}',
				body: '¿Su bebé no despierta, no tiene fuerza, se ve azul o respira mal? Llame ya al {emergency}. No nos espere.\n\nNuestro equipo ya lo sabe. Puede llamar al {nightPhone} de día y de noche.'
			}
		}
	}
};
