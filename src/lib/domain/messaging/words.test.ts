import { describe, expect, it } from 'vitest';
import { WORD_LISTS } from './word-lists';
import { simplify, understand } from './words';

describe('words of families', () => {
	it.each([
		['Yes', 'confirm'],
		['YES!! thank you', 'confirm'],
		['1', 'confirm'],
		['Sí, gracias', 'confirm'],
		['vâng', 'confirm'],
		['好的，谢谢', 'confirm'],
		['نعم شكرا', 'confirm'],
		['١', 'confirm'],
		['2', 'other-time'],
		['2 after 3pm please', 'other-time'],
		['Can I come another day?', 'other-time'],
		['¿Puedo cambiar la cita?', 'other-time'],
		['đổi giờ được không', 'other-time'],
		['改时间可以吗', 'other-time'],
		['هل يمكن تغيير الموعد', 'other-time'],
		['STOP', 'stop'],
		['Stop.', 'stop'],
		['parar', 'stop'],
		['Dừng', 'stop'],
		['停止', 'stop'],
		['توقف', 'stop'],
		['start', 'start'],
		['empezar', 'start'],
		['HELP', 'help'],
		['?', 'help'],
		['ayuda', 'help'],
		['مساعدة', 'help'],
		['3', 'choice'],
		['Thanks!', 'thanks'],
		['muchas gracias', 'thanks'],
		['cảm ơn', 'thanks'],
		['hello?', 'words'],
		['Is it ok to bring her brother?', 'words'],
		['please do not stop the messages', 'words'],
		['', 'words'],
		['👍', 'words']
	])('"%s" means %s', (text, means) => {
		expect(understand(text)).toMatchObject({ means, isAlarming: false });
	});

	it.each([
		'yes but he won’t wake',
		"She can't wake up",
		'no despierta',
		'tiene fiebre',
		'bé bị sốt',
		'宝宝叫不醒',
		'والحمى عالية',
		'طفلي لا يرضع',
		'911'
	])('"%s" alarms, and confirms nothing', (text) => {
		expect(understand(text)).toMatchObject({ means: 'words', isAlarming: true });
	});

	it.each([
		['she will not wake up', 'en'],
		['no respira, llamo al 911', 'es'],
		['bé bị sốt', 'vi'],
		['宝宝叫不醒', 'zh'],
		['طفلي لا يرضع', 'ar'],
		['HELP', 'en'],
		['ayuda', 'es'],
		['parar', 'es'],
		['911', null],
		['Is it ok to bring her brother?', null]
	])('"%s" is told to be of the language %s', (text, language) =>
		expect(understand(text).language).toBe(language)
	);

	it.each([
		'call me at 555-0120 or 555-0911',
		'is the blood test needed',
		'الأسبوع القادم',
		'running late',
		'la prueba de sangre'
	])('"%s" does not alarm', (text) => expect(understand(text).isAlarming).toBe(false));

	it('understands every word of every list as what it is listed for', () => {
		for (const list of Object.values(WORD_LISTS)) {
			for (const word of list.stop) expect(understand(word).means, word).toBe('stop');
			for (const word of list.start) expect(understand(word).means, word).toBe('start');
			for (const word of list.help) expect(understand(word).means, word).toBe('help');
			for (const word of list.confirm) expect(understand(word).means, word).toBe('confirm');
			for (const word of list.otherTime) expect(understand(word).means, word).toBe('other-time');
			for (const word of list.alarm) expect(understand(`baby ${word} now`).isAlarming, word).toBe(true);
		}
	});

	it('writes all spellings as one', () => {
		expect(simplify('  SÍ,   señora ')).toBe('si senora');
		expect(simplify('أَكِّد')).toBe('اكد');
		expect(simplify('Đồng ý')).toBe('dong y');
	});
});
