import { DAY_MS } from './age';
import type { Standard } from './standard';
import type { AssessmentInput, DirectFractionFinding } from './types';
import { valueIn } from './units';

type LiverInput = Pick<AssessmentInput, 'gestationalAge' | 'feeding' | 'bornAt' | 'bilirubin' | 'now'>;

const OVERDUE_AFTER_DAYS = 7;

/** Whether a direct fraction in the standard's unit opens the liver question. */
export function isRaisedDirect(direct: number, { raisedDirect }: Standard): boolean {
	return raisedDirect.inclusive ? direct >= raisedDirect.from - 1e-9 : direct > raisedDirect.from + 1e-9;
}

function dueMs(input: LiverInput, standard: Standard): number {
	const checks = standard.prolonged(input);
	return input.bornAt.getTime() + (checks[checks.length - 1]?.days ?? 0) * DAY_MS;
}

/** Where the liver question stands: a raised value at any age, else by age and the values with a direct part. */
export function liverStatus(input: LiverInput, standard: Standard): DirectFractionFinding['status'] {
	let latestMs = -Infinity;
	for (const { direct, unit, at } of input.bilirubin) {
		if (direct === undefined) continue;
		if (isRaisedDirect(valueIn(direct, unit, standard.unit), standard)) return 'raised';
		latestMs = Math.max(latestMs, at.getTime());
	}
	if (latestMs === -Infinity && input.now === undefined) return 'not-due';
	const due = dueMs(input, standard);
	if (latestMs >= due) return 'normal';
	if (input.now === undefined || input.now.getTime() < due) return 'not-due';
	return input.now.getTime() >= due + OVERDUE_AFTER_DAYS * DAY_MS ? 'overdue' : 'due';
}

const TEXTS: Readonly<Record<DirectFractionFinding['status'], string>> = {
	'not-due':
		'No direct fraction is due yet. Pale stools or dark urine at any age are a reason to measure it at once.',
	due: 'If still jaundiced: total and direct (or conjugated) bilirubin are due now. Ask for pale stools and dark urine.',
	overdue:
		'The question of prolonged jaundice is more than a week late: see the newborn, and if still jaundiced measure total and direct (or conjugated) bilirubin.',
	raised:
		'The direct (conjugated) fraction is raised: prompt referral for the liver and the flow of bile. Pale stools or dark urine make it urgent.',
	normal:
		'A direct (conjugated) fraction was measured at the age for it and is not raised. Pale stools or dark urine are still a reason to measure again.'
};

/** The liver question, apart from the neurotoxicity question; any age, also past the end of the lines. */
export function liverFinding(input: LiverInput, standard: Standard): DirectFractionFinding {
	const status = liverStatus(input, standard);
	const checks = standard.prolonged(input);
	const rule = status === 'raised' ? standard.raisedDirect.rule : (checks[checks.length - 1]?.rule ?? '');
	return {
		status,
		dueAt: new Date(dueMs(input, standard)),
		text: TEXTS[status],
		source: standard.rules[rule]?.source ?? ''
	};
}
