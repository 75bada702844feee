import type { Assessment, Disposition, RateOfRise } from '../../../domain/guideline/types';
import { formatDayTime, formatSpan } from '../../../format/time';
import { formatBilirubin, formatBilirubinNumber, unitLabel, windowTestLabel } from '../../../format/values';

/** True where the result asks for treatment now. */
export const isDanger = (disposition: Disposition): boolean =>
	disposition === 'phototherapy' || disposition === 'escalate' || disposition === 'exchange';

/** True where the result asks for something before anything else may be decided. */
export const isWaiting = (disposition: Disposition): boolean =>
	disposition === 'measure-first' || disposition === 'confirm-serum' || disposition === 'delay-discharge';

/** "Tue 3 Mar 08:00 to Wed 4 Mar 08:00, TSB or TcB". */
export function windowWords(window: NonNullable<Assessment['window']>, timeZone: string): string {
	return `${formatSpan(window.from, window.until, { timeZone })}, ${windowTestLabel(window.test)}`;
}

/** The lines at the deciding value's age: "phototherapy 15.2, escalation 20.1, exchange 22.1 mg/dL". */
export function linesWords({ thresholds }: Assessment): string {
	if (!thresholds) return 'No line: nothing was measured.';
	const { unit } = thresholds;
	const parts = [
		`phototherapy ${formatBilirubinNumber(thresholds.phototherapy, unit)}`,
		...(thresholds.escalation === undefined
			? []
			: [`escalation ${formatBilirubinNumber(thresholds.escalation, unit)}`]),
		`exchange ${formatBilirubinNumber(thresholds.exchange, unit)}`
	];
	return `${parts.join(', ')} ${unitLabel(unit)}`;
}

/** "+0.12 mg/dL an hour, within the limit of 0.2". */
export function rateWords(rate: RateOfRise): string {
	const sign = rate.perHour < 0 ? '−' : '+';
	const held = rate.exceedsLimit
		? 'reaches or passes the published limit of'
		: 'within the published limit of';
	return `${sign}${Math.abs(rate.perHour).toFixed(2)} ${unitLabel(rate.unit)} an hour, ${held} ${rate.limitPerHour}`;
}

/** Where the last rise leads, said as the projection that it is; empty when it leads nowhere. */
export function projectionWords(rate: RateOfRise, timeZone: string): string {
	if (!rate.projectedCrossingAt) return '';
	return `At this steady rate the phototherapy line would be met ${formatDayTime(rate.projectedCrossingAt, { timeZone })}: a projection, not a finding.`;
}

/** The deciding value: "TSB 13.5 mg/dL". */
export function decidingWords(assessment: Assessment): string | null {
	const one =
		assessment.decidingIndex === null ? undefined : assessment.measurements[assessment.decidingIndex];
	if (!one) return null;
	const { method, total, unit } = one.measurement;
	return `${method === 'serum' ? 'TSB' : 'TcB'} ${formatBilirubin({ value: total, unit })}`;
}
