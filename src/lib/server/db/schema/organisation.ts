import { boolean, date, index, int, json, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import type { StandardId } from '../../../domain/guideline/types';
import type { SitePolicy } from '../../../domain/followup/policy';
import type { VisitKind } from '../../../domain/followup/visit';
import { asciiWord, instant, recordId } from '../columns';

export const organisations = mysqlTable('organisations', {
	id: recordId().primaryKey(),
	name: varchar({ length: 160 }).notNull(),
	/** The guideline in force; assessments already made keep the one that made them. */
	standard: asciiWord({ length: 20 }).$type<StandardId>().notNull(),
	emergencyNumber: varchar({ length: 20 }).notNull(),
	createdAt: instant().notNull()
});

export const sites = mysqlTable(
	'sites',
	{
		id: recordId().primaryKey(),
		organisationId: recordId()
			.notNull()
			.references(() => organisations.id),
		kind: asciiWord({ length: 20 }).$type<'birth-unit' | 'clinic'>().notNull(),
		name: varchar({ length: 160 }).notNull(),
		address: varchar({ length: 240 }).notNull(),
		phone: asciiWord({ length: 20 }).notNull(),
		/** Number that families may call day and night. */
		afterHoursPhone: asciiWord({ length: 20 }).notNull(),
		dutyEmail: varchar({ length: 200 }).notNull(),
		timeZone: asciiWord({ length: 60 }).notNull(),
		policy: json().$type<SitePolicy>().notNull(),
		createdAt: instant().notNull()
	},
	(t) => [index('sites_organisation').on(t.organisationId)]
);

/** A weekly stretch of a clinic's time, in its own local time, with places for a kind of visit. */
export const openings = mysqlTable(
	'openings',
	{
		id: recordId().primaryKey(),
		siteId: recordId()
			.notNull()
			.references(() => sites.id),
		/** ISO weekday, 1 Monday to 7 Sunday. */
		weekday: int().notNull(),
		/** Local `HH:MM`. */
		from: asciiWord({ length: 5 }).notNull(),
		until: asciiWord({ length: 5 }).notNull(),
		visitKind: asciiWord({ length: 20 }).$type<VisitKind>().notNull(),
		placeMinutes: int().notNull(),
		/** Newborns that can be seen at the same time. */
		placesAtOnce: int().notNull(),
		isActive: boolean().notNull().default(true)
	},
	(t) => [index('openings_site').on(t.siteId, t.weekday)]
);

export const closedDays = mysqlTable(
	'closed_days',
	{
		id: recordId().primaryKey(),
		siteId: recordId()
			.notNull()
			.references(() => sites.id),
		closedOn: date({ mode: 'string' }).notNull(),
		reason: varchar({ length: 160 }).notNull()
	},
	(t) => [uniqueIndex('closed_days_once').on(t.siteId, t.closedOn)]
);
