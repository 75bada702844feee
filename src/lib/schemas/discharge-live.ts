import { assess } from '../domain/guideline';
import type { Assessment, AssessmentInput, Feeding, Refusal, StandardId } from '../domain/guideline/types';
import type { DischargeForm } from './discharge-fields';
import { readAlbumin, readBorn, readGestation, readRisks, readUnit } from './discharge-read';
import { readCourses, readMeasurements } from './discharge-rows';
import { IssueList, readInstant, type FormIssue } from './discharge-values';

export type LiveResult =
	/** Not enough is known yet; `missing` says what, in words. */
	| { readonly state: 'waiting'; readonly missing: readonly string[] }
	| { readonly state: 'refused'; readonly issues: readonly FormIssue[] }
	| {
			readonly state: 'assessed';
			readonly input: AssessmentInput;
			readonly assessment: Assessment;
			/** Row of the form for each measurement, in the order of the input. */
			readonly rows: readonly number[];
			/** True while no planned discharge was given and now stands in for it. */
			readonly dischargeAssumed: boolean;
			/** Values that were left out because they could not be read. */
			readonly unread: readonly FormIssue[];
	  };

const FIELD_OF_ROW: Record<string, string> = { total: 'measurementTotal', direct: 'measurementDirect' };

/** Where on the form a refusal of the standard belongs. */
export function issueOfRefusal(refusal: Refusal, rows: readonly number[]): FormIssue {
	const { field, message } = refusal;
	const measurement = /^bilirubin\[(\d+)\]\.?(\w*)$/.exec(field);
	if (measurement) {
		const row = rows[Number(measurement[1])] ?? 0;
		if (measurement[2] === 'unit') return { path: ['unit'], message };
		return { path: [FIELD_OF_ROW[measurement[2] ?? ''] ?? 'measurementOn', row], message };
	}
	const course = /^phototherapy\[(\d+)\]\.?(\w*)$/.exec(field);
	if (course)
		return { path: [course[2] === 'to' ? 'courseToOn' : 'courseFromOn', Number(course[1])], message };
	const plain: Record<string, string> = {
		gestationalAge: 'gestationWeeks',
		bornAt: 'bornOn',
		dischargeAt: 'dischargeOn',
		albuminGramsPerDecilitre: 'albumin',
		startsAt: 'place'
	};
	return { path: [plain[field] ?? field], message };
}

function feedingOf(form: DischargeForm): Feeding {
	return form.feeding === 'formula' || form.feeding === 'mixed' ? form.feeding : 'breast';
}

/**
 * Holds what has been typed so far against the standard, as of `now`. Never throws: half a form is the usual case.
 * Without a planned discharge, `now` stands in for it.
 */
export function liveResult(
	form: DischargeForm,
	asked: { readonly standard: StandardId; readonly now: Date }
): LiveResult {
	const essential = new IssueList();
	const bornAt = readBorn(form, essential);
	const gestationalAge = readGestation(form, essential);
	if (!bornAt || !gestationalAge) {
		const missing = [bornAt ? '' : 'date and time of birth', gestationalAge ? '' : 'gestational age'];
		return { state: 'waiting', missing: missing.filter(Boolean) };
	}
	const list = new IssueList();
	const measured = readMeasurements(form, readUnit(form), list);
	const planned = readInstant(
		{ on: form.dischargeOn, time: form.dischargeTime, timeZone: form.timeZone },
		{ onField: 'dischargeOn', timeField: 'dischargeTime', what: 'the planned discharge' },
		new IssueList()
	);
	const albumin = readAlbumin(form, list);
	const input: AssessmentInput = {
		standard: asked.standard,
		now: asked.now,
		bornAt,
		gestationalAge,
		dischargeAt: planned ?? asked.now,
		...readRisks(form),
		feeding: feedingOf(form),
		...(albumin === null ? {} : { albuminGramsPerDecilitre: albumin }),
		bilirubin: measured.map(({ method, measuredAt, total, direct, unit }) => ({
			at: measuredAt,
			method,
			total,
			unit,
			...(direct === null ? {} : { direct })
		})),
		phototherapy: readCourses(form, list).map(({ startedAt, endedAt, setting }) => ({
			from: startedAt,
			setting,
			...(endedAt ? { to: endedAt } : {})
		}))
	};
	const rows = measured.map(({ row }) => row);
	const result = assess(input);
	if (!result.ok)
		return { state: 'refused', issues: result.error.map((refusal) => issueOfRefusal(refusal, rows)) };
	return {
		state: 'assessed',
		input,
		assessment: result.value,
		rows,
		dischargeAssumed: planned === null,
		unread: list.issues
	};
}
