import { boolean, index, int, json, mysqlTable, text, uniqueIndex, varchar } from 'drizzle-orm/mysql-core';
import type { FindingKind } from '../../../domain/followup/finding';
import type { Channel, MessageKind, MessageState } from '../../../domain/messaging/kinds';
import type { Language } from '../../../domain/messaging/language';
import { asciiWord, instant, recordId } from '../columns';
import { followUps } from './follow-up';
import { carers } from './newborn';
import { organisations, sites } from './organisation';

/** Wording of one kind, channel and language; a changed wording is a new version, never an edit. */
export const messageTemplates = mysqlTable(
	'message_templates',
	{
		id: recordId().primaryKey(),
		organisationId: recordId()
			.notNull()
			.references(() => organisations.id),
		kind: asciiWord({ length: 32 }).$type<MessageKind>().notNull(),
		channel: asciiWord({ length: 6 }).$type<Channel>().notNull(),
		language: asciiWord({ length: 5 }).$type<Language>().notNull(),
		version: int().notNull(),
		/** Mail only. */
		subject: varchar({ length: 200 }),
		body: text().notNull(),
		standing: asciiWord({ length: 10 }).$type<'draft' | 'reviewed'>().notNull(),
		reviewedBy: varchar({ length: 120 }),
		isCurrent: boolean(),
		createdBy: recordId(),
		createdAt: instant().notNull()
	},
	(t) => [
		uniqueIndex('message_templates_version').on(t.organisationId, t.kind, t.channel, t.language, t.version),
		uniqueIndex('message_templates_current').on(t.organisationId, t.kind, t.channel, t.language, t.isCurrent)
	]
);

/** The outbox: one row is one message to one carer over one channel. */
export const messages = mysqlTable(
	'messages',
	{
		id: recordId().primaryKey(),
		/** Null only for mail to the organisation's own people, and for answers to a number of no family until it has one. */
		followUpId: recordId().references(() => followUps.id),
		siteId: recordId()
			.notNull()
			.references(() => sites.id),
		carerId: recordId().references(() => carers.id),
		kind: asciiWord({ length: 32 }).$type<MessageKind>().notNull(),
		/** What it is about: a visit id, a date, a check-in id. */
		occasion: asciiWord({ length: 60 }).notNull(),
		channel: asciiWord({ length: 6 }).$type<Channel>().notNull(),
		language: asciiWord({ length: 5 }).$type<Language>().notNull(),
		/** Follow-up, kind, occasion, carer and channel in one word: the same message is never planned twice. */
		dedupeKey: asciiWord({ length: 160 }).notNull(),
		/** Wording used, set when rendered for sending. */
		templateId: recordId(),
		/** Ids and facts the wording needs beside the follow-up; no names, no numbers, no rendered text. */
		facts: json().$type<Record<string, string>>().notNull(),

		state: asciiWord({ length: 12 }).$type<MessageState>().notNull(),
		/** 0 urgent, 5 ordinary, 9 can wait. */
		priority: int().notNull(),
		/** Not sent before; moved on by quiet hours, retries and withdrawals of a provider. */
		runAt: instant().notNull(),
		/** Not sent after. */
		expiresAt: instant().notNull(),

		/** Worker and number of its claim, so no two claims share it; whoever finishes must name it. Cleared with the lease. */
		lockedBy: asciiWord({ length: 60 }),
		/** End of the lease by the database's clock; renewed while the worker lives. */
		lockedUntil: instant(),
		/** Grows with every claim; a message that keeps killing its worker is given up by it. */
		claims: int().notNull().default(0),
		/** Calls that failed or left no trace at the provider; drives the back-off. A stop by signal does not count. */
		attempts: int().notNull().default(0),
		/** The call may have begun, by the database's clock; set before it, cleared when it is known not to have been made. */
		callBeganAt: instant(),
		/** Where that call was addressed, so that a lost answer is looked for there even if the carer's number changes. */
		address: varchar({ length: 200 }),
		lastError: varchar({ length: 300 }),

		/** The provider's id, set when the send is recorded. */
		providerId: asciiWord({ length: 80 }),
		sentAt: instant(),
		/** Last known delivery status; moves forward only. */
		delivery: asciiWord({ length: 16 }),
		deliveryAt: instant(),
		deliveryError: varchar({ length: 120 }),
		/** Owes a fallback from here on; cleared once delivered, and when the next route is planned or the desk told. */
		unprovenSince: instant(),
		/** The fallback was planned; set once. */
		fellBackAt: instant(),
		createdAt: instant().notNull(),
		updatedAt: instant().notNull()
	},
	(t) => [
		uniqueIndex('messages_dedupe').on(t.dedupeKey),
		// All equal down to run_at, so that a claim reads only due rows, in order, of one site: no filesort, nothing else locked.
		index('messages_claim').on(t.state, t.channel, t.priority, t.siteId, t.runAt, t.id),
		index('messages_lease').on(t.state, t.lockedUntil),
		index('messages_follow_up').on(t.followUpId, t.runAt),
		index('messages_provider').on(t.providerId),
		index('messages_unproven').on(t.unprovenSince)
	]
);

