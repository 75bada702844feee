import type { Language } from '../../src/lib/domain/messaging/language';
import { DEFAULT_POLICY } from '../../src/lib/domain/followup/policy';
import type { Db } from '../../src/lib/server/db/client';
import { followUps } from '../../src/lib/server/db/schema/follow-up';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { carers, newborns } from '../../src/lib/server/db/schema/newborn';
import { sites } from '../../src/lib/server/db/schema/organisation';
import { systemRandom } from '../../src/lib/server/random';
import { eq } from 'drizzle-orm';

export interface Family {
	readonly followUpId: string;
	readonly siteId: string;
	readonly carerIds: readonly string[];
}

interface CarerFacts {
	readonly phone?: string;
	readonly email?: string;
	readonly language?: Language;
}

/** A newborn with a follow-up that waits for its visit to be made, and these carers in the order of calling. */
export async function insertFamily(
	db: Db,
	siteId: string,
	people: readonly CarerFacts[],
	now: Date
): Promise<Family> {
	const [site] = await db.select().from(sites).where(eq(sites.id, siteId));
	if (site === undefined) throw new Error('there is no such site');
	const newbornId = systemRandom.id();
	const followUpId = systemRandom.id();
	await db.insert(newborns).values({
		id: newbornId,
		organisationId: site.organisationId,
		birthSiteId: siteId,
		recordNumber: newbornId,
		familyName: 'Invented',
		givenName: 'Newborn',
		bornAt: new Date(now.getTime() - 2 * 86_400_000),
		birthTimeZone: site.timeZone,
		bornOn: now.toISOString().slice(0, 10),
		gestationWeeks: 39,
		gestationDays: 0,
		feeding: 'breast',
		neurotoxicityRisks: [],
		jaundiceRisks: [],
		directAntiglobulin: 'not-done',
		createdAt: now
	});
	const carerIds = people.map(() => systemRandom.id());
	await db.insert(carers).values(
		people.map(({ phone, email, language = 'en' }, index) => ({
			id: carerIds[index] ?? '',
			newbornId,
			callOrder: index + 1,
			name: `Carer ${index + 1}`,
			relation: 'parent',
			phone: phone ?? null,
			email: email ?? null,
			language,
			consentsToSms: phone !== undefined,
			consentsToMail: email !== undefined,
			consentedAt: now
		}))
	);
	await db.insert(followUps).values({
		id: followUpId,
		newbornId,
		birthSiteId: siteId,
		clinicId: siteId,
		stage: 'to-book',
		plannedDischargeAt: now,
		nextStep: 'book-visit',
		nextStepRole: 'desk',
		nextStepSiteId: siteId,
		nextStepDueAt: new Date(now.getTime() + 2 * 3_600_000),
		standard: 'aap-2022',
		createdAt: now,
		updatedAt: now
	});
	return { followUpId, siteId, carerIds };
}

/** Plans one SMS to the first carer of a family; where it goes stands in its facts, for the plain renderer. */
export async function planForFamily(db: Db, family: Family, to: string, now: Date): Promise<string> {
	const id = systemRandom.id();
	await db.insert(messages).values({
		id,
		followUpId: family.followUpId,
		siteId: family.siteId,
		carerId: family.carerIds[0] ?? null,
		kind: 'visit-booked',
		occasion: 'visit-1',
		channel: 'sms',
		language: 'en',
		dedupeKey: `${family.followUpId}:visit-booked:visit-1:${family.carerIds[0]}:sms`,
		facts: { to },
		state: 'planned',
		priority: 5,
		runAt: new Date(now.getTime() - 60_000),
		expiresAt: new Date(now.getTime() + 24 * 3_600_000),
		createdAt: now,
		updatedAt: now
	});
	return id;
}

export const SMS_LIMIT_MINUTES = DEFAULT_POLICY.smsUndeliveredMinutes;
