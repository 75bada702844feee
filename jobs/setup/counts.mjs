/**
 * @typedef {{ passed: number, failed: number }} Counts
 * @typedef {{ code: number, report: string | null }} Outcome How a step's command ended, and the text of its JSON
 *   report when it was to write one.
 */

/**
 * What a step without a report adds: itself.
 * @param {Outcome} outcome @returns {Counts}
 */
export function countStep({ code }) {
	return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
}

/**
 * The tests in a report of Vitest's `json` reporter. A run that failed for another reason than a test (a file that
 * does not load, an error between tests) has one failure more, so that it cannot pass for green.
 * @param {Outcome} outcome @returns {Counts}
 */
export function countVitest({ code, report }) {
	const { numPassedTests: passed, numFailedTests: failed } = parse(report);
	return judged(code, passed, failed);
}

/**
 * The tests in a report of Playwright's `json` reporter; a test that passed only when repeated counts as failed.
 * @param {Outcome} outcome @returns {Counts}
 */
export function countPlaywright({ code, report }) {
	const { expected, unexpected, flaky } = parse(report).stats ?? {};
	return judged(code, expected, (unexpected ?? 0) + (flaky ?? 0));
}

/** @param {number} code @param {unknown} passed @param {unknown} failed @returns {Counts} */
function judged(code, passed, failed) {
	const green = typeof passed === 'number' ? passed : 0;
	const red = typeof failed === 'number' ? failed : 0;
	const nothingRan = green + red === 0;
	return { passed: green, failed: red === 0 && (code !== 0 || nothingRan) ? 1 : red };
}

/** @param {string | null} report */
function parse(report) {
	try {
		return JSON.parse(report ?? '{}');
	} catch {
		return {};
	}
}

/** @param {readonly Counts[]} all @returns {Counts} */
export function sum(all) {
	return all.reduce(
		(total, one) => ({ passed: total.passed + one.passed, failed: total.failed + one.failed }),
		{ passed: 0, failed: 0 }
	);
}

/** The line that the test command closes with. @param {Counts} counts */
export function closingLine({ passed, failed }) {
	return `${passed} passed, ${failed} failed`;
}
