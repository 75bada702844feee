import type {
	Bilirubin,
	BilirubinUnit,
	Disposition,
	GestationalAge,
	Method,
	WindowTest
} from '../domain/guideline/types';

/** Unit as written for people. */
export function unitLabel(unit: BilirubinUnit): string {
	return unit === 'umol/L' ? 'µmol/L' : 'mg/dL';
}

/** The number alone, one decimal for mg/dL and none for µmol/L, so that columns line up. */
export function formatBilirubinNumber(value: number, unit: BilirubinUnit): string {
	return value.toFixed(unit === 'umol/L' ? 0 : 1);
}

/** "9.1 mg/dL", "156 µmol/L". */
export function formatBilirubin({ value, unit }: Bilirubin): string {
	return `${formatBilirubinNumber(value, unit)} ${unitLabel(unit)}`;
}

/** Threshold minus value in words: "4.2 mg/dL below the line", "0.6 mg/dL over the line", "at the line". */
export function formatDifference(difference: number, unit: BilirubinUnit): string {
	if (difference === 0) return 'at the line';
	const size = Math.abs(difference);
	// Less than one whole step is not nothing: "0.4 µmol/L over the line", never "0".
	const written = size < 1 ? size.toFixed(1) : formatBilirubinNumber(size, unit);
	return `${written} ${unitLabel(unit)} ${difference > 0 ? 'below' : 'over'} the line`;
}

/** "38 weeks 2 days". */
export function formatGestation({ weeks, days }: GestationalAge): string {
	return days === 0 ? `${weeks} weeks` : `${weeks} weeks ${days} ${days === 1 ? 'day' : 'days'}`;
}

/** "3,240 g" in the reader's grouping. */
export function formatWeight(grams: number, locale = 'en'): string {
	return `${new Intl.NumberFormat(locale).format(grams)} g`;
}

/** Change against the birth weight: "−6.2 %"; a true minus sign. */
export function formatWeightChange(grams: number, birthGrams: number): string {
	const percent = ((grams - birthGrams) / birthGrams) * 100;
	const sign = percent < 0 ? '−' : '+';
	return `${sign}${Math.abs(percent).toFixed(1)} %`;
}

/** The trade's short name of a method. */
export function methodLabel(method: Method): string {
	return method === 'serum' ? 'TSB' : 'TcB';
}

const TESTS: Record<WindowTest, string> = {
	serum: 'serum bilirubin (TSB)',
	'serum-or-transcutaneous': 'TSB or TcB',
	judgement: 'by clinical judgement'
};

/** Which test the window asks for. */
export function windowTestLabel(test: WindowTest): string {
	return TESTS[test];
}

const DISPOSITIONS: Record<Disposition, string> = {
	'follow-up': 'Follow up in the window',
	judgement: 'Follow up by clinical judgement',
	'measure-first': 'Measure bilirubin first',
	'confirm-serum': 'Confirm by serum (TSB)',
	'delay-discharge': 'Delay discharge',
	phototherapy: 'Phototherapy',
	escalate: 'Escalation of care, an emergency',
	exchange: 'Exchange transfusion, an emergency'
};

/**
 * The engine's result in a few words, for a heading or a list. It claims nothing of the value: under running
 * phototherapy that may lie below the line. What the result means is `resultSays`, where the value stands `placeOf`.
 */
export function dispositionLabel(disposition: Disposition): string {
	return DISPOSITIONS[disposition];
}
