import type { DefaultWording } from '../default-wording';

/** Vietnamese. Draft: not reviewed by a qualified translator. */
export const vi: DefaultWording = {
	sentences: {
		reply: {
			sms: {
				open: 'Trả lời 1 để xác nhận, 2 nếu cần giờ khác.',
				confirmed: 'Trả lời 2 nếu cần giờ khác.'
			},
			mail: {
				open: 'Xin mở liên kết dưới đây để xác nhận hoặc xin giờ khác.',
				confirmed: 'Cảm ơn quý vị đã xác nhận. Nếu cần giờ khác, xin mở liên kết dưới đây.'
			}
		},
		advice: {
			emergency: 'Hãy gọi {emergency} ngay. Đừng chờ chúng tôi.',
			today: 'Bé cần được khám hôm nay. Chúng tôi sẽ gọi trong 30 phút. Nếu không, hãy gọi {nightPhone}.',
			'call-back': 'Chúng tôi sẽ gọi cho quý vị. Nếu bé nặng hơn, hãy gọi {nightPhone}.',
			'as-planned': 'Xin tiếp tục như đã hẹn. Nếu có gì thay đổi, hãy gọi {nightPhone}.'
		},
		choice: '{number} = {mark}'
	},
	texts: {
		'visit-booked': {
			sms: '{clinic}: lịch khám của bé là {day}, {time}. {reply} {link} Nhắn STOP để ngừng.',
			mail: {
				subject: 'Lịch khám của bé: {day}, {time}',
				body: 'Bé có lịch khám.\n\nKhi nào: {day}, {time}\nỞ đâu: {clinic}, {address}\n\n{reply}\n\n{link}\n\nTệp kèm theo thư này đưa lịch khám vào lịch của quý vị.\n\nGọi chúng tôi: {phone}. Ban đêm: {nightPhone}. Nếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'visit-moved': {
			sms: '{clinic}: lịch khám của bé đã đổi sang {day}, {time}. {reply} {link}',
			mail: {
				subject: 'Lịch khám của bé đã đổi: {day}, {time}',
				body: 'Lịch khám của bé có giờ mới.\n\nKhi nào: {day}, {time}\nỞ đâu: {clinic}, {address}\n\n{reply}\n\n{link}\n\nTệp kèm theo thư này đưa giờ mới vào lịch của quý vị.\n\nGọi chúng tôi: {phone}. Ban đêm: {nightPhone}. Nếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'visit-cancelled': {
			sms: '{clinic}: lịch khám {day}, {time} đã hủy. Xin gọi {phone} để hẹn giờ mới hoặc để hỏi.',
			mail: {
				subject: 'Lịch khám đã hủy: {day}, {time}',
				body: 'Lịch khám {day}, {time} tại {clinic} đã hủy.\n\nXin gọi {phone} để hẹn giờ mới hoặc để hỏi.\n\nTệp kèm theo thư này xóa lịch khám khỏi lịch của quý vị.\n\nBan đêm: {nightPhone}. Nếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'reminder-day-before': {
			sms: '{clinic}: nhắc lịch khám của bé: {day}, {time}. {reply} {link}',
			mail: {
				subject: 'Nhắc lịch khám của bé: {day}, {time}',
				body: 'Chúng tôi sắp gặp quý vị và bé.\n\nKhi nào: {day}, {time}\nỞ đâu: {clinic}, {address}\n\n{reply}\n\n{link}\n\nGọi chúng tôi: {phone}. Ban đêm: {nightPhone}.'
			}
		},
		'reminder-morning': {
			sms: 'Hôm nay, {time}: bé khám tại {clinic}. {reply} Đến trễ? Gọi {phone}. {link}',
			mail: {
				subject: 'Hôm nay, {time}: lịch khám của bé',
				body: 'Hôm nay chúng tôi gặp quý vị và bé.\n\nKhi nào: {day}, {time}\nỞ đâu: {clinic}, {address}\n\n{reply}\n\n{link}\n\nĐến trễ hoặc lạc đường? Gọi {phone}.'
			}
		},
		'check-in-ask': {
			sms: '{clinic}: hôm nay bé thế nào? Xin trả lời vài câu hỏi ngắn: {link} Bé khó đánh thức, mềm nhũn hoặc không bú? Gọi {emergency} ngay.',
			mail: {
				subject: 'Hôm nay bé thế nào?',
				body: 'Hôm nay bé thế nào?\n\nXin trả lời vài câu hỏi ngắn. Chỉ mất 2 phút.\n\n{link}\n\nBé khó đánh thức, mềm nhũn hoặc không bú? Gọi {emergency} ngay.\n\nGọi {clinic}: {phone}. Ban đêm: {nightPhone}.'
			}
		},
		'prolonged-check-ask': {
			sms: '{clinic}: đã đến lúc xem lại bé. Xin trả lời vài câu hỏi ngắn: {link} Bé khó đánh thức, mềm nhũn hoặc không bú? Gọi {emergency} ngay.',
			mail: {
				subject: 'Đã đến lúc xem lại bé',
				body: 'Đã đến lúc xem lại bé.\n\nXin trả lời vài câu hỏi ngắn. Chỉ mất 2 phút.\n\n{link}\n\nBé khó đánh thức, mềm nhũn hoặc không bú? Gọi {emergency} ngay.\n\nGọi {clinic}: {phone}. Ban đêm: {nightPhone}.'
			}
		},
		'visit-missed': {
			sms: '{clinic}: hôm nay chúng tôi không gặp được bé. Bé vẫn cần được khám. Xin giờ mới: {link} hoặc gọi {phone}.',
			mail: {
				subject: 'Hôm nay chúng tôi không gặp được bé',
				body: 'Hôm nay chúng tôi không gặp được bé. Bé vẫn cần được khám.\n\nXin giờ mới ở đây:\n\n{link}\n\nHoặc gọi {clinic}: {phone}. Ban đêm: {nightPhone}. Nếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'visit-missed-again': {
			sms: '{clinic}: chúng tôi cần nói chuyện với quý vị về một lịch khám. Bé cần được khám sớm. Xin gọi {phone} ngay. Ban đêm: {nightPhone}.',
			mail: {
				subject: 'Xin gọi chúng tôi về một lịch khám',
				body: 'Chúng tôi cần nói chuyện với quý vị về một lịch khám. Bé cần được khám sớm.\n\nXin gọi {clinic} ngay: {phone}. Ban đêm: {nightPhone}.\n\nNếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'answer-received': {
			sms: '{clinic}: chúng tôi đã nhận câu trả lời. {advice}',
			mail: {
				subject: 'Chúng tôi đã nhận câu trả lời',
				body: 'Chúng tôi đã nhận câu trả lời của quý vị.\n\n{advice}\n\nXem lại ở đây:\n\n{link}\n\n{clinic}, {phone}'
			}
		},
		'other-time-received': {
			sms: '{clinic}: quý vị xin giờ khác. Chúng tôi sẽ gọi. Giờ cũ vẫn giữ cho bé. Nếu không thấy gọi, xin gọi {phone}.',
			mail: {
				subject: 'Quý vị xin giờ khác',
				body: 'Quý vị xin giờ khác. Chúng tôi sẽ gọi.\n\nGiờ cũ vẫn giữ cho bé đến lúc đó.\n\nNếu không thấy gọi, xin gọi {clinic}: {phone}.'
			}
		},
		'follow-up-closed': {
			sms: '{clinic}: không còn lịch khám nào. Quý vị vẫn có thể gọi {phone}, ban đêm {nightPhone}. Nếu bé rất yếu, hãy gọi {emergency}.',
			mail: {
				subject: 'Không còn lịch khám nào',
				body: 'Không còn lịch khám nào tại {clinic}.\n\nQuý vị vẫn có thể gọi {phone}. Ban đêm: {nightPhone}.\n\nHãy gọi nếu da hoặc mắt bé vàng hơn, hoặc phân trắng hay xám. Nếu bé rất yếu, hãy gọi {emergency}.'
			}
		},
		'desk-words': {
			sms: '{clinic}: {words}',
			mail: {
				subject: 'Lời nhắn từ {clinic}',
				body: '{words}\n\n{clinic}, {phone}\n\nXin đừng trả lời thư này. Hãy gọi chúng tôi, hoặc mở trang của quý vị:\n\n{link}'
			}
		},
		'help-answer': {
			sms: '{clinic}: gọi {phone}, ban đêm {nightPhone}. Nếu bé rất yếu, gọi {emergency}. Nhắn STOP để ngừng.'
		},
		'stop-answer': {
			sms: '{clinic}: quý vị sẽ không nhận tin nhắn nữa. Chúng tôi vẫn có thể gọi. Nhắn START để nhận lại. Điện thoại: {phone}.'
		},
		'start-answer': {
			sms: '{clinic}: quý vị sẽ nhận tin nhắn trở lại. Nhắn STOP để ngừng, HELP để được giúp.'
		},
		'which-newborn': {
			sms: 'Quý vị muốn nói về bé nào? Xin trả lời bằng số: {choices}.'
		},
		'emergency-advice': {
			sms: 'Bé khó đánh thức, mềm nhũn, tím tái hoặc khó thở? Gọi {emergency} ngay. Đừng chờ chúng tôi. Nhân viên đã được báo. Điện thoại: {nightPhone}.',
			mail: {
				subject: 'Nếu bé rất yếu, gọi {emergency} ngay',
				body: 'Bé khó đánh thức, mềm nhũn, tím tái hoặc khó thở? Gọi {emergency} ngay. Đừng chờ chúng tôi.\n\nNhân viên đã được báo. Quý vị có thể gọi {nightPhone} cả ngày lẫn đêm.'
			}
		}
	}
};
