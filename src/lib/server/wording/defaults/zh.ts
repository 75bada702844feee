import type { DefaultWording } from '../default-wording';

/** Simplified Chinese. Draft: not reviewed by a qualified translator. */
export const zh: DefaultWording = {
	sentences: {
		reply: {
			sms: { open: '回复1确认，回复2改时间。', confirmed: '如需改时间，请回复2。' },
			mail: {
				open: '请打开下面的链接，确认时间或要求改时间。',
				confirmed: '谢谢您的确认。如需改时间，请打开下面的链接。'
			}
		},
		advice: {
			emergency: '请马上拨打{emergency}。不要等我们。',
			today: '宝宝今天需要看医生。我们会在30分钟内给您打电话。没有接到电话？请拨打{nightPhone}。',
			'call-back': '我们会给您打电话。如果情况变差，请拨打{nightPhone}。',
			'as-planned': '请按原计划进行。如有变化，请拨打{nightPhone}。'
		},
		choice: '{number} = {mark}'
	},
	texts: {
		'visit-booked': {
			sms: '{clinic}：宝宝的就诊时间是{day} {time}。{reply} {link} 回复STOP停止短信。',
			mail: {
				subject: '宝宝的就诊时间：{day} {time}',
				body: '已为宝宝预约就诊。\n\n时间：{day} {time}\n地点：{clinic}，{address}\n\n{reply}\n\n{link}\n\n本邮件的附件可将就诊时间加入您的日历。\n\n请拨打{phone}联系我们。夜间请拨打{nightPhone}。如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'visit-moved': {
			sms: '{clinic}：宝宝的就诊时间已改为{day} {time}。{reply} {link}',
			mail: {
				subject: '宝宝的就诊时间已更改：{day} {time}',
				body: '宝宝的就诊有了新的时间。\n\n时间：{day} {time}\n地点：{clinic}，{address}\n\n{reply}\n\n{link}\n\n本邮件的附件可将新的时间加入您的日历。\n\n请拨打{phone}联系我们。夜间请拨打{nightPhone}。如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'visit-cancelled': {
			sms: '{clinic}：{day} {time}的就诊已取消。请拨打{phone}重新预约或询问。',
			mail: {
				subject: '就诊已取消：{day} {time}',
				body: '{day} {time}在{clinic}的就诊已取消。\n\n请拨打{phone}重新预约或询问。\n\n本邮件的附件可将就诊从您的日历中删除。\n\n夜间请拨打{nightPhone}。如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'reminder-day-before': {
			sms: '{clinic}提醒您：宝宝的就诊时间是{day} {time}。{reply} {link}',
			mail: {
				subject: '提醒：宝宝的就诊时间 {day} {time}',
				body: '我们很快就会见到您和宝宝。\n\n时间：{day} {time}\n地点：{clinic}，{address}\n\n{reply}\n\n{link}\n\n请拨打{phone}联系我们。夜间请拨打{nightPhone}。'
			}
		},
		'reminder-morning': {
			sms: '今天{time}：宝宝在{clinic}就诊。{reply} 会迟到？请拨打{phone}。{link}',
			mail: {
				subject: '今天{time}：宝宝就诊',
				body: '今天我们会见到您和宝宝。\n\n时间：{day} {time}\n地点：{clinic}，{address}\n\n{reply}\n\n{link}\n\n会迟到或找不到地方？请拨打{phone}。'
			}
		},
		'check-in-ask': {
			sms: '{clinic}：宝宝今天怎么样？请回答几个简短的问题：{link} 叫不醒、软绵绵或不吃奶？请马上拨打{emergency}。',
			mail: {
				subject: '宝宝今天怎么样？',
				body: '宝宝今天怎么样？\n\n请回答几个简短的问题，只需2分钟。\n\n{link}\n\n宝宝叫不醒、软绵绵或不吃奶？请马上拨打{emergency}。\n\n您可以拨打{phone}联系{clinic}。夜间请拨打{nightPhone}。'
			}
		},
		'prolonged-check-ask': {
			sms: '{clinic}：又到了看看宝宝的时候。请回答几个简短的问题：{link} 叫不醒、软绵绵或不吃奶？请马上拨打{emergency}。',
			mail: {
				subject: '又到了看看宝宝的时候',
				body: '又到了看看宝宝的时候。\n\n请回答几个简短的问题，只需2分钟。\n\n{link}\n\n宝宝叫不醒、软绵绵或不吃奶？请马上拨打{emergency}。\n\n您可以拨打{phone}联系{clinic}。夜间请拨打{nightPhone}。'
			}
		},
		'visit-missed': {
			sms: '{clinic}：今天没有见到您和宝宝。宝宝仍然需要看医生。请在这里要求新的时间：{link} 或拨打{phone}。',
			mail: {
				subject: '今天没有见到您和宝宝',
				body: '今天没有见到您和宝宝。宝宝仍然需要看医生。\n\n请在这里要求新的时间：\n\n{link}\n\n或拨打{phone}联系{clinic}。夜间请拨打{nightPhone}。如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'visit-missed-again': {
			sms: '{clinic}：我们需要就一次就诊与您联系。宝宝仍需尽快看医生。请现在拨打{phone}。夜间：{nightPhone}。',
			mail: {
				subject: '请就一次就诊给我们打电话',
				body: '我们需要就一次就诊与您联系。宝宝仍需尽快看医生。\n\n请现在拨打{phone}联系{clinic}。夜间请拨打{nightPhone}。\n\n如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'answer-received': {
			sms: '{clinic}：我们收到了您的回答。{advice}',
			mail: {
				subject: '我们收到了您的回答',
				body: '我们收到了您的回答。\n\n{advice}\n\n您可以在这里查看：\n\n{link}\n\n{clinic}，{phone}'
			}
		},
		'other-time-received': {
			sms: '{clinic}：您要求改时间。我们会给您打电话。在此之前，原来的时间仍为您保留。没有接到电话？请拨打{phone}。',
			mail: {
				subject: '您要求改时间',
				body: '您要求改时间。我们会给您打电话。\n\n在此之前，原来的时间仍为您保留。\n\n没有接到电话？请拨打{phone}联系{clinic}。'
			}
		},
		'follow-up-closed': {
			sms: '{clinic}：没有更多的就诊安排。您仍可拨打{phone}，夜间{nightPhone}。如果宝宝病得很重，请拨打{emergency}。',
			mail: {
				subject: '没有更多的就诊安排',
				body: '{clinic}没有更多的就诊安排。\n\n您仍可拨打{phone}。夜间请拨打{nightPhone}。\n\n如果皮肤或眼睛变得更黄，或大便发白、发灰，请给我们打电话。如果宝宝病得很重，请拨打{emergency}。'
			}
		},
		'desk-words': {
			sms: '{clinic}：{words}',
			mail: {
				subject: '来自{clinic}的消息',
				body: '{words}\n\n{clinic}，{phone}\n\n请不要回复本邮件。请打电话，或打开您的页面：\n\n{link}'
			}
		},
		'help-answer': {
			sms: '{clinic}：请拨打{phone}，夜间{nightPhone}。如果宝宝病得很重，请拨打{emergency}。回复STOP停止短信。'
		},
		'stop-answer': {
			sms: '{clinic}：您将不再收到短信。我们仍可能给您打电话。回复START重新接收短信。电话：{phone}。'
		},
		'start-answer': {
			sms: '{clinic}：您将重新收到短信。回复STOP停止，回复HELP获得帮助。'
		},
		'which-newborn': {
			sms: '您说的是哪个宝宝？请回复数字：{choices}。'
		},
		'emergency-advice': {
			sms: '宝宝叫不醒、软绵绵、发紫或呼吸不好？请马上拨打{emergency}。不要等我们。我们已通知工作人员。电话：{nightPhone}。',
			mail: {
				subject: '如果宝宝病得很重，请马上拨打{emergency}',
				body: '宝宝叫不醒、软绵绵、发紫或呼吸不好？请马上拨打{emergency}。不要等我们。\n\n我们已通知工作人员。您可以日夜拨打{nightPhone}。'
			}
		}
	}
};
