import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it, vi } from 'vitest';
import {
	assessAtAnyAge,
	thresholdsAt,
	type AssessmentInput,
	type JaundiceRisk,
	type Measurement,
	type NeurotoxicityRisk
} from '../../src/lib/domain/guideline/index';
import { at, codes, newborn, value } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

type Changes = Partial<AssessmentInput>;

/** A caution, an input that must show it and a nearest one that must not. */
interface Row {
	readonly code: string;
	readonly of: 'any' | 'aap' | 'nice';
	readonly when: string;
	readonly source: string;
	readonly shows: Changes;
	readonly not: Changes;
}

const weeks = (count: number): Pick<AssessmentInput, 'gestationalAge'> => ({
	gestationalAge: { weeks: count, days: 0 }
});
const umol = (hours: number, total: number, method: Measurement['method'] = 'serum'): Measurement =>
	value(hours, total, method, 'umol/L');
const nice = (changes: Changes): Changes => ({ standard: 'nice-cg98', ...changes });

/** A serum value so far below the phototherapy line of its age; negative is over it. */
function under(difference: number, hours = 48, changes: Changes = {}): Changes {
	const input = newborn(changes);
	const lines = thresholdsAt(input, hours);
	if (!lines.ok) throw new Error(JSON.stringify(lines.error));
	const total = Math.round((lines.value.phototherapy - difference) * 10) / 10;
	return { ...changes, bilirubin: [value(hours, total, 'serum', lines.value.unit)] };
}

const course = (from: number, to: number, setting: 'birth-stay' | 'readmission' | 'home' = 'birth-stay') =>
	({ from: at(from), to: at(to), setting }) as const;

/** 40 weeks at 48 hours without risk: lines 17.0, 22.0 and 24.0 mg/dL. */
const total = (mgdl: number, changes: Changes = {}): Changes => ({
	bilirubin: [value(48, mgdl)],
	...changes
});
const tcb = (mgdl: number): Changes => ({ bilirubin: [value(48, mgdl, 'transcutaneous')] });
/** 40 weeks by NICE: lines 250 and 450 µmol/L at 48 hours. */
const niceTotal = (micromoles: number, changes: Changes = {}): Changes =>
	nice({ bilirubin: [umol(48, micromoles)], ...changes });
const rise = (from: readonly [number, number], to: readonly [number, number]): Changes => ({
	bilirubin: [value(...from), value(...to)]
});
const direct = (part: number, whole = 8): Changes => ({
	bilirubin: [{ ...value(48, whole), direct: part }]
});
const conjugated = (part: number, whole = 120): Changes =>
	nice({ bilirubin: [{ ...umol(48, whole), direct: part }] });
const risk = (...jaundiceRisks: JaundiceRisk[]): Changes => ({ jaundiceRisks, bilirubin: [value(48, 8)] });
const neuro = (...neurotoxicityRisks: NeurotoxicityRisk[]): Changes => ({
	neurotoxicityRisks,
	bilirubin: [value(48, 8)]
});
const albumin = (gramsPerDecilitre: number, changes: Changes = {}): Changes => ({
	bilirubin: [value(48, 8)],
	albuminGramsPerDecilitre: gramsPerDecilitre,
	...changes
});
/** Treated from 48 to 60 hours (line at the start 17.0, so that the limit to stop is 15.0), one value at 59. */
const treated = (mgdl: number, changes: Changes = {}): Changes => ({
	dischargeAt: at(90),
	phototherapy: [course(48, 60)],
	bilirubin: [value(59, mgdl)],
	...changes
});
const running = (mgdl: number): Changes =>
	treated(mgdl, { phototherapy: [{ from: at(48), setting: 'birth-stay' }] });
/** A value after discharge at 40 hours, so that phototherapy at home is a question. */
const atHome = (difference: number, changes: Changes = {}, hours = 60): Changes =>
	under(difference, hours, { dischargeAt: at(40), ...changes });

const FIGURE_7 = 'FACTS 2.4, AAP 2022 figure 7';
const HOME = 'FACTS 2.5, phototherapy at home';
const RATE = 'FACTS 2.1, AAP 2022 key action statements';
const STOP = 'FACTS 2.5, option to stop';
const RATIO = 'FACTS 2.5, bilirubin to albumin ratio';
const LIVER = 'FACTS 2.7';
const NICE = 'FACTS 4, NICE CG98';
const OURS = 'common practice or our reading, no source';

