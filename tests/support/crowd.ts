import type { Db } from '../../src/lib/server/db/client';
import { alerts, attempts, checkIns, followUps, visits } from '../../src/lib/server/db/schema/follow-up';
import { messages, threadEntries } from '../../src/lib/server/db/schema/messaging';
import { strayTexts } from '../../src/lib/server/db/schema/stray-text';
import { carers, measurements, newborns, phototherapyCourses } from '../../src/lib/server/db/schema/newborn';
import type { Stage } from '../../src/lib/domain/followup/states';
import type { CheckInAnswers } from '../../src/lib/domain/guideline/types';
import { systemRandom } from '../../src/lib/server/random';
import { WELL } from './well-newborn';

const HOUR = 3_600_000;
const CHUNK = 500;

export interface CrowdAt {
	readonly organisationId: string;
	readonly birthSiteId: string;
	readonly clinicId: string;
	readonly now: Date;
}

/** Years of closed follow-ups and a few hundred open ones, written straight into the tables: to see how queries grow. */
export async function makeCrowd(
	db: Db,
	at: CrowdAt,
	{ count, stage }: { readonly count: number; readonly stage: Stage }
): Promise<void> {
	for (let done = 0; done < count; done += CHUNK) {
		const n = Math.min(CHUNK, count - done);
		await insertChunk(
			db,
			Array.from({ length: n }, (_, i) => oneOf(at, stage, done + i))
		);
	}
}

type One = ReturnType<typeof oneOf>;

async function insertChunk(db: Db, rows: readonly One[]): Promise<void> {
	const all = <K extends keyof One>(key: K) => rows.map((row) => row[key]);
	await db.insert(newborns).values(all('newborn'));
	await db.insert(carers).values(all('carer'));
	await db.insert(measurements).values(all('measurement'));
	await db.insert(phototherapyCourses).values(all('course'));
	await db.insert(followUps).values(all('followUp'));
	await db.insert(visits).values(all('visit'));
	await db.insert(attempts).values(all('attempt'));
	await db.insert(checkIns).values(all('checkIn'));
	await db.insert(messages).values(all('message'));
	await db.insert(threadEntries).values([...all('words'), ...all('strayWords')]);
	await db.insert(strayTexts).values(all('strayText'));
	await db.insert(alerts).values(all('alert'));
}

function newbornPart(at: CrowdAt, newbornId: string, bornAt: Date) {
	return {
		newborn: {
			id: newbornId,
			organisationId: at.organisationId,
			birthSiteId: at.birthSiteId,
			recordNumber: `C-${newbornId}`,
			familyName: `Crowd ${newbornId.slice(0, 4)}`,
			givenName: 'Newborn',
			bornAt,
			birthTimeZone: 'America/Chicago',
			bornOn: bornAt.toISOString().slice(0, 10),
			gestationWeeks: 39,
			gestationDays: 0,
			feeding: 'breast' as const,
			neurotoxicityRisks: [],
			jaundiceRisks: [],
			directAntiglobulin: 'not-done' as const,
			createdAt: at.now
		},
		carer: {
			id: systemRandom.id(),
			newbornId,
			callOrder: 1,
			name: 'Parent Crowd',
			relation: 'mother',
			phone: '+12025550123',
			language: 'en' as const,
			consentsToSms: true,
			consentsToMail: false
		},
		measurement: {
			id: systemRandom.id(),
			newbornId,
			method: 'serum' as const,
			measuredAt: new Date(bornAt.getTime() + 30 * HOUR),
			total: 9.1,
			unit: 'mg/dL' as const,
			status: 'final' as const,
			recordedAt: at.now
		},
		course: {
			id: systemRandom.id(),
			newbornId,
			setting: 'birth-stay' as const,
			startedAt: new Date(bornAt.getTime() + 20 * HOUR),
			endedAt: new Date(bornAt.getTime() + 26 * HOUR),
			recordedAt: at.now
		}
	};
}

