import { boolean, datetime, index, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import type { Role } from '../../../domain/access/roles';
import { asciiWord, instant, recordId } from '../columns';
import { organisations, sites } from './organisation';

export const staff = mysqlTable(
	'staff',
	{
		id: recordId().primaryKey(),
		organisationId: recordId()
			.notNull()
			.references(() => organisations.id),
		/** Lower case, as typed at sign-in. */
		email: varchar({ length: 200 }).notNull(),
		name: varchar({ length: 120 }).notNull(),
		/** Argon2id; null until the invitation is taken up. */
		passwordHash: asciiWord({ length: 200 }),
		/** Base-32 secret of the second factor, sealed with the application key; null while it is off. */
		totpSecret: asciiWord({ length: 200 }),
		/** The last time step accepted, so that a code is good once. */
		totpLastStep: asciiWord({ length: 20 }),
		isDisabled: boolean().notNull().default(false),
		createdAt: instant().notNull()
	},
	(t) => [uniqueIndex('staff_email').on(t.email), index('staff_organisation').on(t.organisationId)]
);

/** One role at one site; an administrator's row has no site, since the role covers the organisation. */
export const staffRoles = mysqlTable(
	'staff_roles',
	{
		id: recordId().primaryKey(),
		staffId: recordId()
			.notNull()
			.references(() => staff.id, { onDelete: 'cascade' }),
		role: asciiWord({ length: 20 }).$type<Role>().notNull(),
		siteId: recordId().references(() => sites.id)
	},
	(t) => [
		uniqueIndex('staff_roles_once').on(t.staffId, t.role, t.siteId),
		index('staff_roles_site').on(t.siteId, t.role)
	]
);

/** Lucia's sessions; the id held here is the SHA-256 of the one in the cookie. */
export const sessions = mysqlTable(
	'sessions',
	{
		id: asciiWord({ length: 64 }).primaryKey(),
		userId: recordId()
			.notNull()
			.references(() => staff.id, { onDelete: 'cascade' }),
		expiresAt: datetime({ mode: 'date' }).notNull(),
		startedAt: instant().notNull(),
		/** False between the password and the second factor. */
		isComplete: boolean().notNull().default(true)
	},
	(t) => [index('sessions_user').on(t.userId), index('sessions_expiry').on(t.expiresAt)]
);

export const invitations = mysqlTable(
	'invitations',
	{
		id: recordId().primaryKey(),
		staffId: recordId()
			.notNull()
			.references(() => staff.id, { onDelete: 'cascade' }),
		tokenHash: asciiWord({ length: 64 }).notNull(),
		expiresAt: instant().notNull(),
		usedAt: instant(),
		createdBy: recordId().notNull(),
		createdAt: instant().notNull()
	},
	(t) => [uniqueIndex('invitations_token').on(t.tokenHash), index('invitations_staff').on(t.staffId)]
);

/** Who looked at or changed which record: insert only. */
export const accessRecords = mysqlTable(
	'access_records',
	{
		id: recordId().primaryKey(),
		organisationId: recordId().notNull(),
		staffId: recordId(),
		action: asciiWord({ length: 60 }).notNull(),
		followUpId: recordId(),
		detail: varchar({ length: 400 }),
		at: instant().notNull()
	},
	(t) => [
		index('access_records_time').on(t.organisationId, t.at),
		index('access_records_follow_up').on(t.followUpId, t.at)
	]
);
