import type { DischargeFacts, MeasurementFacts } from '../domain/followup/discharge';
import type { BilirubinUnit } from '../domain/guideline/types';
import { parseGrams, parseNumber, readInstant, oneOf, type IssueList } from './discharge-values';
import type { DischargeForm } from './discharge-fields';

const METHODS = ['serum', 'transcutaneous'] as const;
const SETTINGS = ['birth-stay', 'readmission', 'home'] as const;

/** A measurement with the number of its row on the form, so that a refusal finds its way back. */
export interface MeasurementOfRow extends MeasurementFacts {
	readonly row: number;
}

const at = (list: readonly string[], row: number): string => list[row]?.trim() ?? '';

/** Values that were typed; a row without total and direct is not one yet. */
export function readMeasurements(
	form: DischargeForm,
	unit: BilirubinUnit,
	list: IssueList
): MeasurementOfRow[] {
	return form.measurementTotal.flatMap((_, row): MeasurementOfRow[] => {
		const typedTotal = at(form.measurementTotal, row);
		const typedDirect = at(form.measurementDirect, row);
		if (typedTotal === '' && typedDirect === '') return [];
		const total = parseNumber(typedTotal);
		if (total === null || total <= 0) {
			list.add('measurementTotal', 'Write the total as a number, for example 9.4.', row);
		}
		const direct = typedDirect === '' ? null : parseNumber(typedDirect);
		if (typedDirect !== '' && direct === null) {
			list.add('measurementDirect', 'Write the direct part as a number, for example 0.4.', row);
		}
		const method = oneOf(METHODS, at(form.measurementMethod, row));
		if (!method) list.add('measurementMethod', 'Say whether it is TSB or TcB.', row);
		const typed = {
			on: at(form.measurementOn, row),
			time: at(form.measurementTime, row),
			timeZone: form.timeZone
		};
		const field = { onField: 'measurementOn', timeField: 'measurementTime', row, what: 'this value' };
		const measuredAt = readInstant(typed, field, list);
		if (!total || !method || !measuredAt) return [];
		return [{ row, method, measuredAt, total, direct, unit }];
	});
}

/** Courses of phototherapy; a row without a beginning is none, a course without an end still runs. */
export function readCourses(form: DischargeForm, list: IssueList): DischargeFacts['phototherapy'] {
	return form.courseFromOn.flatMap((_, row): DischargeFacts['phototherapy'][number][] => {
		const from = {
			on: at(form.courseFromOn, row),
			time: at(form.courseFromTime, row),
			timeZone: form.timeZone
		};
		const to = { on: at(form.courseToOn, row), time: at(form.courseToTime, row), timeZone: form.timeZone };
		if (from.on === '' && from.time === '' && to.on === '' && to.time === '') return [];
		const startedAt = readInstant(
			from,
			{ onField: 'courseFromOn', timeField: 'courseFromTime', row, what: 'the beginning' },
			list
		);
		const runs = to.on === '' && to.time === '';
		const endedAt = runs
			? null
			: readInstant(to, { onField: 'courseToOn', timeField: 'courseToTime', row, what: 'the end' }, list);
		if (startedAt && endedAt && endedAt <= startedAt) {
			list.add('courseToOn', 'The end must lie after the beginning.', row);
		}
		if (!startedAt || (!runs && !endedAt)) return [];
		const id = at(form.courseId, row);
		const setting = oneOf(SETTINGS, at(form.courseSetting, row)) ?? 'birth-stay';
		return [{ ...(id ? { id } : {}), setting, startedAt, endedAt }];
	});
}

/** Weights after birth; a row without grams is none. */
export function readWeights(form: DischargeForm, list: IssueList): DischargeFacts['weights'] {
	return form.weightGrams.flatMap((_, row): DischargeFacts['weights'][number][] => {
		const typed = at(form.weightGrams, row);
		if (typed === '') return [];
		const grams = parseGrams(typed);
		if (grams === null) list.add('weightGrams', 'Write the weight in grams, for example 3120.', row);
		const when = { on: at(form.weightOn, row), time: at(form.weightTime, row), timeZone: form.timeZone };
		const weighedAt = readInstant(
			when,
			{ onField: 'weightOn', timeField: 'weightTime', row, what: 'this weight' },
			list
		);
		return grams !== null && weighedAt ? [{ weighedAt, grams }] : [];
	});
}
