import { describe, expect, it } from 'vitest';
import { checkInSchema } from './check-in';

const POSTED = {
	submissionKey: 'abcdefgh12345678',
	yellowArea: 'none',
	yellowChange: 'same',
	yellowDepth: 'none',
	eyesYellow: 'no',
	feedsIn24Hours: '9',
	wetIn24Hours: '6',
	dirtyIn24Hours: '4',
	hoursSinceWet: '2',
	stoolColour: 'yellow',
	urineColour: 'pale',
	waking: 'wakes-for-feeds',
	suck: 'strong',
	cry: 'normal',
	tone: 'normal',
	breathing: 'normal',
	seizure: 'no',
	worried: 'no'
};

function celsius(typed: string, temperatureUnit = 'C'): number | string | undefined {
	const read = checkInSchema.safeParse({ ...POSTED, temperatureCelsius: typed, temperatureUnit });
	return read.success ? read.data.answers.temperatureCelsius : 'refused';
}

describe('a temperature as typed', () => {
	it.each([
		['35.94', 35.9],
		['35.95', 35.9],
		['35.99', 35.9],
		['36', 36],
		['36.0', 36],
		['36,04', 36],
		['37.94', 37.9],
		['37.95', 38],
		['38', 38]
	])('%s °C is %f, never rounded to the calm side of 36 or 38', (typed, read) => {
		expect(celsius(typed)).toBe(read);
	});

	it('takes every tenth of a degree as it is', () => {
		for (let tenths = 300; tenths <= 434; tenths++) expect(celsius(String(tenths / 10))).toBe(tenths / 10);
	});

	it.each([
		['96.7', 35.9],
		['96.79', 35.9],
		['96.8', 36],
		['98.6', 37],
		['100.3', 37.9],
		['100.4', 38]
	])('%s °F is %f °C', (typed, read) => {
		expect(celsius(typed, 'F')).toBe(read);
	});

	it.each(['29.9', '43.5', 'warm', '37.5.1', 'NaN'])('%s is refused', (typed) => {
		expect(celsius(typed)).toBe('refused');
	});

	it('may be left out', () => {
		expect(celsius(' ')).toBeUndefined();
	});
});
