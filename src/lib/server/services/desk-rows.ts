import type { HourLineModel } from '../../ui/hour-line/model';
import type { AlertView, CarerView, DeskRow, LastContact, VisitView } from '../../schemas/desk-view';
import type { AlertRow, DeskFacts } from '../repos/queue';
import type { VisitRow } from '../repos/follow-ups';
import type { CarerRow } from '../repos/newborns';
import { windowCounts } from '../../domain/followup/desk-queue';
import { REFUSED_STATUSES } from '../../domain/messaging/delivery';
import { deskHourLine } from './desk-hour-line';
import { canMail, canSms } from './message-plan';

const REFUSED: readonly (string | null)[] = REFUSED_STATUSES;

function groupBy<T>(rows: readonly T[], keyOf: (row: T) => string | null): Map<string, T[]> {
	const groups = new Map<string, T[]>();
	for (const row of rows) {
		const key = keyOf(row);
		if (key === null) continue;
		const group = groups.get(key);
		if (group) group.push(row);
		else groups.set(key, [row]);
	}
	return groups;
}

export const carerView = (carer: CarerRow): CarerView => ({
	id: carer.id,
	name: carer.name,
	relation: carer.relation,
	phone: carer.phone,
	email: carer.email,
	language: carer.language,
	takesSms: canSms(carer),
	takesMail: canMail(carer)
});

export const alertView = ({ id, kind, detail, role, climb, dueAt }: AlertRow): AlertView => ({
	id,
	kind,
	detail,
	role,
	climb,
	dueAt
});

const visitView = (visit: VisitRow): VisitView => ({
	id: visit.id,
	kind: visit.kind,
	state: visit.state,
	startsAt: visit.startsAt,
	isOutsideWindow: visit.isOutsideWindow,
	otherTimeAskedAt: visit.otherTimeAskedAt,
	otherTimeWish: visit.otherTimeWish
});

const byTime = (a: { readonly at: Date }, b: { readonly at: Date }) => a.at.getTime() - b.at.getTime();

interface Happenings {
	readonly visits: readonly VisitRow[];
	readonly attempts: DeskFacts['attempts'];
	readonly checkIns: DeskFacts['checkIns'];
	readonly messages: DeskFacts['messages'];
	readonly words: DeskFacts['words'];
}

function contacts(of: Happenings): LastContact[] {
	return [
		...of.attempts.map(({ at, channel, outcome }) => ({ kind: 'attempt' as const, at, channel, outcome })),
		...of.checkIns.map(({ at, result }) => ({ kind: 'check-in' as const, at, result })),
		...of.words.map(({ at }) => ({ kind: 'words' as const, at })),
		...of.messages.flatMap(({ at, channel }) =>
			at ? [{ kind: channel === 'sms' ? ('text-sent' as const) : ('mail-sent' as const), at }] : []
		),
		...of.visits.flatMap(({ confirmedAt }) =>
			confirmedAt ? [{ kind: 'confirmed' as const, at: confirmedAt }] : []
		)
	];
}

function messagesOf(of: Happenings): NonNullable<HourLineModel['messages']> {
	const sent = of.messages.flatMap(({ at, channel, delivery }) =>
		at ? [{ at, direction: 'to-family' as const, channel, failed: REFUSED.includes(delivery) }] : []
	);
	const came = of.words.map(({ at }) => ({ at, direction: 'from-family' as const, channel: 'sms' as const }));
	const calls = of.attempts.flatMap(({ at, channel, outcome }) =>
		channel === 'call'
			? [{ at, direction: 'to-family' as const, channel: 'call' as const, failed: outcome !== 'reached' }]
			: []
	);
	return [...sent, ...came, ...calls].sort(byTime);
}

