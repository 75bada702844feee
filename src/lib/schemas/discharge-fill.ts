import type { CarerFacts, DischargeFacts } from '../domain/followup/discharge';
import { toFieldValues } from '../domain/local-time';
import { phoneAsTyped, type CarerKey } from './discharge-carers';
import { dischargeFields, type DischargeForm } from './discharge-fields';

/** How many rows a new form offers; without scripts they are all there is until the first save. */
const BLANK_ROWS = { measurements: 2, courses: 1, weights: 1 };

/** A form on which nothing was typed yet. */
export function blankForm(timeZone: string): DischargeForm {
	const blank = dischargeFields.parse({
		timeZone,
		unit: 'mg/dL',
		carer1Language: 'en',
		carer2Language: 'en'
	});
	const form = { ...blank, directAntiglobulin: 'not-done' };
	for (let i = 0; i < BLANK_ROWS.measurements; i++) addMeasurementRow(form);
	for (let i = 0; i < BLANK_ROWS.courses; i++) addCourseRow(form);
	for (let i = 0; i < BLANK_ROWS.weights; i++) addWeightRow(form);
	return form;
}

export function addMeasurementRow(form: DischargeForm): void {
	form.measurementMethod.push('transcutaneous');
	form.measurementOn.push('');
	form.measurementTime.push('');
	form.measurementTotal.push('');
	form.measurementDirect.push('');
}

export function addCourseRow(form: DischargeForm): void {
	form.courseId.push('');
	form.courseSetting.push('birth-stay');
	form.courseFromOn.push('');
	form.courseFromTime.push('');
	form.courseToOn.push('');
	form.courseToTime.push('');
}

export function addWeightRow(form: DischargeForm): void {
	form.weightOn.push('');
	form.weightTime.push('');
	form.weightGrams.push('');
}

function carerFields<Key extends CarerKey>(key: Key, carer: CarerFacts | undefined): Partial<DischargeForm> {
	if (!carer) return {};
	return {
		[`${key}Name`]: carer.name,
		[`${key}Relation`]: carer.relation,
		[`${key}Phone`]: carer.phone ? phoneAsTyped(carer.phone) : '',
		[`${key}Email`]: carer.email ?? '',
		[`${key}Language`]: carer.language,
		[`${key}Sms`]: carer.consentsToSms,
		[`${key}Mail`]: carer.consentsToMail
	};
}

/** The family part alone, for a twin. */
export function familyFields(carers: readonly CarerFacts[]): Partial<DischargeForm> {
	return { ...carerFields('carer1', carers[0]), ...carerFields('carer2', carers[1]) };
}

/** What is on record, as the form shows it; times in the zone of the birth unit, one blank row after the last. */
export function fillForm(facts: DischargeFacts, timeZone: string): DischargeForm {
	const field = (at: Date | null) => (at ? toFieldValues(at, timeZone) : { date: '', time: '' });
	const courses = facts.phototherapy.map((course) => ({
		...course,
		from: field(course.startedAt),
		to: field(course.endedAt)
	}));
	const form: DischargeForm = {
		...blankForm(timeZone),
		recordNumber: facts.recordNumber,
		familyName: facts.familyName,
		givenName: facts.givenName,
		bornOn: field(facts.bornAt).date,
		bornTime: field(facts.bornAt).time,
		gestationWeeks: String(facts.gestationalAge.weeks),
		gestationDays: String(facts.gestationalAge.days),
		birthWeightGrams: facts.birthWeightGrams === null ? '' : String(facts.birthWeightGrams),
		unit: facts.measurements[0]?.unit ?? 'mg/dL',
		measurementMethod: facts.measurements.map(({ method }) => method),
		measurementOn: facts.measurements.map(({ measuredAt }) => field(measuredAt).date),
		measurementTime: facts.measurements.map(({ measuredAt }) => field(measuredAt).time),
		measurementTotal: facts.measurements.map(({ total }) => String(total)),
		measurementDirect: facts.measurements.map(({ direct }) => (direct === null ? '' : String(direct))),
		courseId: courses.map(({ id }) => id ?? ''),
		courseSetting: courses.map(({ setting }) => setting),
		courseFromOn: courses.map(({ from }) => from.date),
		courseFromTime: courses.map(({ from }) => from.time),
		courseToOn: courses.map(({ to }) => to.date),
		courseToTime: courses.map(({ to }) => to.time),
		neurotoxicityRisks: [...facts.neurotoxicityRisks],
		jaundiceRisks: [...facts.jaundiceRisks],
		directAntiglobulin: facts.directAntiglobulin,
		albumin: facts.albuminGramsPerDecilitre === null ? '' : String(facts.albuminGramsPerDecilitre),
		feeding: facts.feeding,
		weightOn: facts.weights.map(({ weighedAt }) => field(weighedAt).date),
		weightTime: facts.weights.map(({ weighedAt }) => field(weighedAt).time),
		weightGrams: facts.weights.map(({ grams }) => String(grams)),
		dischargeOn: field(facts.plannedDischargeAt).date,
		dischargeTime: field(facts.plannedDischargeAt).time,
		clinicId: facts.clinicId,
		...familyFields(facts.carers)
	};
	addMeasurementRow(form);
	if (courses.length === 0) addCourseRow(form);
	addWeightRow(form);
	return form;
}
