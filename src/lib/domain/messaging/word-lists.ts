import type { Language } from './language';

/** What families write back, by meaning; compared after `simplify`, so case, accents and punctuation do not matter. */
export interface WordList {
	/** The whole message, thanks and pleases apart. */
	readonly confirm: readonly string[];
	/** Anywhere in the message. */
	readonly otherTime: readonly string[];
	readonly stop: readonly string[];
	readonly start: readonly string[];
	readonly help: readonly string[];
	readonly thanks: readonly string[];
	readonly greeting: readonly string[];
	/** Anywhere in the message; rather one too many than one too few. */
	readonly alarm: readonly string[];
}

/** Phrases between commas. */
const list = (phrases: string): readonly string[] => phrases.split(', ');

/*
 * Alarm words follow the signs that ask for a call at once: cannot be woken, limp, arching, high-pitched cry, pauses in
 * breathing, seizure, will not feed, fever, pale stools, dark urine. Negation is not read: "no fever" is looked at too.
 * The Vietnamese, Chinese and Arabic lists are drafts until a qualified translator has gone over them.
 */
export const WORD_LISTS: Readonly<Record<Language, WordList>> = {
	en: {
		confirm: list(
			'yes, y, yep, yeah, ok, okay, k, confirm, confirmed, i confirm, we confirm, yes confirm, yes confirmed, yes we will be there, we will be there, yes i will be there, i will be there, see you then, sure'
		),
		otherTime: list(
			'another time, other time, different time, another day, other day, different day, reschedule, re schedule, change the time, change time, change the visit, change appointment, change my appointment, change the appointment, move the visit, move my visit, move the appointment, can not make it, cannot make it, cant make it, can t make it, can not come, cannot come, cant come, can t come'
		),
		stop: list(
			'stop, stopall, stop all, unsubscribe, cancel, end, quit, optout, opt out, revoke, stop messages, stop texting, stop texts'
		),
		start: list('start, unstop, begin, resume, opt in, optin'),
		help: list('help, info, help me, ?'),
		thanks: list('thanks, thank you, thx'),
		greeting: list('please, hi, hello, good morning'),
		alarm: list(
			'not waking, wont wake, won t wake, will not wake, cannot wake, cant wake, can t wake, can not wake, hard to wake, doesnt wake, doesn t wake, does not wake, not wake up, unconscious, unresponsive, not responding, limp, floppy, lifeless, not breathing, stopped breathing, stops breathing, breathing, gasping, choking, turning blue, is blue, blue lips, seizure, seizures, convulsion, convulsions, fits, having a fit, shaking, twitching, jerking, arching, arched, arches, high pitched, high pitch, shrill, screaming, wont feed, won t feed, will not feed, not feeding, wont eat, won t eat, will not eat, not eating, refuses to eat, refuses to feed, wont drink, won t drink, not drinking, wont nurse, won t nurse, not nursing, wont latch, won t latch, fever, very hot, too cold, very cold, emergency, ambulance, 911, 112, 999, dying, dead, bleeding, blood in, is bleeding, white poop, pale poop, white stool, pale stool, white stools, pale stools, grey stool, gray stool, clay colored, clay coloured, dark urine, dark pee, orange'
		)
	},
	es: {
		confirm: list(
			'si, s, confirmo, confirmado, confirmada, confirmar, si confirmo, confirmamos, de acuerdo, esta bien, vale, claro, si ahi estaremos, ahi estaremos, si ahi estare, ahi estare, bueno'
		),
		otherTime: list(
			'otra hora, otro dia, otro horario, otra fecha, otra cita, cambiar, cambio de hora, cambio de cita, reprogramar, mover la cita, no puedo ir, no podemos ir, no puedo llegar, no podemos llegar, no puedo venir, no podemos venir'
		),
		stop: list('parar, pare, alto, detener, baja, cancelar, no mas mensajes, basta, terminar'),
		start: list('empezar, iniciar, comenzar, reanudar, alta, continuar'),
		help: list('ayuda, informacion, ayudeme'),
		thanks: list('gracias, muchas gracias'),
		greeting: list('por favor, hola, buenos dias, buenas tardes, buenas'),
		alarm: list(
			'no despierta, no se despierta, no puedo despertar, no lo puedo despertar, no la puedo despertar, no podemos despertar, cuesta despertar, dificil de despertar, inconsciente, no responde, no reacciona, flacido, flacida, flojito, flojita, aguado, aguada, desguanzado, desguanzada, no respira, deja de respirar, dejo de respirar, respira, respirar, respiracion, se ahoga, ahogando, morado, morada, azul, convulsion, convulsiones, convulsiona, ataque, tiembla, temblando, temblores, sacudidas, se arquea, arqueado, arqueada, arquea, llanto agudo, llora agudo, grito agudo, chillido, no come, no quiere comer, no mama, no quiere mamar, no toma, no quiere tomar, no se alimenta, no agarra el pecho, fiebre, calentura, tiene temperatura, con temperatura, muy caliente, muy frio, muy fria, emergencia, urgencia, urgente, ambulancia, 911, se muere, muriendo, muerto, muerta, con sangre, sangrando, sangra, popo blanco, popo blanca, caca blanca, caca palida, heces blancas, heces palidas, orina oscura, pipi oscuro, naranja, anaranjado, anaranjada'
		)
	},
	vi: {
		confirm: list(
			'co, vang, da, da vang, da co, dong y, xac nhan, toi xac nhan, duoc, chung toi se den, toi se den'
		),
		otherTime: list(
			'gio khac, ngay khac, doi gio, doi lich, doi ngay, doi hen, hen lai, lich khac, khong den duoc, khong the den'
		),
		stop: list('dung, dung lai, ngung, dung nhan tin, ket thuc'),
		start: list('bat dau, tiep tuc'),
		help: list('giup, tro giup, giup do, giup toi, thong tin'),
		thanks: list('cam on, xin cam on'),
		greeting: list('lam on, vui long, xin chao, chao'),
		alarm: list(
			'khong thuc, khong danh thuc, goi khong day, kho danh thuc, khong tinh, bat tinh, li bi, lo mo, mem nhun, ru xuong, khong tho, ngung tho, kho tho, tim tai, tim moi, co giat, giat minh, run ray, run nguoi, uon nguoi, uon cong, uon lung, khoc the, khoc ret, bo bu, khong bu, khong chiu bu, khong an, bo an, sot, rat nong, rat lanh, cap cuu, khan cap, xe cuu thuong, 911, chet, chay mau, phan trang, phan bac mau, phan nhat, nuoc tieu sam, nuoc tieu dam, mau cam'
		)
	},
	zh: {
		confirm: list('是, 是的, 好, 好的, 确认, 可以, 行, 没问题, 我确认, 会来, 我们会来, 能来'),
		otherTime: list(
			'改时间, 换时间, 其他时间, 别的时间, 另一个时间, 改期, 换一天, 改天, 改约, 重新预约, 不能来, 来不了, 去不了, 不能去'
		),
		stop: list('停止, 退订, 取消, 停, 停止短信, 结束, 不要再发'),
		start: list('开始, 恢复, 继续, 订阅'),
		help: list('帮助, 求助, 信息'),
		thanks: list('谢谢, 感谢'),
		greeting: list('请, 你好, 您好'),
		alarm: list(
			'叫不醒, 唤不醒, 不醒, 醒不来, 醒不过来, 昏迷, 昏睡, 没反应, 没有反应, 软绵绵, 瘫软, 无力, 没力气, 不呼吸, 没呼吸, 停止呼吸, 呼吸, 喘不, 发紫, 发青, 嘴唇青, 抽搐, 抽筋, 惊厥, 痉挛, 发抖, 后仰, 角弓反张, 尖叫, 尖声, 高声哭, 哭声尖, 不吃, 不喝, 拒奶, 不肯吃, 吃不下, 不吸, 发烧, 发热, 高烧, 很烫, 很冷, 急救, 紧急, 急诊, 救护车, 救命, 911, 死, 流血, 出血, 白色大便, 大便白, 大便发白, 陶土, 灰白, 尿深, 尿很黄, 深色尿, 橙色'
		)
	},
	ar: {
		confirm: list(
			'نعم, ايوه, ايوا, اي, اجل, اوكد, اؤكد, تاكيد, موافق, موافقه, حسنا, تمام, طيب, سناتي, سنحضر, ساحضر'
		),
		otherTime: list(
			'وقت اخر, موعد اخر, يوم اخر, وقت ثاني, موعد ثاني, يوم ثاني, تغيير, اغير, تاجيل, لا استطيع الحضور, لا نستطيع الحضور, لا يمكنني الحضور, ما اقدر اجي'
		),
		stop: list('توقف, قف, ايقاف, اوقف, الغاء, اوقفوا الرسائل'),
		start: list('ابدا, بدء, استئناف, استمرار'),
		help: list('مساعده, ساعدوني, معلومات'),
		thanks: list('شكرا, شكرا لكم'),
		greeting: list('من فضلك, مرحبا, السلام عليكم'),
		alarm: list(
			'لا يستيقظ, لا تستيقظ, لا يصحى, لا تصحى, ما يصحى, ما تصحى, صعب الاستيقاظ, فاقد الوعي, فاقده الوعي, لا يستجيب, لا تستجيب, رخو, مرتخي, مرتخيه, لا يتنفس, لا تتنفس, توقف التنفس, التنفس, تنفس, يختنق, تختنق, ازرق, زرقاء, تشنج, اختلاج, نوبه, يرتجف, ترتجف, رجفه, تقوس, يتقوس, تتقوس, بكاء حاد, صراخ, لا يرضع, لا ترضع, يرفض الرضاعه, ترفض الرضاعه, ما يرضع, ما ترضع, لا ياكل, لا تاكل, حمى, حراره, سخونه, ساخن جدا, بارد جدا, طوارئ, طوارى, اسعاف, 911, يموت, تموت, مات, نزيف, براز ابيض, براز شاحب, بول غامق, بول داكن, برتقالي'
		)
	}
};
