import { sql } from 'drizzle-orm';
import { boolean, check, index, int, json, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import type { ActorKind, Role } from '../../../domain/access/roles';
import type { AlertKind } from '../../../domain/followup/alert';
import type { AttemptChannel, AttemptOutcome } from '../../../domain/followup/attempt';
import type { NextStepKind, Outcome, Stage, TransitionKind } from '../../../domain/followup/states';
import type { VisitKind, VisitState } from '../../../domain/followup/visit';
import type {
	CheckInAnswers,
	CheckInReason,
	CheckInResult,
	Disposition,
	StandardId,
	WindowTest
} from '../../../domain/guideline/types';
import { asciiWord, instant, recordId } from '../columns';
import { carers, measurements, newborns } from './newborn';
import { sites } from './organisation';
import { staff } from './staff';

/**
 * The whole loop of one newborn from discharge to closed.
 * The next step lies in the row itself and a check makes it complete exactly while the follow-up is open,
 * so that no program error can leave a newborn without one.
 */
export const followUps = mysqlTable(
	'follow_ups',
	{
		id: recordId().primaryKey(),
		newbornId: recordId()
			.notNull()
			.references(() => newborns.id),
		birthSiteId: recordId()
			.notNull()
			.references(() => sites.id),
		clinicId: recordId()
			.notNull()
			.references(() => sites.id),
		stage: asciiWord({ length: 20 }).$type<Stage>().notNull(),
		/** Counts passes from window to decision, from 1. */
		round: int().notNull().default(1),
		plannedDischargeAt: instant().notNull(),
		/** Set when the nurse hands over to the clinic; cleared never. */
		handedOverAt: instant(),

		nextStep: asciiWord({ length: 24 }).$type<NextStepKind>(),
		nextStepRole: asciiWord({ length: 20 }).$type<Role>(),
		nextStepSiteId: recordId(),
		/** Named only after a climb. */
		nextStepStaffId: recordId(),
		nextStepDueAt: instant(),
		/** 0 the role, 1 the duty person, 2 the next by name. */
		nextStepClimb: int().notNull().default(0),
		/** When the unmet step climbs next; null once nobody is left above. */
		nextStepClimbAt: instant(),

		standard: asciiWord({ length: 20 }).$type<StandardId>().notNull(),
		disposition: asciiWord({ length: 20 }).$type<Disposition>(),
		windowFromAt: instant(),
		windowUntilAt: instant(),
		windowTest: asciiWord({ length: 24 }).$type<WindowTest>(),

		/** When a later check (prolonged jaundice, hearing test) is due and what it asks. */
		laterCheckAt: instant(),
		laterCheckAsks: varchar({ length: 200 }),

		outcome: asciiWord({ length: 24 }).$type<Outcome>(),
		closedAt: instant(),
		mergedIntoId: recordId(),

		/** Grows with every save; a save names the version it read. */
		version: int().notNull().default(1),
		createdAt: instant().notNull(),
		updatedAt: instant().notNull()
	},
	(t) => [
		index('follow_ups_newborn').on(t.newbornId),
		index('follow_ups_clinic_due').on(t.clinicId, t.stage, t.nextStepDueAt),
		index('follow_ups_unit').on(t.birthSiteId, t.stage, t.plannedDischargeAt),
		index('follow_ups_climb').on(t.nextStepClimbAt),
		index('follow_ups_owed').on(t.nextStepSiteId, t.nextStepRole, t.nextStepDueAt),
		check(
			'follow_ups_one_next_step',
			sql`(${t.stage} = 'closed' and ${t.nextStep} is null and ${t.nextStepRole} is null and ${t.nextStepSiteId} is null and ${t.nextStepDueAt} is null and ${t.nextStepClimbAt} is null and ${t.outcome} is not null and ${t.closedAt} is not null) or (${t.stage} <> 'closed' and ${t.nextStep} is not null and ${t.nextStepRole} is not null and ${t.nextStepSiteId} is not null and ${t.nextStepDueAt} is not null and ${t.outcome} is null and ${t.closedAt} is null)`
		),
		check(
			'follow_ups_window',
			sql`(${t.windowFromAt} is null) = (${t.windowUntilAt} is null) and (${t.windowFromAt} is null or ${t.windowFromAt} <= ${t.windowUntilAt})`
		)
	]
);

/** Every change of stage: who, when, from, to, why. Insert only. */
export const transitions = mysqlTable(
	'transitions',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		kind: asciiWord({ length: 24 }).$type<TransitionKind>().notNull(),
		fromStage: asciiWord({ length: 20 }).$type<Stage>(),
		toStage: asciiWord({ length: 20 }).$type<Stage>().notNull(),
		actorKind: asciiWord({ length: 12 }).$type<ActorKind>().notNull(),
		/** Staff id, carer id or worker name, by `actorKind`. */
		actorId: asciiWord({ length: 60 }),
		why: varchar({ length: 600 }),
		detail: json().$type<Record<string, string | number | null>>().notNull(),
		at: instant().notNull(),
		/** Order within the follow-up; equals the version the save made. */
		sequence: int().notNull()
	},
	(t) => [uniqueIndex('transitions_sequence').on(t.followUpId, t.sequence)]
);

