import type { HourLineWords } from './words';

// Drafts: written by the project, not yet read by a qualified translator.

export const VIETNAMESE: HourLineWords = {
	locale: 'vi',
	title: 'Những ngày đầu, theo từng giờ',
	now: 'bây giờ',
	born: 'Sinh',
	visit: 'Lịch hẹn',
	asTable: 'Xem dạng bảng',
	when: 'Khi nào',
	what: 'Việc gì',
	nothing: 'Chưa có lịch hẹn.',
	visitKinds: { check: 'khám', 'blood-draw': 'lấy máu', 'feeding-help': 'hỗ trợ cho bú' },
	visitStates: {
		booked: 'chưa xác nhận',
		confirmed: 'đã xác nhận',
		arrived: 'đã đến',
		missed: 'không đến',
		cancelled: 'đã hủy',
		moved: 'đã dời'
	},
	checkIn: 'Câu hỏi',
	checkInResults: {
		emergency: 'cấp cứu',
		today: 'cần khám hôm nay',
		'call-back': 'chúng tôi sẽ gọi',
		'as-planned': 'theo lịch hẹn'
	}
};

export const CHINESE: HourLineWords = {
	locale: 'zh',
	title: '出生后的头几天',
	now: '现在',
	born: '出生',
	visit: '预约',
	asTable: '以表格查看',
	when: '时间',
	what: '内容',
	nothing: '还没有预约。',
	visitKinds: { check: '检查', 'blood-draw': '抽血', 'feeding-help': '喂养帮助' },
	visitStates: {
		booked: '尚未确认',
		confirmed: '已确认',
		arrived: '已到',
		missed: '未到',
		cancelled: '已取消',
		moved: '已改期'
	},
	checkIn: '问答',
	checkInResults: {
		emergency: '紧急',
		today: '今天就诊',
		'call-back': '我们会打电话',
		'as-planned': '按预约'
	}
};

export const ARABIC: HourLineWords = {
	locale: 'ar',
	title: 'الأيام الأولى ساعة بساعة',
	now: 'الآن',
	born: 'الولادة',
	visit: 'الموعد',
	asTable: 'نفس المعلومات في جدول',
	when: 'متى',
	what: 'ماذا',
	nothing: 'لا يوجد موعد بعد.',
	visitKinds: { check: 'فحص', 'blood-draw': 'سحب دم', 'feeding-help': 'مساعدة في الرضاعة' },
	visitStates: {
		booked: 'لم يُؤكَّد بعد',
		confirmed: 'مؤكَّد',
		arrived: 'حضروا',
		missed: 'لم يحضروا',
		cancelled: 'أُلغي',
		moved: 'نُقل'
	},
	checkIn: 'الأسئلة',
	checkInResults: {
		emergency: 'طوارئ',
		today: 'يُفحص اليوم',
		'call-back': 'سنتصل بكم',
		'as-planned': 'حسب الموعد'
	}
};
