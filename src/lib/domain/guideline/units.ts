import type { Bilirubin, BilirubinUnit } from './types';

/**
 * 1 mg/dL of bilirubin in µmol/L. Source: printed pairs in Am Fam Physician 2002;65:599 (20 mg/dL = 342 µmol/L);
 * bilirubin's molar mass 584.66 g/mol gives 17.10.
 */
export const MICROMOLES_PER_MILLIGRAM = 17.1;

/** The same concentration in another unit, not rounded. `convert({ value: 20, unit: 'mg/dL' }, 'umol/L')` is 342. */
export function convert(bilirubin: Bilirubin, to: BilirubinUnit): Bilirubin {
	return { value: valueIn(bilirubin.value, bilirubin.unit, to), unit: to };
}

/** The number alone, for inner loops; the caller holds both units. */
export function valueIn(value: number, from: BilirubinUnit, to: BilirubinUnit): number {
	if (from === to) return value;
	return from === 'mg/dL' ? value * MICROMOLES_PER_MILLIGRAM : value / MICROMOLES_PER_MILLIGRAM;
}

/** For people: one decimal in mg/dL, whole numbers in µmol/L, in the language given ("12.3 mg/dL", "210 µmol/L"). */
export function formatBilirubin(bilirubin: Bilirubin, locale = 'en'): string {
	const digits = bilirubin.unit === 'mg/dL' ? 1 : 0;
	const number = bilirubin.value.toLocaleString(locale, {
		minimumFractionDigits: digits,
		maximumFractionDigits: digits,
		useGrouping: false
	});
	return `${number} ${bilirubin.unit === 'mg/dL' ? 'mg/dL' : 'µmol/L'}`;
}
