import { describe, expect, it } from 'vitest';
import { assess, type AssessmentInput } from '../domain/guideline';
import { traceLines } from './trace';

const chicago = 'America/Chicago';
const at = (iso: string): Date => new Date(iso);

const INPUT: AssessmentInput = {
	standard: 'aap-2022',
	gestationalAge: { weeks: 40, days: 0 },
	bornAt: at('2026-03-01T06:00:00Z'),
	dischargeAt: at('2026-03-04T06:00:00Z'),
	neurotoxicityRisks: ['sepsis'],
	jaundiceRisks: [],
	feeding: 'formula',
	bilirubin: [
		{ at: at('2026-03-02T06:00:00Z'), method: 'transcutaneous', total: 6, unit: 'mg/dL' },
		{ at: at('2026-03-03T06:00:00Z'), method: 'serum', total: 9.4, unit: 'mg/dL' }
	],
	phototherapy: []
};

function lines() {
	const assessed = assess(INPUT);
	if (!assessed.ok) throw new Error('refused');
	return { trace: assessed.value.trace, shown: traceLines(assessed.value, chicago) };
}

describe('a trace for people', () => {
	it('keeps every step in order, with its rule, its source and how sure that is', () => {
		const { trace, shown } = lines();
		expect(shown.map(({ says }) => says)).toEqual(trace.map(({ says }) => says));
		expect(shown.map(({ source }) => source)).toEqual(trace.map(({ source }) => source));
		expect(shown.map(({ inputs }) => inputs.length)).toEqual(
			trace.map(({ inputs }) => Object.keys(inputs).length)
		);
		expect(new Set(shown.map(({ sure }) => sure))).toEqual(
			new Set(['as in public copies', 'as printed', 'our reading of the text'])
		);
	});

	it('writes instants on the clock of the site, and values by their name', () => {
		const { shown } = lines();
		const all = JSON.stringify(shown);
		expect(all).not.toMatch(/\d{4}-\d\d-\d\dT|bilirubin\[/);
		expect(shown.map(({ output }) => output)).toContain(
			'TSB 9.4 mg/dL of Tue 3 Mar 00:00 decides: difference 4.6 mg/dL'
		);
		expect(shown.at(-1)?.output).toBe(
			'follow-up, serum-or-transcutaneous from Wed 4 Mar 00:00 CST until Thu 5 Mar 00:00 CST'
		);
		expect(shown[1]?.inputs).toContainEqual({ name: 'age hours', value: '24' });
		expect(shown[1]?.inputs).toContainEqual({ name: 'at', value: 'Mon 2 Mar 00:00 CST' });
	});
});