/** One row for each follow-up of the facts, in the order of `ids`; ids that were not found are left out. */
export function deskRows(
	facts: DeskFacts,
	{ ids, alerts, now }: { ids: readonly string[]; alerts: readonly AlertRow[]; now: Date }
): DeskRow[] {
	const byFollowUp = new Map(facts.found.map((found) => [found.followUp.id, found]));
	const carers = groupBy(facts.carers, (c) => c.newbornId);
	const values = groupBy(facts.measurements, (m) => m.newbornId);
	const courses = groupBy(facts.phototherapy, (c) => c.newbornId);
	const visits = groupBy(facts.visits, (v) => v.followUpId);
	const attempts = groupBy(facts.attempts, (a) => a.followUpId);
	const checkIns = groupBy(facts.checkIns, (c) => c.followUpId);
	const messages = groupBy(facts.messages, (m) => m.followUpId);
	const words = groupBy(facts.words, (w) => w.followUpId);
	const owed = groupBy(alerts, (a) => a.followUpId);
	return ids.flatMap((id) => {
		const found = byFollowUp.get(id);
		if (!found) return [];
		const newbornId = found.newborn.id;
		return deskRow({
			...found,
			now,
			alerts: owed.get(id) ?? [],
			carers: carers.get(newbornId) ?? [],
			values: values.get(newbornId) ?? [],
			phototherapy: courses.get(newbornId) ?? [],
			visits: visits.get(id) ?? [],
			attempts: attempts.get(id) ?? [],
			checkIns: checkIns.get(id) ?? [],
			messages: messages.get(id) ?? [],
			words: words.get(id) ?? []
		});
	});
}

type RowFacts = DeskFacts['found'][number] &
	Happenings & {
		readonly now: Date;
		readonly alerts: readonly AlertRow[];
		readonly carers: readonly CarerRow[];
		readonly values: DeskFacts['measurements'];
		readonly phototherapy: DeskFacts['phototherapy'];
	};

function windowOf({ followUp }: RowFacts): DeskRow['window'] {
	const { stage, windowFromAt, windowUntilAt, windowTest } = followUp;
	if (!windowFromAt || !windowUntilAt || !windowCounts(stage)) return null;
	return { from: windowFromAt, until: windowUntilAt, test: windowTest ?? 'judgement' };
}

function nextStepOf({ followUp: f }: RowFacts): DeskRow['nextStep'] {
	if (!f.nextStep || !f.nextStepRole || !f.nextStepDueAt) return null;
	return { kind: f.nextStep, role: f.nextStepRole, climb: f.nextStepClimb, dueAt: f.nextStepDueAt };
}

function hourLineOf(row: RowFacts): HourLineModel {
	const { followUp, newborn, timeZone, now } = row;
	const { windowFromAt: from, windowUntilAt: until, windowTest: test } = followUp;
	const byStart = [...row.visits].sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
	const latest = row.values.reduce<RowFacts['values'][number] | null>(
		(last, value) => (last && last.measuredAt > value.measuredAt ? last : value),
		null
	);
	const wasSeen = row.visits.some((v) => v.state === 'arrived' && v.round === followUp.round);
	return deskHourLine({
		followUp,
		newborn,
		timeZone,
		now,
		latest,
		phototherapy: row.phototherapy,
		window: from && until ? { from, until, test: test ?? 'judgement', met: wasSeen } : null,
		visits: byStart.map(({ startsAt, kind, state }) => ({ at: startsAt, kind, state })),
		messages: messagesOf(row),
		checkIns: row.checkIns.map(({ at, result }) => ({ at, result })).sort(byTime)
	});
}

function deskRow(row: RowFacts): DeskRow {
	const { followUp, newborn, timeZone } = row;
	const open = row.visits.find((visit) => visit.isOpen);
	return {
		followUpId: followUp.id,
		clinicId: followUp.clinicId,
		timeZone,
		givenName: newborn.givenName,
		familyName: newborn.familyName,
		recordNumber: newborn.recordNumber,
		bornAt: newborn.bornAt,
		bornOn: newborn.bornOn,
		stage: followUp.stage,
		nextStep: nextStepOf(row),
		window: windowOf(row),
		visit: open ? visitView(open) : null,
		alerts: [...row.alerts].sort((a, b) => a.dueAt.getTime() - b.dueAt.getTime()).map(alertView),
		carers: [...row.carers].sort((a, b) => a.callOrder - b.callOrder).map(carerView),
		lastContact: contacts(row).sort(byTime).at(-1) ?? null,
		hourLine: hourLineOf(row)
	};
}
