import type { MeasurementFacts } from '../domain/followup/discharge';
import type { Decision } from '../domain/followup/transition';
import { err, ok, type Result } from '../domain/result';
import { fromFieldValues } from '../format/time';
import type { DecisionForm, ValueForm } from './clinician';

/** A field of a form with the sentence that stands beside it. */
export interface FieldProblem<Field extends string> {
	readonly field: Field;
	readonly message: string;
}

const NO_SUCH_TIME = 'The clocks go forward over this time: it does not exist on that day.';

function instant<Field extends string>(
	field: Field,
	typed: { readonly on: string; readonly time: string; readonly timeZone: string }
): Result<Date, FieldProblem<Field>> {
	const read = fromFieldValues(typed.on, typed.time, typed.timeZone);
	if (read.ok) return ok(read.at);
	return err({
		field,
		message: read.reason === 'does-not-exist' ? NO_SUCH_TIME : 'Type a date and a time.'
	});
}

/** The measurement that the form describes, its instant resolved in the clinic's zone. */
export function measurementOf(
	form: ValueForm,
	timeZone: string
): Result<MeasurementFacts, FieldProblem<'method' | 'measuredTime' | 'total'>> {
	const { method, total, direct, unit } = form;
	if (method === null) return err({ field: 'method', message: 'Choose how it was measured.' });
	if (total === null) return err({ field: 'total', message: 'Type the total bilirubin.' });
	const at = instant('measuredTime', { on: form.measuredOn, time: form.measuredTime, timeZone });
	return at.ok ? ok({ method, measuredAt: at.value, total, direct, unit }) : at;
}

function repeat(
	form: DecisionForm,
	timeZone: string
): Result<Decision, FieldProblem<'fromTime' | 'untilTime'>> {
	const from = instant('fromTime', { on: form.fromOn, time: form.fromTime, timeZone });
	if (!from.ok) return from;
	const until = instant('untilTime', { on: form.untilOn, time: form.untilTime, timeZone });
	if (!until.ok) return until;
	if (until.value <= from.value) {
		return err({ field: 'untilTime', message: 'The end of the window must lie after its beginning.' });
	}
	return ok({ then: 'repeat', window: { from: from.value, until: until.value, test: form.test } });
}

/** The decision that the form describes; a window that has passed and a later check in the past are refused. */
export function decisionOf(
	form: DecisionForm,
	{ timeZone, now }: { readonly timeZone: string; readonly now: Date }
): Result<Decision, FieldProblem<'then' | 'fromTime' | 'untilTime' | 'laterTime'>> {
	switch (form.then) {
		case 'repeat': {
			const decision = repeat(form, timeZone);
			if (decision.ok && decision.value.then === 'repeat' && decision.value.window.until <= now) {
				return err({ field: 'untilTime', message: 'This window has already passed.' });
			}
			return decision;
		}
		case 'treat':
			return ok({ then: 'treat' });
		case 'check-later': {
			const at = instant('laterTime', { on: form.laterOn, time: form.laterTime, timeZone });
			if (!at.ok) return at;
			if (at.value <= now)
				return err({ field: 'laterTime', message: 'The later check must lie in the future.' });
			return ok({ then: 'check-later', at: at.value, asks: form.asks });
		}
		case 'close':
			return ok({ then: 'close', outcome: form.outcome });
		case null:
			return err({ field: 'then', message: 'Choose what happens next.' });
	}
}
