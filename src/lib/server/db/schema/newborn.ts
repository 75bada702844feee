import { sql } from 'drizzle-orm';
import {
	boolean,
	check,
	date,
	decimal,
	index,
	int,
	json,
	mysqlTable,
	uniqueIndex,
	varchar
} from 'drizzle-orm/mysql-core';
import type {
	BilirubinUnit,
	Feeding,
	JaundiceRisk,
	Method,
	NeurotoxicityRisk,
	PhototherapySetting
} from '../../../domain/guideline/types';
import type { Language } from '../../../domain/messaging/language';
import { asciiWord, instant, recordId } from '../columns';
import { organisations, sites } from './organisation';

export const newborns = mysqlTable(
	'newborns',
	{
		id: recordId().primaryKey(),
		organisationId: recordId()
			.notNull()
			.references(() => organisations.id),
		birthSiteId: recordId()
			.notNull()
			.references(() => sites.id),
		recordNumber: varchar({ length: 40 }).notNull(),
		familyName: varchar({ length: 120 }).notNull(),
		givenName: varchar({ length: 120 }).notNull(),
		bornAt: instant().notNull(),
		birthTimeZone: asciiWord({ length: 60 }).notNull(),
		/** Local calendar date of birth, kept for search. */
		bornOn: date({ mode: 'string' }).notNull(),
		gestationWeeks: int().notNull(),
		gestationDays: int().notNull(),
		feeding: asciiWord({ length: 10 }).$type<Feeding>().notNull(),
		birthWeightGrams: int(),
		neurotoxicityRisks: json().$type<NeurotoxicityRisk[]>().notNull(),
		jaundiceRisks: json().$type<JaundiceRisk[]>().notNull(),
		albuminGramsPerDecilitre: decimal({ precision: 3, scale: 1, mode: 'number' }),
		directAntiglobulin: asciiWord({ length: 12 }).$type<'positive' | 'negative' | 'not-done'>().notNull(),
		createdAt: instant().notNull()
	},
	(t) => [
		uniqueIndex('newborns_record_number').on(t.organisationId, t.recordNumber),
		index('newborns_name').on(t.organisationId, t.familyName),
		index('newborns_birth').on(t.organisationId, t.bornOn),
		check('newborns_gestation', sql`${t.gestationDays} between 0 and 6`)
	]
);

/** A parent or other person with a telephone, in the order of calling. */
export const carers = mysqlTable(
	'carers',
	{
		id: recordId().primaryKey(),
		newbornId: recordId()
			.notNull()
			.references(() => newborns.id),
		/** 1 is called first. */
		callOrder: int().notNull(),
		name: varchar({ length: 120 }).notNull(),
		relation: varchar({ length: 60 }).notNull(),
		/** E.164. */
		phone: asciiWord({ length: 20 }),
		email: varchar({ length: 200 }),
		language: asciiWord({ length: 5 }).$type<Language>().notNull(),
		consentsToSms: boolean().notNull(),
		consentsToMail: boolean().notNull(),
		consentedAt: instant(),
		/** Set by a STOP word, cleared by START. */
		smsStoppedAt: instant(),
		mailStoppedAt: instant()
	},
	(t) => [uniqueIndex('carers_order').on(t.newbornId, t.callOrder), index('carers_phone').on(t.phone)]
);

export const weights = mysqlTable(
	'weights',
	{
		id: recordId().primaryKey(),
		newbornId: recordId()
			.notNull()
			.references(() => newborns.id),
		weighedAt: instant().notNull(),
		grams: int().notNull(),
		recordedAt: instant().notNull(),
		recordedBy: recordId()
	},
	(t) => [index('weights_newborn').on(t.newbornId, t.weighedAt)]
);

export const measurements = mysqlTable(
	'measurements',
	{
		id: recordId().primaryKey(),
		newbornId: recordId()
			.notNull()
			.references(() => newborns.id),
		method: asciiWord({ length: 16 }).$type<Method>().notNull(),
		/** When it was true, apart from when it was entered. */
		measuredAt: instant().notNull(),
		total: decimal({ precision: 6, scale: 2, mode: 'number' }).notNull(),
		direct: decimal({ precision: 6, scale: 2, mode: 'number' }),
		unit: asciiWord({ length: 8 }).$type<BilirubinUnit>().notNull(),
		status: asciiWord({ length: 20 }).$type<'final' | 'entered-in-error'>().notNull(),
		struckBecause: varchar({ length: 200 }),
		recordedAt: instant().notNull(),
		recordedBy: recordId()
	},
	(t) => [
		index('measurements_newborn').on(t.newbornId, t.measuredAt),
		check(
			'measurements_total',
			sql`${t.total} > 0 and (${t.direct} is null or (${t.direct} >= 0 and ${t.direct} <= ${t.total}))`
		)
	]
);

export const phototherapyCourses = mysqlTable(
	'phototherapy_courses',
	{
		id: recordId().primaryKey(),
		newbornId: recordId()
			.notNull()
			.references(() => newborns.id),
		setting: asciiWord({ length: 16 }).$type<PhototherapySetting>().notNull(),
		startedAt: instant().notNull(),
		endedAt: instant(),
		recordedAt: instant().notNull(),
		recordedBy: recordId()
	},
	(t) => [index('phototherapy_courses_newborn').on(t.newbornId, t.startedAt)]
);
