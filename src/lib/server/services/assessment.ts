import { assessAtAnyAge } from '../../domain/guideline';
import type { Assessment, AssessmentInput, Refusal, StandardId } from '../../domain/guideline/types';
import type { Result } from '../../domain/result';
import type { FollowUpRow } from '../repos/follow-ups';
import type { NewbornRecord } from '../repos/newborns';

/**
 * From when a visit's window counts: the planned discharge, then the hand-over, and in later rounds the visit at which
 * the latest value was taken, which is when the newborn was last in a clinician's hands.
 */
export function lastLeftAt(
	followUp: Pick<FollowUpRow, 'plannedDischargeAt' | 'handedOverAt'>,
	record: Pick<NewbornRecord, 'measurements'>
): Date {
	const { plannedDischargeAt, handedOverAt } = followUp;
	if (!handedOverAt) return plannedDischargeAt;
	const latest = record.measurements.at(-1)?.measuredAt;
	return latest && latest > handedOverAt ? latest : handedOverAt;
}

/** What the guideline is asked about a newborn on record. */
export function assessmentInputOf(
	record: NewbornRecord,
	asked: { readonly standard: StandardId; readonly dischargeAt: Date; readonly now?: Date }
): AssessmentInput {
	const { newborn } = record;
	return {
		...asked,
		gestationalAge: { weeks: newborn.gestationWeeks, days: newborn.gestationDays },
		bornAt: newborn.bornAt,
		neurotoxicityRisks: newborn.neurotoxicityRisks,
		jaundiceRisks: newborn.jaundiceRisks,
		feeding: newborn.feeding,
		albuminGramsPerDecilitre: newborn.albuminGramsPerDecilitre ?? undefined,
		bilirubin: record.measurements.map((m) => ({
			id: m.id,
			at: m.measuredAt,
			method: m.method,
			total: m.total,
			direct: m.direct ?? undefined,
			unit: m.unit
		})),
		phototherapy: record.phototherapy.map((c) => ({
			from: c.startedAt,
			to: c.endedAt ?? undefined,
			setting: c.setting
		}))
	};
}

/** Holds a newborn's record against the standard, as of `now`, at any age. */
export function assessRecord(
	record: NewbornRecord,
	asked: { readonly standard: StandardId; readonly dischargeAt: Date; readonly now: Date }
): Result<Assessment, readonly Refusal[]> {
	return assessAtAnyAge(assessmentInputOf(record, asked));
}
