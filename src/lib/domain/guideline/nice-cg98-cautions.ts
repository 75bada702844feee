import { HOUR_MS } from './age';
import * as edition from './editions/nice-cg98';
import { stopLevel } from './nice-cg98-lines';
import type { Decision } from './standard';
import { showedStopLevel } from './stopping';
import type { Caution } from './types';

const CAUTIONS = {
	exchange: {
		code: 'exchange-line',
		severity: 'danger',
		text: 'Over the exchange line: an emergency. Intensified phototherapy at once while exchange transfusion is prepared.',
		source: 'NICE CG98, threshold table'
	},
	kernicterus: {
		code: 'kernicterus-risk',
		severity: 'danger',
		text: 'Serum bilirubin over 340 µmol/L at 37 weeks or more: raised risk of kernicterus. So is a rise of more than 8.5 µmol/L an hour, or any sign of acute bilirubin encephalopathy.',
		source: 'NICE CG98, from memory'
	},
	intensify: {
		code: 'intensify-phototherapy',
		severity: 'danger',
		text: 'Within 50 µmol/L below the exchange line at 72 hours of age or more: intensified phototherapy.',
		source: 'NICE CG98, from memory'
	},
	extraLook: {
		code: 'extra-look-in-48-hours',
		severity: 'notice',
		text: 'An extra look for jaundice is due in the first 48 hours: before 38 weeks, a brother or sister who was treated, exclusive breastfeeding intended, or jaundice in the first 24 hours.',
		source: 'NICE CG98 full guideline p. 13; the list from memory'
	},
	stoppedEarly: {
		code: 'stopped-above-limit',
		severity: 'warning',
		text: 'Before stopping, serum was not shown to be at least 50 µmol/L below the line: rebound is likelier.',
		source: 'NICE CG98 full guideline p. 135'
	},
	mayStop: {
		code: 'may-stop-phototherapy',
		severity: 'notice',
		text: 'The last serum value is at least 50 µmol/L below the line: phototherapy is stopped at this point.',
		source: 'NICE CG98 full guideline p. 135'
	},
	assay: {
		code: 'assays-differ',
		severity: 'notice',
		text: 'Bilirubin assays differ between makers: ask the laboratory before relying on a value close to a line.',
		source: 'NICE CG98, note of March 2023'
	}
} as const satisfies Record<string, Caution>;

/** Values closer than this to a line get the note on assays; our own margin, 10 µmol/L. */
const NEAR_LINE_MICROMOLES = 10;

type Made = Omit<Decision, 'cautions'>;

/** What NICE CG98 wants the clinician to see beside the result. */
export function cautionNice(decision: Made, cautions: Caution[]): void {
	const { outcome, deciding, case: known } = decision;
	if (outcome.disposition === 'exchange') cautions.push(CAUTIONS.exchange);
	if (deciding?.serum) cautionSerum(decision, cautions);
	if (deciding && Math.abs(deciding.difference) <= NEAR_LINE_MICROMOLES) cautions.push(CAUTIONS.assay);
	if (needsExtraLook(decision)) cautions.push(CAUTIONS.extraLook);
	if (known.treatment.last) cautionTreatment(decision, cautions);
}

function cautionSerum({ deciding, case: known }: Made, cautions: Caution[]): void {
	if (!deciding) return;
	const { overMicromoles, fromWeek } = edition.KERNICTERUS;
	if (deciding.total > overMicromoles && known.weeks >= fromWeek) cautions.push(CAUTIONS.kernicterus);
	const belowExchange = deciding.lines.exchange - deciding.total;
	const isLate = deciding.ageMs >= edition.INTENSIFY.fromHours * HOUR_MS;
	if (isLate && belowExchange >= 0 && belowExchange <= edition.INTENSIFY.withinMicromoles)
		cautions.push(CAUTIONS.intensify);
}

function needsExtraLook({ deciding, outcome, case: known }: Made): boolean {
	if (outcome.rule === 'past-the-lines') return false;
	if (deciding && deciding.ageMs >= edition.EXTRA_LOOK_UNTIL_HOURS * HOUR_MS) return false;
	const { feeding, jaundiceRisks } = known.input;
	return (
		known.weeks < edition.REPEAT.fromWeek ||
		feeding === 'breast' ||
		jaundiceRisks.includes('sibling-or-parent-treated') ||
		jaundiceRisks.includes('jaundice-in-first-24-hours')
	);
}

function cautionTreatment({ readings, case: known }: Made, cautions: Caution[]): void {
	const isLow = showedStopLevel(readings, known, { stopLevel });
	if (known.treatment.running && isLow) cautions.push(CAUTIONS.mayStop);
	if (!known.treatment.running && !isLow) cautions.push(CAUTIONS.stoppedEarly);
}
