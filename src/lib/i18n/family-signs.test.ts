import { describe, expect, it } from 'vitest';
import { LANGUAGES } from '../domain/messaging/language';
import { emergencyLine, LIMIT_INPUTS, WATCH_KEYS } from './family-signs';
import { familyWords, type FamilyKey } from './family-words';

const TELLING: readonly FamilyKey[] = [...WATCH_KEYS, 'public_watch_never', 'sheet_why_time'];
/** Without the marks that keep a figure whole. */
const plain = (text: string): string => text.replace(/[\u2066-\u2069]/g, '').replaceAll('\u00a0', ' ');

describe('what families are told to watch for', () => {
	it('names every sign of danger with the number to call', () => {
		expect(plain(emergencyLine('en', '911'))).toBe(
			'If your baby cannot be woken, will not feed, is limp, arches the neck or back, has a shrill cry, has pauses in breathing, has a fit, or has 38.0 °C (100.4 °F) or more: call 911 now.'
		);
		expect(plain(emergencyLine('es', '112'))).toMatch(
			/^Si su bebé no despierta, .* o tiene 38\.0 °C .*: llame al 112 ahora\.$/
		);
	});

	it('keeps a temperature whole inside a sentence from right to left', () => {
		expect(emergencyLine('ar', '911')).toContain('\u206838.0\u00a0°C\u00a0(100.4\u00a0°F)\u2069');
	});

	it.each([...LANGUAGES])('holds the figures of the guideline in "%s"', (language) => {
		const line = plain(emergencyLine(language, '911'));
		for (const figure of ['38.0 °C', '100.4 °F', '911']) expect(line).toContain(figure);
		const words = familyWords(language);
		const told = plain(TELLING.map((key) => words(key, LIMIT_INPUTS)).join('\n'));
		for (const figure of ['36.0 °C', '96.8 °F']) expect(told).toContain(figure);
		for (const figure of ['8', '12', '3', '5']) expect(told).toMatch(new RegExp(`(?<!\\d)${figure}(?!\\d)`));
		expect(line + told).not.toMatch(/[{}]|undefined|NaN/);
	});
});