const row = (
	[of, code]: readonly [Row['of'], string],
	when: string,
	source: string,
	shows: Changes,
	not: Changes
): Row => ({ of, code, when, source, shows, not });

const SHARED: readonly Row[] = [
	row(
		['any', 'untrusted-value'],
		'transcutaneous within 24 hours after phototherapy',
		'FACTS 2.6',
		{ phototherapy: [course(30, 40)], bilirubin: [value(63.99, 8, 'transcutaneous')] },
		{ phototherapy: [course(30, 40)], bilirubin: [value(64, 8, 'transcutaneous')] }
	),
	row(
		['any', 'untrusted-value'],
		'serum within 24 hours after phototherapy is trusted',
		'FACTS 2.6',
		{ phototherapy: [course(30, 40)], bilirubin: [value(50, 8, 'transcutaneous')] },
		{ phototherapy: [course(30, 40)], bilirubin: [value(50, 8)] }
	),
	row(
		['any', 'untrusted-value'],
		'by NICE, transcutaneous up to 24 hours of age',
		NICE,
		nice({ bilirubin: [umol(24, 80, 'transcutaneous')] }),
		nice({ bilirubin: [umol(24.01, 80, 'transcutaneous')] })
	),
	row(
		['any', 'check-unit'],
		'under 30 µmol/L',
		OURS,
		nice({ bilirubin: [umol(12, 29.9)] }),
		nice({ bilirubin: [umol(12, 30)] })
	),
	row(
		['any', 'check-unit'],
		'from 12 hours of age',
		OURS,
		nice({ bilirubin: [umol(12, 20)] }),
		nice({ bilirubin: [umol(11.99, 20)] })
	),
	row(
		['any', 'check-unit'],
		'not in mg/dL',
		OURS,
		{ bilirubin: [umol(48, 8)] },
		{ bilirubin: [value(48, 8)] }
	),
	row(
		['any', 'rapid-rise'],
		'0.3 mg/dL an hour in the first 24 hours',
		RATE,
		rise([10, 4], [20, 7]),
		rise([10, 4], [20, 6.9])
	),
	row(
		['any', 'rapid-rise'],
		'0.2 mg/dL an hour after 24 hours',
		RATE,
		rise([30, 8], [40, 10]),
		rise([30, 8], [40, 9.9])
	),
	row(
		['any', 'rapid-rise'],
		'0.25 mg/dL an hour, the pair ending after 24 hours and at 24 hours',
		`${RATE}; a pair across 24 hours is our reading`,
		rise([12.02, 4], [24.02, 7]),
		rise([12, 4], [24, 7])
	),
	row(
		['any', 'rapid-rise'],
		'a later value that falls does not undo it',
		RATE,
		{ bilirubin: [value(30, 8), value(40, 11), value(50, 10)] },
		{ bilirubin: [value(30, 8), value(40, 9.9), value(50, 9)] }
	),
	row(
		['any', 'rapid-rise'],
		'by NICE over 8.5 µmol/L an hour',
		NICE,
		nice({ bilirubin: [umol(30, 100), umol(40, 185.1)] }),
		nice({ bilirubin: [umol(30, 100), umol(40, 185)] })
	),
	row(
		['any', 'rapid-rise'],
		'by NICE the same limit in the first 24 hours',
		NICE,
		nice({ bilirubin: [umol(10, 50), umol(20, 135.1)] }),
		nice({ bilirubin: [umol(10, 50), umol(20, 135)] })
	),
	row(['any', 'rapid-rise'], 'by one method', OURS, rise([30, 6], [40, 9]), {
		bilirubin: [value(30, 6, 'transcutaneous'), value(40, 9)]
	}),
	row(
		['any', 'rapid-rise'],
		'not from a value that must not be trusted',
		'FACTS 2.6',
		{ bilirubin: [value(50, 6), value(60, 9)] },
		{ phototherapy: [course(30, 45)], bilirubin: [value(50, 6, 'transcutaneous'), value(60, 9)] }
	),
	row(
		['any', 'rapid-rise-two-methods'],
		'serum and transcutaneous',
		OURS,
		{ bilirubin: [value(30, 6), value(40, 8, 'transcutaneous')] },
		{ bilirubin: [value(30, 6), value(40, 7.9, 'transcutaneous')] }
	),
	row(
		['any', 'rapid-rise-two-methods'],
		'one method says the plain caution instead',
		OURS,
		{ bilirubin: [value(30, 6, 'transcutaneous'), value(40, 8)] },
		rise([30, 6], [40, 8])
	),
	row(
		['any', 'rapid-rise-two-methods'],
		'not from a value that must not be trusted',
		'FACTS 2.6',
		{ bilirubin: [value(50, 6, 'transcutaneous'), value(60, 9)] },
		{ phototherapy: [course(30, 45)], bilirubin: [value(50, 6, 'transcutaneous'), value(60, 9)] }
	),
	row(['any', 'hearing-test'], 'serum at the exchange line', 'FACTS 7', total(24), total(23.9)),
	row(
		['any', 'hearing-test'],
		'once reached, also when it has fallen',
		'FACTS 7',
		{ bilirubin: [value(48, 24), value(60, 10)] },
		{ bilirubin: [value(48, 23.9), value(60, 10)] }
	),
	row(['any', 'hearing-test'], 'not from a transcutaneous value', 'FACTS 7', total(24), tcb(24)),
	row(
		['any', 'hearing-test'],
		'by NICE over the exchange line',
		`FACTS 7; ${NICE}`,
		niceTotal(450.1),
		niceTotal(450)
	),
	row(['any', 'direct-raised'], 'direct 1.0 mg/dL', LIVER, direct(1), direct(0.9)),
	row(
		['any', 'direct-raised'],
		'in an earlier value too',
		LIVER,
		{ bilirubin: [{ ...value(40, 8), direct: 1.1 }, value(48, 8)] },
		{ bilirubin: [value(40, 8), value(48, 8)] }
	),
	row(['any', 'direct-raised'], 'conjugated over 25 µmol/L', NICE, conjugated(25.1), conjugated(25)),
	row(['any', 'direct-over-half'], 'over half of the total', 'FACTS 2.5', direct(4.1), direct(4)),
	row(
		['any', 'direct-over-half'],
		'only of a direct part that is raised',
		'FACTS 2.5, 2.7',
		direct(1, 1.9),
		direct(0.9, 1.7)
	),
	row(['any', 'direct-over-half'], 'by NICE', 'FACTS 2.5', conjugated(60.1), conjugated(60)),
	row(
		['any', 'prolonged-due'],
		'2 weeks, formula',
		LIVER,
		{ now: at(336), bilirubin: [value(48, 8)] },
		{ now: at(335.99), bilirubin: [value(48, 8)] }
	),
	row(
		['any', 'prolonged-due'],
		'3 weeks, breastfed',
		LIVER,
		{ feeding: 'breast', now: at(504), bilirubin: [value(48, 8)] },
		{ feeding: 'breast', now: at(503.99), bilirubin: [value(48, 8)] }
	),
	row(
		['any', 'prolonged-due'],
		'still when a week late',
		LIVER,
		{ now: at(700), bilirubin: [value(48, 8)] },
		{ bilirubin: [value(48, 8)] }
	),
	row(
		['any', 'prolonged-due'],
		'by NICE at 37 weeks 14 days, at 36 weeks 21',
		NICE,
		nice({ ...weeks(37), now: at(336), bilirubin: [umol(48, 100)] }),
		nice({ ...weeks(36), now: at(503.99), bilirubin: [umol(48, 100)] })
	),
	row(['any', 'low-albumin'], 'albumin under 3.0 g/dL', 'FACTS 2.2', albumin(2.9), albumin(3)),
	row(['any', 'low-albumin'], 'listed as a risk', 'FACTS 2.2', neuro('low-albumin'), neuro('sepsis')),
	row(
		['any', 'albumin-differs'],
		'listed as low, given as 3.0 g/dL',
		OURS,
		albumin(3, { neurotoxicityRisks: ['low-albumin'] }),
		albumin(2.9, { neurotoxicityRisks: ['low-albumin'] })
	),
	row(
		['any', 'albumin-differs'],
		'not when it is not listed',
		OURS,
		albumin(3, { neurotoxicityRisks: ['low-albumin', 'sepsis'] }),
		albumin(3, { neurotoxicityRisks: ['sepsis'] })
	),
	row(
		['any', 'no-lower-line'],
		'a neurotoxicity risk by NICE',
		NICE,
		niceTotal(100, { neurotoxicityRisks: ['g6pd-deficiency'] }),
		niceTotal(100)
	),
	row(
		['any', 'no-lower-line'],
		'not by AAP, which has lower lines',
		'FACTS 2.2',
		niceTotal(100, { albuminGramsPerDecilitre: 2.9 }),
		neuro('g6pd-deficiency')
	),
	row(['any', 'unstable'], 'sepsis', OURS, neuro('sepsis'), neuro('other-hemolysis')),
	row(['any', 'unstable'], 'instability', OURS, neuro('clinical-instability'), neuro('isoimmune-hemolysis')),
	row(
		['any', 'window-before-discharge'],
		'the window ends when the newborn goes home',
		OURS,
		under(1, 30, { dischargeAt: at(54) }),
		under(1, 30, { dischargeAt: at(53.99) })
	),
	row(
		['any', 'window-before-discharge'],
		'not for a value taken after discharge',
		OURS,
		under(1, 30, { dischargeAt: at(60) }),
		under(1, 61, { dischargeAt: at(60) })
	),
	row(
		['any', 'window-before-discharge'],
		'by NICE',
		OURS,
		nice({ ...under(20, 48, { standard: 'nice-cg98' }), dischargeAt: at(72) }),
		nice({ ...under(20, 48, { standard: 'nice-cg98' }), dischargeAt: at(71.99) })
	),
	row(['any', 'transcutaneous-very-high'], 'at the escalation line', 'FACTS 2.1, 2.5', tcb(22), tcb(21.9)),
	row(['any', 'transcutaneous-very-high'], 'not for serum', 'FACTS 2.1', tcb(24), total(24)),
	row(
		['any', 'transcutaneous-very-high'],
		'by NICE over the exchange line',
		NICE,
		nice({ bilirubin: [umol(48, 450.1, 'transcutaneous')] }),
		nice({ bilirubin: [umol(48, 450, 'transcutaneous')] })
	),
	row(
		['any', 'jaundice-in-first-24-hours'],
		'listed',
		'FACTS 2.1, 2.3',
		risk('jaundice-in-first-24-hours'),
		risk('down-syndrome')
	),
	row(['any', 'hemolysis-suspected'], 'listed', 'FACTS 2.3', risk('hemolysis-suspected'), risk()),
	row(
		['any', 'family-red-cell-disorder'],
		'listed',
		'FACTS 2.3',
		risk('family-red-cell-disorder'),
		risk('sibling-or-parent-treated')
	),
	row(
		['any', 'scalp-hematoma-or-bruising'],
		'listed',
		'FACTS 2.3, 9',
		risk('scalp-hematoma-or-bruising'),
		risk('macrosomia-maternal-diabetes')
	),
	row(
		['any', 'drug-displaces-bilirubin'],
		'listed',
		'FACTS 7, 9',
		risk('ceftriaxone-or-sulfonamide'),
		risk('lipid-infusion')
	),
	row(
		['any', 'lipid-infusion'],
		'listed',
		'FACTS 9',
		risk('lipid-infusion'),
		risk('ceftriaxone-or-sulfonamide')
	),
	row(
		['any', 'low-intake'],
		'listed',
		'FACTS 2.1, 2.3',
		risk('exclusive-breastfeeding-low-intake'),
		risk('predischarge-bilirubin-near-threshold')
	),
	row(
		['any', 'past-the-lines'],
		'a value after the last printed hour',
		'FACTS 1.1',
		{ bilirubin: [value(48, 8), value(336.01, 9)] },
		{ bilirubin: [value(48, 8), value(336, 9)] }
	),
	row(
		['any', 'phototherapy-course-missing'],
		'the risk is listed and no course is entered',
		'our reading',
		risk('phototherapy-before-discharge'),
		{ ...risk('phototherapy-before-discharge'), phototherapy: [course(20, 30)] }
	),
	row(
		['any', 'past-the-lines'],
		'after hour 336 by AAP 2022',
		'our reading',
		{ bilirubin: [value(336.1, 9)] },
		{ bilirubin: [value(336, 9)] }
	),
	row(
		['any', 'past-the-lines'],
		'after 28 days by NICE CG98',
		'our reading',
		nice({ bilirubin: [umol(28 * 24 + 0.1, 150)] }),
		nice({ bilirubin: [umol(28 * 24, 150)] })
	),
	row(
		['any', 'past-the-lines-high'],
		'at the last published line (21.8)',
		'our reading',
		{ bilirubin: [value(337, 21.8)] },
		{ bilirubin: [value(337, 21.7)] }
	),
	row(
		['any', 'rapid-rise'],
		'of a pair by one method with another value between',
		'FACTS 2.1',
		{ bilirubin: [value(30, 6), value(36, 6.5, 'transcutaneous'), value(40, 8)] },
		{ bilirubin: [value(30, 6), value(36, 6.5, 'transcutaneous'), value(40, 7.9)] }
	)
];

