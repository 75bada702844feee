import { describe, expect, test } from 'vitest';
import { closingLine, countPlaywright, countStep, countVitest, sum } from './counts.mjs';

const vitest = (numPassedTests: number, numFailedTests: number) =>
	JSON.stringify({ numPassedTests, numFailedTests, numTotalTests: numPassedTests + numFailedTests });
const playwright = (expected: number, unexpected: number, flaky: number) =>
	JSON.stringify({ stats: { expected, unexpected, flaky, skipped: 0 } });

describe('what a step adds to the count', () => {
	test('a step without a report adds itself', () => {
		expect(countStep({ code: 0, report: null })).toEqual({ passed: 1, failed: 0 });
		expect(countStep({ code: 2, report: null })).toEqual({ passed: 0, failed: 1 });
	});

	test('a test run adds its tests', () => {
		expect(countVitest({ code: 0, report: vitest(41, 0) })).toEqual({ passed: 41, failed: 0 });
		expect(countVitest({ code: 1, report: vitest(40, 1) })).toEqual({ passed: 40, failed: 1 });
		expect(countPlaywright({ code: 0, report: playwright(9, 0, 0) })).toEqual({ passed: 9, failed: 0 });
	});

	test('a browser test that passed only on repetition has failed', () => {
		expect(countPlaywright({ code: 0, report: playwright(8, 0, 1) })).toEqual({ passed: 8, failed: 1 });
	});

	test.each([
		['a file that does not load', 1, vitest(12, 0), { passed: 12, failed: 1 }],
		['a run that wrote no report', 1, null, { passed: 0, failed: 1 }],
		['a report cut off', 137, '{"numPassed', { passed: 0, failed: 1 }],
		['a run that found no test', 0, vitest(0, 0), { passed: 0, failed: 1 }]
	])('%s is a failure', (_, code, report, expected) => {
		expect(countVitest({ code, report })).toEqual(expected);
	});
});

test('the closing line sums all steps', () => {
	const total = sum([
		{ passed: 1, failed: 0 },
		{ passed: 40, failed: 2 }
	]);
	expect(closingLine(total)).toBe('41 passed, 2 failed');
});