function oneOf(at: CrowdAt, stage: Stage, index: number) {
	const isOpen = stage !== 'closed';
	const bornAt = new Date(at.now.getTime() - (isOpen ? 50 : 2_000 + index * 3) * HOUR);
	const [newbornId, followUpId, strayId] = [systemRandom.id(), systemRandom.id(), systemRandom.id()];
	const happened = new Date(bornAt.getTime() + 40 * HOUR);
	const family = newbornPart(at, newbornId, bornAt);
	return {
		...family,
		followUp: {
			id: followUpId,
			newbornId,
			birthSiteId: at.birthSiteId,
			clinicId: at.clinicId,
			stage,
			plannedDischargeAt: happened,
			handedOverAt: happened,
			...(isOpen
				? {
						nextStep: 'get-confirmation' as const,
						nextStepRole: 'desk' as const,
						nextStepSiteId: at.clinicId,
						nextStepDueAt: new Date(at.now.getTime() + (index % 40) * HOUR)
					}
				: { outcome: 'jaundice-settled' as const, closedAt: at.now }),
			standard: 'aap-2022' as const,
			windowFromAt: new Date(bornAt.getTime() + 48 * HOUR),
			windowUntilAt: new Date(bornAt.getTime() + (72 + (index % 48)) * HOUR),
			windowTest: 'serum' as const,
			createdAt: at.now,
			updatedAt: at.now
		},
		visit: {
			id: systemRandom.id(),
			followUpId,
			clinicId: at.clinicId,
			round: 1,
			kind: 'check' as const,
			startsAt: new Date(bornAt.getTime() + 60 * HOUR),
			endsAt: new Date(bornAt.getTime() + 60.5 * HOUR),
			placeNumber: index + 1,
			holdsPlace: true,
			isOpen: isOpen ? true : null,
			state: isOpen ? ('booked' as const) : ('arrived' as const),
			calendarUid: `${followUpId}@crowd`,
			bookedAt: happened
		},
		attempt: {
			id: systemRandom.id(),
			followUpId,
			round: 1,
			channel: 'call' as const,
			outcome: 'no-answer' as const,
			at: happened
		},
		checkIn: {
			id: systemRandom.id(),
			followUpId,
			answers: ANSWERS,
			result: 'as-planned' as const,
			reasons: [],
			answeredAt: happened,
			submissionKey: followUpId
		},
		message: {
			id: systemRandom.id(),
			followUpId,
			siteId: at.clinicId,
			carerId: family.carer.id,
			kind: 'visit-booked' as const,
			occasion: followUpId,
			channel: 'sms' as const,
			language: 'en' as const,
			dedupeKey: `crowd ${followUpId}`,
			facts: {},
			state: 'sent' as const,
			priority: 5,
			runAt: happened,
			expiresAt: at.now,
			sentAt: happened,
			createdAt: happened,
			updatedAt: happened
		},
		words: {
			id: systemRandom.id(),
			followUpId,
			direction: 'in' as const,
			body: 'Thank you',
			at: happened
		},
		strayWords: {
			id: strayId,
			phone: `+1202555${String(index % 10_000).padStart(4, '0')}`,
			direction: 'in' as const,
			body: 'Who is this?',
			isAlarming: index % 10 === 0,
			at: happened
		},
		strayText: {
			entryId: strayId,
			organisationId: at.organisationId,
			priority: index % 10 === 0 ? 0 : 5,
			dueAt: at.now,
			settledAt: isOpen && index % 5 === 0 ? null : at.now,
			settledAs: isOpen && index % 5 === 0 ? null : ('not-ours' as const)
		},
		alert: {
			id: systemRandom.id(),
			followUpId,
			kind: 'words-from-family' as const,
			role: 'desk' as const,
			siteId: at.clinicId,
			dueAt: at.now,
			detail: 'The family wrote.',
			dedupeKey: `crowd ${followUpId}`,
			raisedAt: happened,
			settledAt: isOpen && index % 5 === 0 ? null : at.now
		}
	};
}

const ANSWERS: CheckInAnswers = { ...WELL, yellowArea: 'face', yellowDepth: 'pale' };