const AAP: readonly Row[] = [
	row(['aap', 'options-near-line'], 'difference 1.9', FIGURE_7, under(1.9), under(2)),
	row(['aap', 'options-near-line'], 'difference 0.1', FIGURE_7, under(0.1), under(0)),
	row(['aap', 'options-near-line'], 'from 24 hours of age', FIGURE_7, under(1, 24), under(1, 23.99)),
	row(['aap', 'crossing-likely'], 'difference 1.0', 'FACTS 3, KUZ21', under(1), under(1.1)),
	row(['aap', 'crossing-likely'], 'below the line', 'FACTS 3, KUZ21', under(0.1), under(0)),
	row(
		['aap', 'crossing-likely'],
		'the last value before discharge',
		'FACTS 3, KUZ21',
		under(1, 48, { dischargeAt: at(48) }),
		under(1, 48, { dischargeAt: at(47.99) })
	),
	row(
		['aap', 'crossing-likely'],
		'not after treatment',
		'FACTS 3, KUZ21',
		under(1, 48),
		under(1, 48, { phototherapy: [course(20, 30)] })
	),
	row(['aap', 'home-phototherapy-possible'], 'near the line', HOME, under(1.9), under(2)),
	row(
		['aap', 'home-phototherapy-possible'],
		'from 38 weeks',
		HOME,
		under(1, 48, weeks(38)),
		under(1, 48, weeks(37))
	),
	row(['aap', 'home-phototherapy-possible'], 'from 48 hours', HOME, under(1, 48), under(1, 47.99)),
	row(
		['aap', 'home-phototherapy-possible'],
		'no neurotoxicity risk',
		HOME,
		under(1),
		under(1, 48, { neurotoxicityRisks: ['g6pd-deficiency'] })
	),
	row(
		['aap', 'home-phototherapy-possible'],
		'no earlier phototherapy',
		HOME,
		under(1),
		under(1, 48, { phototherapy: [course(20, 30)] })
	),
	row(['aap', 'home-phototherapy-possible'], 'up to 1 mg/dL over', HOME, atHome(-1), atHome(-1.1)),
	row(
		['aap', 'home-phototherapy-possible'],
		'over the line only once discharged',
		HOME,
		atHome(-0.5),
		under(-0.5, 60, { dischargeAt: at(60) })
	),
	row(
		['aap', 'home-phototherapy-not-met'],
		'before 38 weeks',
		HOME,
		under(1, 48, weeks(37)),
		under(1, 48, weeks(38))
	),
	row(['aap', 'home-phototherapy-not-met'], 'before 48 hours', HOME, under(1, 47.99), under(1, 48)),
	row(
		['aap', 'home-phototherapy-not-met'],
		'a neurotoxicity risk',
		HOME,
		atHome(-0.5, { neurotoxicityRisks: ['sepsis'] }),
		atHome(-0.5)
	),
	row(
		['aap', 'home-phototherapy-not-met'],
		'earlier phototherapy',
		HOME,
		atHome(-0.5, { phototherapy: [course(20, 30)] }),
		atHome(-0.5)
	),
	row(['aap', 'home-phototherapy-not-met'], 'over 1 mg/dL over', HOME, atHome(-1.1), atHome(-1)),
	row(['aap', 'home-phototherapy-not-met'], 'no question far below', HOME, under(1.9, 47), under(2, 47)),
	row(['aap', 'escalation-of-care'], '2 mg/dL below exchange', 'FACTS 2.5', total(22), total(21.9)),
	row(['aap', 'escalation-of-care'], 'and at exchange', 'FACTS 2.5', total(24), tcb(24)),
	row(['aap', 'exchange-line'], 'at the exchange line', 'FACTS 2.5', total(24), total(23.9)),
	row(['aap', 'workup'], 'at the phototherapy line', 'FACTS 2.5', total(17), total(16.9)),
	row(['aap', 'workup'], 'not while escalating', 'FACTS 2.5', total(21.9), total(22)),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'38 weeks, no risk: 8.0',
		RATIO,
		total(24, { ...weeks(38), albuminGramsPerDecilitre: 3 }),
		total(23.9, { ...weeks(38), albuminGramsPerDecilitre: 3 })
	),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'38 weeks, risk: 7.2',
		RATIO,
		total(21.6, { ...weeks(38), albuminGramsPerDecilitre: 3, neurotoxicityRisks: ['g6pd-deficiency'] }),
		total(21.5, { ...weeks(38), albuminGramsPerDecilitre: 3, neurotoxicityRisks: ['g6pd-deficiency'] })
	),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'37 weeks, no risk: 7.2',
		RATIO,
		total(21.6, { ...weeks(37), albuminGramsPerDecilitre: 3 }),
		total(21.5, { ...weeks(37), albuminGramsPerDecilitre: 3 })
	),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'35 weeks, risk: 6.8',
		RATIO,
		total(20.4, { ...weeks(35), albuminGramsPerDecilitre: 3, neurotoxicityRisks: ['sepsis'] }),
		total(20.3, { ...weeks(35), albuminGramsPerDecilitre: 3, neurotoxicityRisks: ['sepsis'] })
	),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'37 weeks, risk by albumin alone: 6.8',
		RATIO,
		total(13.6, { ...weeks(37), albuminGramsPerDecilitre: 2 }),
		total(13.5, { ...weeks(37), albuminGramsPerDecilitre: 2 })
	),
	row(
		['aap', 'bilirubin-albumin-ratio'],
		'only with an albumin value',
		RATIO,
		total(23, { albuminGramsPerDecilitre: 2.8 }),
		total(23, { neurotoxicityRisks: ['low-albumin'] })
	),
	row(
		['aap', 'measure-at-24-to-48-hours'],
		'a value before 24 hours',
		'FACTS 2.1',
		under(5, 23.99),
		under(5, 24)
	),
	row(
		['aap', 'measure-at-24-to-48-hours'],
		'discharge after 24 hours',
		'FACTS 2.1',
		under(5, 20, { dischargeAt: at(24.01) }),
		under(5, 20, { dischargeAt: at(24) })
	),
	row(
		['aap', 'measure-at-24-to-48-hours'],
		'not once treated',
		'FACTS 2.1, 2.6',
		under(5, 20),
		under(5, 20, { phototherapy: [course(10, 18)] })
	),
	row(['aap', 'stopped-above-limit'], '1.9 below the starting line', STOP, treated(15.1), treated(15)),
	row(
		['aap', 'stopped-above-limit'],
		'no serum value under treatment',
		STOP,
		treated(14, { bilirubin: [value(47, 14)] }),
		treated(14)
	),
	row(
		['aap', 'stopped-above-limit'],
		'a value after the end shows nothing of before',
		STOP,
		treated(14, { bilirubin: [value(60.01, 14)] }),
		treated(14, { bilirubin: [value(60, 14)] })
	),
	row(
		['aap', 'stopped-above-limit'],
		'transcutaneous does not count',
		STOP,
		treated(14, { bilirubin: [value(59, 14, 'transcutaneous')] }),
		treated(14)
	),
	row(['aap', 'stopped-above-limit'], 'not while it runs', STOP, treated(15.1), running(15.1)),
	row(['aap', 'may-stop-phototherapy'], '2 below the starting line', STOP, running(15), running(15.1)),
	row(['aap', 'may-stop-phototherapy'], 'only while it runs', STOP, running(15), treated(15)),
	row(
		['aap', 'may-stop-phototherapy'],
		'with a risk the starting line is lower (14.0)',
		STOP,
		{ ...running(12), neurotoxicityRisks: ['g6pd-deficiency'] },
		{ ...running(12.1), neurotoxicityRisks: ['g6pd-deficiency'] }
	),
	row(
		['aap', 'rebound-likelier'],
		'before 38 weeks',
		'FACTS 3, CH19',
		treated(9, weeks(37)),
		treated(9, weeks(38))
	),
	row(['aap', 'rebound-likelier'], 'once it has stopped', 'FACTS 3, CH19', treated(9, weeks(35)), {
		...running(9),
		...weeks(35)
	}),
	row(
		['aap', 'admit-from-home'],
		'1 mg/dL over the line (21.4 at 90 hours)',
		'FACTS 2.5',
		{ phototherapy: [{ from: at(70), setting: 'home' }], bilirubin: [value(90, 22.4)] },
		{ phototherapy: [{ from: at(70), setting: 'home' }], bilirubin: [value(90, 22.3)] }
	),
	row(
		['aap', 'admit-from-home'],
		'only from home',
		'FACTS 2.5',
		{ phototherapy: [{ from: at(70), setting: 'home' }], bilirubin: [value(90, 22.4)] },
		{ phototherapy: [{ from: at(70), setting: 'readmission' }], bilirubin: [value(90, 22.4)] }
	),
	row(['aap', 'conjugated-or-direct'], 'from 0.3 mg/dL', 'FACTS 2.7, from memory', direct(0.3), direct(0.2)),
	row(
		['aap', 'conjugated-or-direct'],
		'up to where a direct value is abnormal too',
		'FACTS 2.7, from memory',
		direct(0.9),
		direct(1)
	)
];

