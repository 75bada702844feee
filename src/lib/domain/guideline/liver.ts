import { DAY_MS } from './age';
import type { ProlongedCheck, Standard } from './standard';
import type { AssessmentInput, DirectFractionFinding } from './types';
import { valueIn } from './units';

type LiverInput = Pick<AssessmentInput, 'gestationalAge' | 'feeding' | 'bornAt' | 'bilirubin' | 'now'>;

const OVERDUE_AFTER_DAYS = 7;
/** No check of any standard comes before; a test holds this to all of them. */
export const EARLIEST_CHECK_MS = 14 * DAY_MS;

/** Whether a direct fraction in the standard's unit opens the liver question. */
export function isRaisedDirect(direct: number, { raisedDirect }: Standard): boolean {
	return raisedDirect.inclusive ? direct >= raisedDirect.from - 1e-9 : direct > raisedDirect.from + 1e-9;
}

/** The first of the standard's checks that asks for a measurement; earlier ones ask for colour only. */
export function measuringCheck(
	input: Pick<LiverInput, 'gestationalAge' | 'feeding'>,
	standard: Standard
): ProlongedCheck {
	const check = standard.prolonged(input).find(({ measures }) => measures);
	if (!check) throw new Error(`${standard.id} asks for no measurement in prolonged jaundice`);
	return check;
}

function dueMs(input: LiverInput, standard: Standard): number {
	return input.bornAt.getTime() + measuringCheck(input, standard).days * DAY_MS;
}

/** Where the liver question stands: a raised value at any age, else by age and the values with a direct part. */
export function liverStatus(input: LiverInput, standard: Standard): DirectFractionFinding['status'] {
	let directMs = -Infinity;
	let latestMs = -Infinity;
	for (const { direct, unit, at } of input.bilirubin) {
		const atMs = at.getTime();
		if (atMs > latestMs) latestMs = atMs;
		if (direct === undefined) continue;
		if (isRaisedDirect(valueIn(direct, unit, standard.unit), standard)) return 'raised';
		if (atMs > directMs) directMs = atMs;
	}
	const askedMs = input.now?.getTime() ?? latestMs;
	// Before two weeks no standard asks, and a batch of millions need not look up when.
	if (askedMs - input.bornAt.getTime() < EARLIEST_CHECK_MS) return 'not-due';
	const due = dueMs(input, standard);
	if (directMs >= due) return 'normal';
	if (askedMs < due) return 'not-due';
	return askedMs >= due + OVERDUE_AFTER_DAYS * DAY_MS ? 'overdue' : 'due';
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
	const rule = status === 'raised' ? standard.raisedDirect.rule : measuringCheck(input, standard).rule;
	return {
		status,
		dueAt: new Date(dueMs(input, standard)),
		text: TEXTS[status],
		source: standard.rules[rule]?.source ?? ''
	};
}