/** A place taken by a newborn. `holdsPlace` and `isOpen` are 1 or null, so that their unique keys ignore rows that no longer count. */
export const visits = mysqlTable(
	'visits',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		clinicId: recordId()
			.notNull()
			.references(() => sites.id),
		round: int().notNull(),
		kind: asciiWord({ length: 20 }).$type<VisitKind>().notNull(),
		startsAt: instant().notNull(),
		endsAt: instant().notNull(),
		/** Which of the places at that time, from 1. */
		placeNumber: int().notNull(),
		/** 1 unless cancelled or moved away. */
		holdsPlace: boolean(),
		/** 1 while booked or confirmed. */
		isOpen: boolean(),
		state: asciiWord({ length: 12 }).$type<VisitState>().notNull(),
		isOutsideWindow: boolean().notNull().default(false),
		outsideWindowWhy: varchar({ length: 300 }),
		/** The calendar object's SEQUENCE; grows with every move and with the cancellation. */
		calendarSequence: int().notNull().default(0),
		/** Shared by a visit and those it was moved from, so that calendars follow. */
		calendarUid: asciiWord({ length: 60 }).notNull(),
		bookedBy: recordId(),
		bookedAt: instant().notNull(),
		confirmedAt: instant(),
		confirmedVia: asciiWord({ length: 12 }).$type<'link' | 'sms' | 'call' | 'at-desk'>(),
		arrivedAt: instant(),
		endedAt: instant(),
		/** The carer asked for another time; cleared when the visit moves. */
		otherTimeAskedAt: instant(),
		otherTimeWish: varchar({ length: 300 })
	},
	(t) => [
		uniqueIndex('visits_place').on(t.clinicId, t.startsAt, t.kind, t.placeNumber, t.holdsPlace),
		uniqueIndex('visits_one_open').on(t.followUpId, t.isOpen),
		index('visits_follow_up').on(t.followUpId, t.startsAt),
		index('visits_clinic_day').on(t.clinicId, t.startsAt),
		check(
			'visits_marks',
			sql`(${t.holdsPlace} is null or ${t.holdsPlace} = 1) and (${t.isOpen} is null or (${t.isOpen} = 1 and ${t.holdsPlace} = 1))`
		)
	]
);

/** An extra thing owed beside the next step. */
export const alerts = mysqlTable(
	'alerts',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		kind: asciiWord({ length: 32 }).$type<AlertKind>().notNull(),
		role: asciiWord({ length: 20 }).$type<Role>().notNull(),
		siteId: recordId()
			.notNull()
			.references(() => sites.id),
		staffId: recordId(),
		dueAt: instant().notNull(),
		climb: int().notNull().default(0),
		climbAt: instant(),
		detail: varchar({ length: 500 }).notNull(),
		/** What raised it, so that raising twice is one alert. */
		dedupeKey: asciiWord({ length: 120 }).notNull(),
		raisedAt: instant().notNull(),
		settledAt: instant(),
		settledBy: recordId(),
		settledHow: varchar({ length: 300 })
	},
	(t) => [
		uniqueIndex('alerts_dedupe').on(t.dedupeKey),
		index('alerts_owed').on(t.siteId, t.role, t.settledAt, t.dueAt),
		index('alerts_follow_up').on(t.followUpId, t.settledAt),
		index('alerts_climb').on(t.settledAt, t.climbAt)
	]
);

/** One try to reach a family, with its outcome. */
export const attempts = mysqlTable(
	'attempts',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		round: int().notNull(),
		channel: asciiWord({ length: 12 }).$type<AttemptChannel>().notNull(),
		carerId: recordId().references(() => carers.id),
		outcome: asciiWord({ length: 20 }).$type<AttemptOutcome>().notNull(),
		note: varchar({ length: 500 }),
		staffId: recordId().references(() => staff.id),
		at: instant().notNull()
	},
	(t) => [index('attempts_follow_up').on(t.followUpId, t.at)]
);

export const checkIns = mysqlTable(
	'check_ins',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		carerId: recordId().references(() => carers.id),
		answers: json().$type<CheckInAnswers>().notNull(),
		result: asciiWord({ length: 12 }).$type<CheckInResult>().notNull(),
		reasons: json().$type<CheckInReason[]>().notNull(),
		answeredAt: instant().notNull(),
		/** The form's own key: a second press of the button is the same check-in. */
		submissionKey: asciiWord({ length: 40 }).notNull()
	},
	(t) => [
		index('check_ins_follow_up').on(t.followUpId, t.answeredAt),
		uniqueIndex('check_ins_once').on(t.followUpId, t.submissionKey)
	]
);

/** The pediatrician's answer to a recommendation, with the result that was on the screen. */
export const decisions = mysqlTable(
	'decisions',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		round: int().notNull(),
		measurementId: recordId().references(() => measurements.id),
		standard: asciiWord({ length: 20 }).$type<StandardId>().notNull(),
		edition: varchar({ length: 60 }).notNull(),
		recommended: asciiWord({ length: 20 }).$type<Disposition>().notNull(),
		chosen: asciiWord({ length: 20 }).notNull(),
		isOverride: boolean().notNull(),
		reason: varchar({ length: 600 }),
		/** The assessment as JSON: input, result and trace, reproducible later. */
		assessment: json().$type<Record<string, unknown>>().notNull(),
		decidedBy: recordId().references(() => staff.id),
		decidedAt: instant().notNull()
	},
	(t) => [index('decisions_follow_up').on(t.followUpId, t.decidedAt)]
);

/** A carer's way in. The token is derived from the application's key and this id; only its hash is kept. */
export const parentLinks = mysqlTable(
	'parent_links',
	{
		id: recordId().primaryKey(),
		followUpId: recordId()
			.notNull()
			.references(() => followUps.id),
		carerId: recordId()
			.notNull()
			.references(() => carers.id),
		tokenHash: asciiWord({ length: 64 }).notNull(),
		expiresAt: instant().notNull(),
		revokedAt: instant(),
		createdAt: instant().notNull()
	},
	(t) => [
		uniqueIndex('parent_links_token').on(t.tokenHash),
		uniqueIndex('parent_links_carer').on(t.followUpId, t.carerId)
	]
);