const NICE_ROWS: readonly Row[] = [
	row(['nice', 'exchange-line'], 'over the exchange line', NICE, niceTotal(450.1), niceTotal(450)),
	row(
		['nice', 'kernicterus-risk'],
		'over 340 µmol/L',
		NICE,
		niceTotal(340.1, weeks(37)),
		niceTotal(340, weeks(37))
	),
	row(
		['nice', 'kernicterus-risk'],
		'from 37 weeks',
		NICE,
		niceTotal(341, weeks(37)),
		niceTotal(341, weeks(36))
	),
	row(
		['nice', 'kernicterus-risk'],
		'by serum',
		NICE,
		niceTotal(341),
		nice({ bilirubin: [umol(48, 341, 'transcutaneous')] })
	),
	row(
		['nice', 'intensify-phototherapy'],
		'50 below exchange (450) at 72 hours',
		NICE,
		nice({ bilirubin: [umol(72, 400)] }),
		nice({ bilirubin: [umol(72, 399.9)] })
	),
	row(
		['nice', 'intensify-phototherapy'],
		'from 72 hours',
		NICE,
		nice({ bilirubin: [umol(72, 420)] }),
		nice({ bilirubin: [umol(71.99, 420)] })
	),
	row(
		['nice', 'intensify-phototherapy'],
		'up to the exchange line, which says more',
		NICE,
		nice({ bilirubin: [umol(72, 450)] }),
		nice({ bilirubin: [umol(72, 450.1)] })
	),
	row(
		['nice', 'extra-look-in-48-hours'],
		'before 38 weeks',
		NICE,
		nice({ bilirubin: [umol(40, 60)], ...weeks(37) }),
		nice({ bilirubin: [umol(40, 60)], ...weeks(38) })
	),
	row(
		['nice', 'extra-look-in-48-hours'],
		'breastfed',
		NICE,
		nice({ bilirubin: [umol(40, 60)], feeding: 'breast' }),
		nice({ bilirubin: [umol(40, 60)], feeding: 'mixed' })
	),
	row(
		['nice', 'extra-look-in-48-hours'],
		'a brother or sister treated',
		NICE,
		nice({ bilirubin: [umol(40, 60)], jaundiceRisks: ['sibling-or-parent-treated'] }),
		nice({ bilirubin: [umol(40, 60)], jaundiceRisks: ['family-red-cell-disorder'] })
	),
	row(
		['nice', 'extra-look-in-48-hours'],
		'jaundice in the first 24 hours, until 48 hours',
		NICE,
		nice({ bilirubin: [umol(47.99, 60)], jaundiceRisks: ['jaundice-in-first-24-hours'] }),
		nice({ bilirubin: [umol(48, 60)], jaundiceRisks: ['jaundice-in-first-24-hours'] })
	),
	row(
		['nice', 'extra-look-in-48-hours'],
		'before any value',
		NICE,
		nice({ feeding: 'breast' }),
		nice({ feeding: 'formula' })
	),
	// At 60 hours and 40 weeks the line is 275: 225 is 50 below it.
	row(
		['nice', 'stopped-above-limit'],
		'49.9 below the line',
		NICE,
		nice(treated(0, { bilirubin: [umol(59.99, 225.1)] })),
		nice(treated(0, { bilirubin: [umol(60, 225)] }))
	),
	row(
		['nice', 'stopped-above-limit'],
		'no serum value under treatment',
		NICE,
		nice(treated(0, { bilirubin: [umol(47, 100)] })),
		nice(treated(0, { bilirubin: [umol(59, 100)] }))
	),
	row(
		['nice', 'stopped-above-limit'],
		'a value after the end shows nothing of before',
		NICE,
		nice(treated(0, { bilirubin: [umol(60.01, 100)] })),
		nice(treated(0, { bilirubin: [umol(60, 100)] }))
	),
	row(
		['nice', 'may-stop-phototherapy'],
		'50 below the line (300 at 72 hours)',
		NICE,
		nice({ phototherapy: [{ from: at(48), setting: 'birth-stay' }], bilirubin: [umol(72, 250)] }),
		nice({ phototherapy: [{ from: at(48), setting: 'birth-stay' }], bilirubin: [umol(72, 250.1)] })
	),
	row(
		['nice', 'may-stop-phototherapy'],
		'only while it runs',
		NICE,
		nice({ phototherapy: [{ from: at(48), setting: 'birth-stay' }], bilirubin: [umol(59, 100)] }),
		nice(treated(0, { bilirubin: [umol(59, 100)] }))
	),
	row(
		['nice', 'assays-differ'],
		'10 below the line',
		`${NICE}; the margin is ours`,
		niceTotal(240),
		niceTotal(239.9)
	),
	row(
		['nice', 'assays-differ'],
		'10 over the line',
		`${NICE}; the margin is ours`,
		niceTotal(260),
		niceTotal(260.1)
	)
];

