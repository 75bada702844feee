import { assessAtAnyAge } from '../../domain/guideline';
import type { Assessment, AssessmentInput, Refusal, StandardId } from '../../domain/guideline/types';
import type { Result } from '../../domain/result';
import type { NewbornRecord } from '../repos/newborns';

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
