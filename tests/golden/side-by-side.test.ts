import { describe, expect, it, vi } from 'vitest';
import { assess, type Assessment, type StandardId } from '../../src/lib/domain/guideline/index';
import { at, newborn, value } from './newborn';

/** A busy machine must not fail a test of a rule. */
vi.setConfig({ testTimeout: 60_000 });

/** Serum values in mg/dL, the same newborn by both standards; a person is meant to read the printed table. */
const WEEKS = [35, 36, 37, 38, 39, 40, 41];
const AGES = [18, 24, 36, 48, 72, 96, 144];
const TOTALS = [5, 8, 11, 13, 15, 17, 19, 21, 24, 28];

function by(standard: StandardId, weeks: number, hours: number, total: number): Assessment {
	const result = assess(
		newborn({
			standard,
			gestationalAge: { weeks, days: 0 },
			dischargeAt: at(hours),
			bilirubin: [value(hours, total)]
		})
	);
	if (!result.ok) throw new Error(JSON.stringify(result.error));
	return result.value;
}

function said({ disposition, window, thresholds }: Assessment, hours: number): string {
	const line = thresholds ? `line ${Math.round(thresholds.phototherapy * 10) / 10}` : '';
	if (!window) return `${disposition} (${line})`;
	const inHours = (instant: Date): number =>
		Math.round((instant.getTime() - at(hours).getTime()) / 3_600_000);
	return `${disposition} in ${inHours(window.from)}-${inHours(window.until)} h, ${window.test} (${line})`;
}

const treats = ({ disposition }: Assessment): boolean =>
	['phototherapy', 'escalate', 'exchange'].includes(disposition);

describe('both standards on the same births', () => {
	it('differ where this table says', () => {
		const rows: string[] = [];
		const counts = new Map<string, number>();
		for (const weeks of WEEKS) {
			for (const hours of AGES) {
				for (const total of TOTALS) {
					const aap = by('aap-2022', weeks, hours, total);
					const nice = by('nice-cg98', weeks, hours, total);
					const pair = `${aap.disposition} / ${nice.disposition}`;
					counts.set(pair, (counts.get(pair) ?? 0) + 1);
					if (treats(aap) === treats(nice)) continue;
					rows.push(
						`${weeks} weeks | ${hours} h | ${total} mg/dL | ${said(aap, hours)} | ${said(nice, hours)}`
					);
				}
			}
		}
		const summary = [...counts].sort((a, b) => b[1] - a[1]).map(([pair, count]) => `${count} | ${pair}`);
		console.log(
			[
				`Serum bilirubin of ${WEEKS.length * AGES.length * TOTALS.length} births by AAP 2022 / NICE CG98:`,
				...summary,
				'',
				'Where one standard treats and the other does not:',
				'gestation | age | total | AAP 2022 (lines in mg/dL) | NICE CG98 (lines in umol/L)',
				...rows
			].join('\n')
		);
		expect(rows.length).toBeGreaterThan(0);
	});

	it('agree that a far higher value needs treatment and a far lower one does not', () => {
		for (const weeks of WEEKS) {
			for (const hours of AGES) {
				for (const standard of ['aap-2022', 'nice-cg98'] as const) {
					expect(treats(by(standard, weeks, hours, 35))).toBe(true);
					expect(treats(by(standard, weeks, hours, 2))).toBe(false);
				}
			}
		}
	});
});
