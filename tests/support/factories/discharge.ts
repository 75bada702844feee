import type { DischargeFacts } from '../../../src/lib/domain/followup/discharge';
import { systemRandom } from '../../../src/lib/server/random';

const HOUR = 3_600_000;

/**
 * A discharge as a nurse would have filled it in: 39 weeks, 40 hours old, 3.9 mg/dL below the line four
 * hours before, so the window is 24 to 48 hours after that value. `now` is the planned discharge.
 */
export function makeDischargeFacts(
	now: Date,
	set: Partial<DischargeFacts> & Pick<DischargeFacts, 'clinicId'>
): DischargeFacts {
	const bornAt = new Date(now.getTime() - 40 * HOUR);
	return {
		recordNumber: `T-${systemRandom.id()}`,
		familyName: 'Testfamily',
		givenName: 'Ada',
		bornAt,
		birthTimeZone: 'America/Chicago',
		gestationalAge: { weeks: 39, days: 0 },
		feeding: 'breast',
		birthWeightGrams: 3_400,
		weights: [],
		neurotoxicityRisks: [],
		jaundiceRisks: [],
		albuminGramsPerDecilitre: null,
		directAntiglobulin: 'not-done',
		// AAP 2022, no risk factor, 39 weeks, 36 hours: line 14.8 mg/dL (published table).
		measurements: [
			{
				method: 'serum',
				measuredAt: new Date(bornAt.getTime() + 36 * HOUR),
				total: 10.9,
				direct: null,
				unit: 'mg/dL'
			}
		],
		phototherapy: [],
		plannedDischargeAt: now,
		carers: [
			{
				name: 'Test Carer',
				relation: 'mother',
				phone: '+12025550177',
				email: 'carer@example.org',
				language: 'en',
				consentsToSms: true,
				consentsToMail: true
			}
		],
		...set
	};
}