/** What providers told us, verified and stored before it is acted on. */
export const providerEvents = mysqlTable(
	'provider_events',
	{
		id: recordId().primaryKey(),
		provider: asciiWord({ length: 10 }).$type<'sms' | 'mail'>().notNull(),
		eventKey: asciiWord({ length: 120 }).notNull(),
		kind: asciiWord({ length: 12 }).$type<'delivery' | 'inbound'>().notNull(),
		payload: json().$type<Record<string, string>>().notNull(),
		receivedAt: instant().notNull(),
		handledAt: instant()
	},
	(t) => [
		uniqueIndex('provider_events_once').on(t.provider, t.eventKey),
		index('provider_events_waiting').on(t.handledAt, t.receivedAt)
	]
);

/** The thread with a family: what came in, and what staff wrote by hand. Planned messages are in `messages`. */
export const threadEntries = mysqlTable(
	'thread_entries',
	{
		id: recordId().primaryKey(),
		/** Null while the sender has to say which newborn is meant, or a desk whose words they are (`stray_texts`). */
		followUpId: recordId().references(() => followUps.id),
		carerId: recordId().references(() => carers.id),
		phone: asciiWord({ length: 20 }),
		direction: asciiWord({ length: 4 }).$type<'in' | 'out'>().notNull(),
		body: text().notNull(),
		/** What the words were understood as. */
		understoodAs: asciiWord({ length: 20 }),
		isAlarming: boolean().notNull().default(false),
		staffId: recordId(),
		messageId: recordId(),
		/** The provider's id of an incoming message, once. */
		providerId: asciiWord({ length: 80 }),
		readAt: instant(),
		readBy: recordId(),
		at: instant().notNull()
	},
	(t) => [
		uniqueIndex('thread_entries_provider').on(t.providerId),
		index('thread_entries_follow_up').on(t.followUpId, t.at),
		index('thread_entries_phone').on(t.phone, t.at)
	]
);

/** Circuit breaker and rate of one sender, shared by every worker. */
export const senders = mysqlTable('senders', {
	/** `sms` or `mail`, or a number of its own. */
	id: asciiWord({ length: 40 }).primaryKey(),
	/** No call before this instant: the breaker is open, or the provider asked for a pause. */
	pausedUntil: instant(),
	/** Failures that were the provider's, not the message's; a success ends the row. */
	failuresInARow: int().notNull().default(0),
	/** Everything granted so far is paid off at the sender's rate by then; grants may run ahead of it by the burst. */
	rateFreeAt: instant()
});

export const workers = mysqlTable('workers', {
	id: asciiWord({ length: 60 }).primaryKey(),
	startedAt: instant().notNull(),
	heardAt: instant().notNull(),
	stoppedAt: instant()
});

/** The last run of each periodic job: one process at a time, and a run missed while every process was down is made up. */
export const ticks = mysqlTable('ticks', {
	name: asciiWord({ length: 40 }).primaryKey(),
	/** When the last run began. */
	lastRunAt: instant().notNull(),
	lastTookMilliseconds: int(),
	lastError: varchar({ length: 300 }),
	/** The process at work on it, until its lease ends by the database's clock. */
	lockedBy: asciiWord({ length: 60 }),
	lockedUntil: instant()
});

/** What the watch found and has not seen settled. */
export const watchFindings = mysqlTable(
	'watch_findings',
	{
		id: recordId().primaryKey(),
		kind: asciiWord({ length: 32 }).$type<FindingKind>().notNull(),
		subject: asciiWord({ length: 80 }).notNull(),
		siteId: recordId(),
		detail: varchar({ length: 300 }).notNull(),
		foundAt: instant().notNull(),
		mailedAt: instant(),
		settledAt: instant()
	},
	(t) => [
		index('watch_findings_open').on(t.settledAt, t.kind),
		index('watch_findings_subject').on(t.kind, t.subject)
	]
);

/** A private calendar feed of one staff member and clinic; the token is kept as its hash. */
export const calendarFeeds = mysqlTable(
	'calendar_feeds',
	{
		id: recordId().primaryKey(),
		staffId: recordId().notNull(),
		siteId: recordId()
			.notNull()
			.references(() => sites.id),
		tokenHash: asciiWord({ length: 64 }).notNull(),
		createdAt: instant().notNull(),
		revokedAt: instant()
	},
	(t) => [uniqueIndex('calendar_feeds_token').on(t.tokenHash), index('calendar_feeds_staff').on(t.staffId)]
);