const ROWS: readonly Row[] = [...SHARED, ...AAP, ...NICE_ROWS];

function shown(changes: Changes): string[] {
	const result = assessAtAnyAge(newborn(changes));
	if (!result.ok) throw new Error(`refused: ${result.error.map(({ message }) => message).join(' ')}`);
	return codes(result.value);
}

describe('a caution', () => {
	it.each(ROWS)('$of $code, $when ($source)', ({ code, shows, not }) => {
		expect(shown(shows).filter((one) => one === code)).toHaveLength(1);
		expect(shown(not)).not.toContain(code);
	});
});

/** Codes of the cautions that a file of the engine can give. */
const FOLDER = fileURLToPath(new URL('../../src/lib/domain/guideline/', import.meta.url));

function written(file: string): string[] {
	const text = readFileSync(`${FOLDER}${file}`, 'utf8');
	return [...text.matchAll(/\bcode: '([a-z0-9-]+)',\s+severity:/g)].map(([, code]) => code ?? '');
}

const OF: Readonly<Record<string, Row['of']>> = {
	'aap-2022-cautions.ts': 'aap',
	'nice-cg98-cautions.ts': 'nice'
};

describe('the table above', () => {
	it('has a row for every caution in the code, and none for a caution that is gone', () => {
		const files = readdirSync(FOLDER).filter((file) => file.endsWith('.ts'));
		const inCode = files.flatMap((file) => written(file).map((code) => `${OF[file] ?? 'any'} ${code}`));
		expect(inCode.length).toBeGreaterThanOrEqual(40);
		const inTable = new Set(ROWS.map(({ of, code }) => `${of} ${code}`));
		expect([...inTable].sort()).toEqual([...new Set(inCode)].sort());
	});
});
