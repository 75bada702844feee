import { describe, expect, it } from 'vitest';
import { check } from '../../src/lib/domain/guideline/check';
import { decide } from '../../src/lib/domain/guideline/decide';
import { explain } from '../../src/lib/domain/guideline/explain';
import { describeResult } from '../../src/lib/domain/guideline/index';
import { niceCg98 } from '../../src/lib/domain/guideline/nice-cg98';
import { plain, type Rule, type Standard } from '../../src/lib/domain/guideline/standard';
import { at, newborn, value } from './newborn';

/** Invented for this test: flat lines, a visit within a day below them. It shows what a third module has to bring. */
const says = (text: string): Rule => ({
	says: text,
	source: 'Invented for a test',
	confidence: 'our reading'
});
const RULES: Record<string, Rule> = Object.fromEntries(
	[
		'thresholds',
		'zone.exchange',
		'zone.escalate',
		'zone.phototherapy',
		'confirm.not-trusted',
		'measure-first',
		'treatment.running',
		'treatment.still-over',
		'after.figure',
		'flat.visit',
		'flat.rate',
		'flat.prolonged',
		'flat.direct'
	].map((id) => [id, says(`The invented rule ${id}.`)])
);
const FLAT: Standard = {
	...niceCg98,
	title: 'Flat',
	edition: 'Flat, first edition',
	unit: 'mg/dL',
	rules: RULES,
	lines: () => ({ phototherapy: 10, escalation: 18, exchange: 20 }),
	lineSource: () => 'the only row',
	weigh: (total, lines) => ({
		difference: Math.round((lines.phototherapy - total) * 10) / 10,
		zone: total >= 20 ? 'exchange' : total >= 18 ? 'escalate' : total >= 10 ? 'phototherapy' : 'below',
		atLine: total >= 10
	}),
	confirm: () => null,
	distrust: () => null,
	follow: (reading) => ({
		...plain('follow-up', 'flat.visit'),
		fromMs: reading.atMs,
		untilMs: reading.atMs + 24 * 3_600_000
	}),
	afterTreatment: () => null,
	underTreatment: () => plain('phototherapy', 'treatment.running'),
	stopLevel: () => 8,
	caution: () => {},
	rateLimit: () => ({ perHour: 0.5, inclusive: true, rule: 'flat.rate' }),
	prolonged: () => [{ days: 14, rule: 'flat.prolonged', measures: true }],
	raisedDirect: { from: 2, inclusive: true, rule: 'flat.direct' }
};

describe('a third standard', () => {
	it.each([
		[9.9, 'follow-up'],
		[10, 'phototherapy'],
		[18, 'escalate'],
		[20, 'exchange']
	])('decides %f mg/dL as %s and explains it from its own rules alone', (total, disposition) => {
		const input = newborn({ bilirubin: [value(20, 5), value(48, total)] });
		expect(check(input, FLAT)).toEqual([]);
		const result = explain(decide(input, FLAT), FLAT);
		expect(result).toMatchObject({ edition: 'Flat, first edition', disposition });
		expect(result.thresholds).toEqual({ phototherapy: 10, escalation: 18, exchange: 20, unit: 'mg/dL' });
		expect(result.trace.at(-1)?.output).toBe(describeResult(result.disposition, result.window));
		for (const { rule, source } of result.trace)
			if (rule !== 'deciding-value') expect(source).toContain('Invented for a test');
	});

	it('takes its own windows, treatment and limits', () => {
		const result = explain(decide(newborn({ bilirubin: [value(48, 5)] }), FLAT), FLAT);
		expect(result.window).toEqual({ from: at(48), until: at(72), test: 'judgement' });
		const phototherapy = [{ from: at(40), setting: 'birth-stay' }] as const;
		expect(decide(newborn({ phototherapy, bilirubin: [value(48, 5)] }), FLAT).outcome.rule).toBe(
			'treatment.running'
		);
	});
});
