import { DateTime } from 'luxon';
import type { Db } from '../../../src/lib/server/db/client';
import { followUps } from '../../../src/lib/server/db/schema/follow-up';
import { carers, newborns } from '../../../src/lib/server/db/schema/newborn';
import { systemRandom } from '../../../src/lib/server/random';

const HOUR = 3_600_000;

export interface MadeFollowUp {
	readonly followUpId: string;
	readonly newbornId: string;
	readonly carerId: string;
	readonly recordNumber: string;
}

/** A newborn of 30 hours with one carer and an open follow-up whose visit has to be booked. */
export async function makeFollowUp(
	db: Db,
	at: { readonly organisationId: string; readonly birthSiteId: string; readonly clinicId: string },
	set: {
		readonly now?: Date;
		readonly newborn?: Partial<typeof newborns.$inferInsert>;
		readonly carer?: Partial<typeof carers.$inferInsert>;
		readonly followUp?: Partial<typeof followUps.$inferInsert>;
	} = {}
): Promise<MadeFollowUp> {
	const now = set.now ?? new Date();
	const [newbornId, carerId, followUpId] = [systemRandom.id(), systemRandom.id(), systemRandom.id()];
	const bornAt = new Date(now.getTime() - 30 * HOUR);
	const recordNumber = set.newborn?.recordNumber ?? `T-${newbornId}`;
	await db.insert(newborns).values({
		organisationId: at.organisationId,
		birthSiteId: at.birthSiteId,
		familyName: 'Testfamily',
		givenName: 'Newborn',
		bornAt,
		birthTimeZone: 'America/Chicago',
		bornOn: DateTime.fromJSDate(bornAt, { zone: 'America/Chicago' }).toFormat('yyyy-MM-dd'),
		gestationWeeks: 39,
		gestationDays: 2,
		feeding: 'breast',
		birthWeightGrams: 3400,
		neurotoxicityRisks: [],
		jaundiceRisks: [],
		directAntiglobulin: 'not-done',
		createdAt: now,
		...set.newborn,
		id: newbornId,
		recordNumber
	});
	await db.insert(carers).values({
		newbornId,
		callOrder: 1,
		name: 'Parent Testfamily',
		relation: 'mother',
		phone: '+12025550123',
		email: 'parent@example.org',
		language: 'en',
		consentsToSms: true,
		consentsToMail: true,
		consentedAt: now,
		...set.carer,
		id: carerId
	});
	await db.insert(followUps).values({
		newbornId,
		birthSiteId: at.birthSiteId,
		clinicId: at.clinicId,
		stage: 'to-book',
		plannedDischargeAt: new Date(now.getTime() + 4 * HOUR),
		handedOverAt: now,
		nextStep: 'book-visit',
		nextStepRole: 'desk',
		nextStepSiteId: at.clinicId,
		nextStepDueAt: new Date(now.getTime() + 2 * HOUR),
		standard: 'aap-2022',
		disposition: 'follow-up',
		windowFromAt: new Date(now.getTime() + 12 * HOUR),
		windowUntilAt: new Date(now.getTime() + 48 * HOUR),
		windowTest: 'serum-or-transcutaneous',
		createdAt: now,
		updatedAt: now,
		...set.followUp,
		id: followUpId
	});
	return { followUpId, newbornId, carerId, recordNumber };
}
