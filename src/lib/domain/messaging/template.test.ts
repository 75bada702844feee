import { describe, expect, it } from 'vitest';
import { textSize } from './segments';
import { fieldsIn, render, wordingFaults } from './template';

describe('wordings', () => {
	const fields = { allowed: ['day', 'time', 'link'], required: ['day'] };

	it('finds what is wrong', () => {
		expect(wordingFaults('On {day} at {time}', fields)).toEqual([]);
		expect(wordingFaults('At {time}', fields)).toEqual([{ code: 'required-field-absent', what: 'day' }]);
		expect(wordingFaults('{day} {name}', fields)).toEqual([{ code: 'unknown-field', what: 'name' }]);
		expect(wordingFaults('{day} {time', fields)).toEqual([{ code: 'stray-brace', what: '{' }]);
		expect(wordingFaults('{day} { time }', fields)[0]?.code).toBe('stray-brace');
	});

	it('refuses to leave a place empty', () => {
		expect(render('At {time}', { time: '10:20' })).toEqual({ ok: true, value: 'At 10:20' });
		expect(render('At {time}, {day}', { time: '' })).toEqual({
			ok: false,
			error: { missing: ['time', 'day'] }
		});
	});

	it('does not read fields in the values', () => {
		expect(render('{words}', { words: 'a {link}', link: 'x' })).toEqual({ ok: true, value: 'a {link}' });
		expect(fieldsIn('{a} {b} {a}')).toEqual(['a', 'b']);
	});
});

describe('parts of a text message', () => {
	it.each([
		['a'.repeat(160), 'GSM-7', 1],
		['a'.repeat(161), 'GSM-7', 2],
		['a'.repeat(307), 'GSM-7', 3],
		['你'.repeat(70), 'UCS-2', 1],
		['你'.repeat(71), 'UCS-2', 2],
		[`${'a'.repeat(158)}€`, 'GSM-7', 1],
		[`${'a'.repeat(159)}€`, 'GSM-7', 2]
	])('counts %#', (text, encoding, segments) => {
		expect(textSize(text)).toMatchObject({ encoding, segments });
	});

	it('names the characters that cost the most', () => {
		expect(textSize('sábado, mañana, día').outsideGsm).toEqual(['á', 'í']);
	});
});
