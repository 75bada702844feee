import * as fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { assess, type Disposition, type StandardId } from '../../src/lib/domain/guideline/index';
import { RULES as AAP_RULES } from '../../src/lib/domain/guideline/editions/aap-2022';
import { RULES as NICE_RULES } from '../../src/lib/domain/guideline/editions/nice-cg98';
import { newborns } from './arbitraries';

/** A busy machine must not fail a count. */
vi.setConfig({ testTimeout: 120_000 });
const SAMPLES = 3000;
/** Always the same newborns, so that a rare rule is not missed by chance. */
const SEED = 20;

/** Shares of a sample in which a disposition, the rule of the last step, or any rule of the trace was met. */
function reached(standard: StandardId): (name: string) => number {
	const counts = new Map<string, number>();
	for (const input of fc.sample(newborns({ standard, dischargedBefore: true }), {
		numRuns: SAMPLES,
		seed: SEED
	})) {
		const result = assess(input);
		if (!result.ok) throw new Error(JSON.stringify(result.error));
		const { disposition, trace } = result.value;
		const names = [disposition, `last ${trace.at(-1)?.rule}`, ...trace.map(({ rule }) => `step ${rule}`)];
		for (const name of new Set(names)) counts.set(name, (counts.get(name) ?? 0) + 1);
	}
	return (name) => (counts.get(name) ?? 0) / SAMPLES;
}

const AAP = reached('aap-2022');
const NICE = reached('nice-cg98');

const DISPOSITIONS: readonly Disposition[] = [
	'follow-up',
	'judgement',
	'measure-first',
	'confirm-serum',
	'delay-discharge',
	'phototherapy',
	'escalate',
	'exchange'
];
/** This standard has no escalation line and no rule to delay discharge. */
const NOT_NICE: readonly Disposition[] = ['escalate', 'delay-discharge'];

/** A second test owed after a first one taken late. */
const RARE: readonly string[] = ['after.spaced'];

/** A property over newborns says nothing of a rule that none of them meets. */
describe('the newborns the properties are tried on', () => {
	it.each(DISPOSITIONS)('meet %s in one of a hundred or more', (disposition) => {
		expect(AAP(disposition)).toBeGreaterThan(0.01);
		if (NOT_NICE.includes(disposition)) expect(NICE(disposition)).toBe(0);
		else expect(NICE(disposition)).toBeGreaterThan(0.01);
	});

	it.each(Object.keys(AAP_RULES).filter((rule) => rule.startsWith('figure-7')))(
		'meet %s in one of a hundred or more',
		(rule) => {
			expect(AAP(`last ${rule}`)).toBeGreaterThan(0.01);
		}
	);

	it.each(['first-24-hours', 'repeat.18-hours', 'repeat.24-hours', 'repeat.preterm', 'no-routine-repeat'])(
		'meet %s in one of two hundred or more',
		(rule) => {
			expect(NICE(`last ${rule}`)).toBeGreaterThan(0.005);
		}
	);

	// The question at two weeks of a breastfed newborn has dates of its own and is never the one in a trace.
	it.each(Object.keys(AAP_RULES).filter((rule) => rule !== 'prolonged.colour'))(
		'meet %s (AAP 2022)',
		(rule) => {
			expect(AAP(`step ${rule}`)).toBeGreaterThan(RARE.includes(rule) ? 0.0003 : 0.001);
		}
	);

	it.each(Object.keys(NICE_RULES).filter((rule) => rule !== 'zone.escalate'))(
		'meet %s (NICE CG98)',
		(rule) => {
			expect(NICE(`step ${rule}`)).toBeGreaterThan(0.001);
		}
	);
});
