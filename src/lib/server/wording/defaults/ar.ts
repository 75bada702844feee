import type { DefaultWording } from '../default-wording';

/**
 * Arabic, right to left. Draft: not reviewed by a qualified translator. Each text begins with an Arabic word, since the
 * first strong letter sets the direction of the whole message on a telephone.
 */
export const ar: DefaultWording = {
	sentences: {
		reply: {
			sms: { open: 'أجب 1 للتأكيد، 2 لوقت آخر.', confirmed: 'أجب 2 إذا احتجت إلى وقت آخر.' },
			mail: {
				open: 'افتح الرابط أدناه لتأكيد الموعد أو لطلب وقت آخر.',
				confirmed: 'شكرا على التأكيد. إذا احتجت إلى وقت آخر، افتح الرابط أدناه.'
			}
		},
		advice: {
			emergency: 'اتصل بالرقم {emergency} الآن. لا تنتظرنا.',
			today: 'يجب أن يُفحص طفلك اليوم. سنتصل بك خلال 30 دقيقة. إذا لم نتصل، اتصل بالرقم {nightPhone}.',
			'call-back': 'سنتصل بك. إذا ساءت الحالة، اتصل بالرقم {nightPhone}.',
			'as-planned': 'تابع كما هو مخطط. إذا تغير شيء، اتصل بالرقم {nightPhone}.'
		},
		choice: '{number} = {mark}'
	},
	texts: {
		'visit-booked': {
			sms: 'من {clinic}: موعد طفلك {day}، {time}. {reply} {link} لإيقاف الرسائل أرسل STOP.',
			mail: {
				subject: 'موعد طفلك: {day}، {time}',
				body: 'لطفلك موعد.\n\nمتى: {day}، {time}\nأين: {clinic}، {address}\n\n{reply}\n\n{link}\n\nالملف المرفق بهذه الرسالة يضيف الموعد إلى تقويمك.\n\nاتصل بنا: {phone}. في الليل: {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'visit-moved': {
			sms: 'من {clinic}: تغير موعد طفلك إلى {day}، {time}. {reply} {link}',
			mail: {
				subject: 'تغير موعد طفلك: {day}، {time}',
				body: 'لموعد طفلك وقت جديد.\n\nمتى: {day}، {time}\nأين: {clinic}، {address}\n\n{reply}\n\n{link}\n\nالملف المرفق بهذه الرسالة يضيف الوقت الجديد إلى تقويمك.\n\nاتصل بنا: {phone}. في الليل: {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'visit-cancelled': {
			sms: 'من {clinic}: أُلغي موعد {day}، {time}. اتصل بالرقم {phone} لموعد جديد أو للسؤال.',
			mail: {
				subject: 'أُلغي الموعد: {day}، {time}',
				body: 'أُلغي موعد {day}، {time} في {clinic}.\n\nاتصل بالرقم {phone} لموعد جديد أو للسؤال.\n\nالملف المرفق بهذه الرسالة يزيل الموعد من تقويمك.\n\nفي الليل: {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'reminder-day-before': {
			sms: 'تذكير من {clinic}: موعد طفلك {day}، {time}. {reply} {link}',
			mail: {
				subject: 'تذكير بموعد طفلك: {day}، {time}',
				body: 'سنراك أنت وطفلك قريبا.\n\nمتى: {day}، {time}\nأين: {clinic}، {address}\n\n{reply}\n\n{link}\n\nاتصل بنا: {phone}. في الليل: {nightPhone}.'
			}
		},
		'reminder-morning': {
			sms: 'اليوم، {time}: موعد طفلك في {clinic}. {reply} ستتأخر؟ اتصل بالرقم {phone}. {link}',
			mail: {
				subject: 'اليوم، {time}: موعد طفلك',
				body: 'سنراك أنت وطفلك اليوم.\n\nمتى: {day}، {time}\nأين: {clinic}، {address}\n\n{reply}\n\n{link}\n\nستتأخر؟ اتصل بالرقم {phone}.'
			}
		},
		'check-in-ask': {
			sms: 'من {clinic}: كيف حال طفلك اليوم؟ أجب عن أسئلة قصيرة: {link} صعب الإيقاظ أو رخو أو لا يرضع؟ اتصل بالرقم {emergency} الآن.',
			mail: {
				subject: 'كيف حال طفلك اليوم؟',
				body: 'كيف حال طفلك اليوم؟\n\nأجب عن أسئلة قصيرة. تحتاج إلى دقيقتين.\n\n{link}\n\nهل طفلك صعب الإيقاظ أو رخو أو لا يرضع؟ اتصل بالرقم {emergency} الآن.\n\nيمكنك الاتصال بعيادة {clinic}: {phone}. في الليل: {nightPhone}.'
			}
		},
		'prolonged-check-ask': {
			sms: 'من {clinic}: حان وقت النظر إلى طفلك مرة أخرى. أجب عن أسئلة قصيرة: {link} صعب الإيقاظ أو رخو أو لا يرضع؟ اتصل بالرقم {emergency} الآن.',
			mail: {
				subject: 'حان وقت النظر إلى طفلك مرة أخرى',
				body: 'حان وقت النظر إلى طفلك مرة أخرى.\n\nأجب عن أسئلة قصيرة. تحتاج إلى دقيقتين.\n\n{link}\n\nهل طفلك صعب الإيقاظ أو رخو أو لا يرضع؟ اتصل بالرقم {emergency} الآن.\n\nيمكنك الاتصال بعيادة {clinic}: {phone}. في الليل: {nightPhone}.'
			}
		},
		'visit-missed': {
			sms: 'من {clinic}: لم نرك أنت وطفلك اليوم. ما زال طفلك بحاجة إلى الفحص. اطلب وقتا جديدا: {link} أو اتصل بالرقم {phone}.',
			mail: {
				subject: 'لم نرك اليوم',
				body: 'لم نرك أنت وطفلك اليوم. ما زال طفلك بحاجة إلى الفحص.\n\nاطلب وقتا جديدا هنا:\n\n{link}\n\nأو اتصل بعيادة {clinic}: {phone}. في الليل: {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'visit-missed-again': {
			sms: 'من {clinic}: نحتاج إلى التحدث معك بشأن موعد. ما زال الطفل بحاجة إلى الفحص قريبا. اتصل بالرقم {phone} الآن. في الليل: {nightPhone}.',
			mail: {
				subject: 'اتصل بنا بشأن موعد',
				body: 'نحتاج إلى التحدث معك بشأن موعد. ما زال الطفل بحاجة إلى الفحص قريبا.\n\nاتصل بعيادة {clinic} الآن: {phone}. في الليل: {nightPhone}.\n\nإذا كان الطفل مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'answer-received': {
			sms: 'من {clinic}: وصلتنا إجاباتك. {advice}',
			mail: {
				subject: 'وصلتنا إجاباتك',
				body: 'وصلتنا إجاباتك.\n\n{advice}\n\nيمكنك رؤيتها هنا:\n\n{link}\n\nعيادة {clinic}، {phone}'
			}
		},
		'other-time-received': {
			sms: 'من {clinic}: طلبت وقتا آخر. سنتصل بك. حتى ذلك الحين يبقى موعدك القديم لك. إذا لم نتصل، اتصل بالرقم {phone}.',
			mail: {
				subject: 'طلبت وقتا آخر',
				body: 'طلبت وقتا آخر. سنتصل بك.\n\nحتى ذلك الحين يبقى موعدك القديم لك.\n\nإذا لم نتصل، اتصل بعيادة {clinic}: {phone}.'
			}
		},
		'follow-up-closed': {
			sms: 'من {clinic}: لا مواعيد أخرى لدينا. يمكنك الاتصال بنا: {phone}، في الليل {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.',
			mail: {
				subject: 'لا مواعيد أخرى لدينا',
				body: 'لا مواعيد أخرى في {clinic}.\n\nيمكنك الاتصال بنا: {phone}. في الليل: {nightPhone}.\n\nاتصل بنا إذا زاد اصفرار الجلد أو العينين، أو إذا كان البراز أبيض أو رماديا. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}.'
			}
		},
		'desk-words': {
			sms: 'من {clinic}: {words}',
			mail: {
				subject: 'رسالة من {clinic}',
				body: 'كتبت لك العيادة:\n\n{words}\n\nعيادة {clinic}، {phone}\n\nلا ترد على هذه الرسالة. اتصل بنا، أو افتح صفحتك:\n\n{link}'
			}
		},
		'help-answer': {
			sms: 'من {clinic}: اتصل بالرقم {phone}، في الليل {nightPhone}. إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency}. لإيقاف الرسائل أرسل STOP.'
		},
		'stop-answer': {
			sms: 'من {clinic}: لن تصلك رسائل بعد الآن. قد نتصل بك. لاستلام الرسائل من جديد أرسل START. هاتفنا: {phone}.'
		},
		'start-answer': {
			sms: 'من {clinic}: ستصلك الرسائل من جديد. لإيقافها أرسل STOP وللمساعدة أرسل HELP.'
		},
		'which-newborn': {
			sms: 'أي طفل تقصد؟ أجب بالرقم: {choices}.'
		},
		'emergency-advice': {
			sms: 'هل طفلك صعب الإيقاظ أو رخو أو أزرق أو لا يتنفس جيدا؟ اتصل بالرقم {emergency} الآن. لا تنتظرنا. أبلغنا الموظفين. هاتفنا: {nightPhone}.',
			mail: {
				subject: 'إذا كان طفلك مريضا جدا، اتصل بالرقم {emergency} الآن',
				body: 'هل طفلك صعب الإيقاظ أو رخو أو أزرق أو لا يتنفس جيدا؟ اتصل بالرقم {emergency} الآن. لا تنتظرنا.\n\nأبلغنا الموظفين. يمكنك الاتصال بالرقم {nightPhone} ليلا ونهارا.'
			}
		}
	}
};
