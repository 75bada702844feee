import { sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { ALERT_URGENCY } from '../../domain/followup/alert';
import { isUrgentDisposition } from '../../domain/followup/transition';
import type { Assessment } from '../../domain/guideline/types';
import type { Ctx } from '../context';
import {
	listMarks,
	listOwedAlerts,
	listOwedSteps,
	type Marks,
	type OwedAlertRow,
	type OwedStepRow
} from '../repos/waiting';
import { assessmentInputOf, assessRecord, lastLeftAt } from './assessment';

type Card = Pick<OwedStepRow, 'followUp' | 'newborn' | 'clinic'>;

/** One thing owed: the next step of a follow-up or an alert beside it. */
export interface Owed {
	readonly id: string;
	readonly what:
		| { readonly is: 'step'; readonly kind: NonNullable<OwedStepRow['followUp']['nextStep']> }
		| { readonly is: 'alert'; readonly kind: OwedAlertRow['alert']['kind'] };
	readonly why: string;
	readonly dueAt: Date;
	/** True where it has climbed to this person by name. */
	readonly isByName: boolean;
	/** 0 must come first, whatever its time; 1 by its due time. */
	readonly rank: 0 | 1;
}

/** A newborn that waits for this pediatrician, with all that is owed and what lies on its hour line. */
export type WaitingNewborn = ReturnType<typeof cardOf> & { readonly owed: readonly Owed[] };

function stepOf({ followUp }: Card, assessment: Assessment | null, staffId: string): Owed[] {
	if (!followUp.nextStep || !followUp.nextStepDueAt) return [];
	const isUrgent =
		followUp.nextStep === 'decide' && assessment !== null && isUrgentDisposition(assessment.disposition);
	return [
		{
			id: `step ${followUp.id}`,
			what: { is: 'step', kind: followUp.nextStep },
			why: followUp.nextStepClimb > 0 ? 'It was not done in time and climbed.' : '',
			dueAt: followUp.nextStepDueAt,
			isByName: followUp.nextStepStaffId === staffId,
			rank: isUrgent ? 0 : 1
		}
	];
}

const alertOf = ({ alert }: OwedAlertRow, staffId: string): Owed => ({
	id: alert.id,
	what: { is: 'alert', kind: alert.kind },
	why: alert.detail,
	dueAt: alert.dueAt,
	isByName: alert.staffId === staffId,
	rank: ALERT_URGENCY[alert.kind] === 0 ? 0 : 1
});

function cardOf({ followUp, newborn, clinic }: Card, marks: Marks, now: Date) {
	const mine = marks.visits.filter((visit) => visit.followUpId === followUp.id);
	const record = {
		newborn,
		carers: [],
		weights: [],
		measurements: marks.measurements.filter((one) => one.newbornId === newborn.id),
		phototherapy: marks.phototherapy.filter((one) => one.newbornId === newborn.id)
	};
	const asked = {
		standard: followUp.standard,
		dischargeAt: lastLeftAt(followUp, record),
		now
	};
	const assessed = assessRecord(record, asked);
	return {
		followUpId: followUp.id,
		familyName: newborn.familyName,
		givenName: newborn.givenName,
		recordNumber: newborn.recordNumber,
		stage: followUp.stage,
		round: followUp.round,
		clinicName: clinic.name,
		timeZone: clinic.timeZone,
		window:
			followUp.windowFromAt && followUp.windowUntilAt
				? {
						from: followUp.windowFromAt,
						until: followUp.windowUntilAt,
						test: followUp.windowTest ?? undefined
					}
				: null,
		input: assessmentInputOf(record, asked),
		assessment: assessed.ok ? assessed.value : null,
		visits: mine.map(({ startsAt, kind, state, round }) => ({ startsAt, kind, state, round })),
		checkIns: marks.checkIns
			.filter((one) => one.followUpId === followUp.id)
			.map(({ at, result }) => ({ at, result })),
		phototherapy: record.phototherapy.map(({ startedAt, endedAt, setting }) => ({
			startedAt,
			endedAt,
			setting
		}))
	};
}

const byUrgency = (a: Owed, b: Owed): number => a.rank - b.rank || a.dueAt.getTime() - b.dueAt.getTime();

/** Newborns in the order in which they should be taken: what cannot wait first, then by the due time. */
export function inOrder<Row extends { readonly owed: readonly Owed[] }>(rows: readonly Row[]): Row[] {
	return [...rows].sort((a, b) => {
		const [first] = a.owed;
		const [second] = b.owed;
		return first && second ? byUrgency(first, second) : 0;
	});
}

/**
 * All next steps and alerts that pediatricians of the actor's clinics owe, or the actor by name after a climb: one
 * entry a newborn, the most urgent first.
 */
export async function listWaiting(ctx: Ctx, actor: StaffActor): Promise<WaitingNewborn[]> {
	const { staffId } = actor;
	const asked = { clinicIds: sitesWhere(actor, 'waiting.view'), staffId };
	if (asked.clinicIds.length === 0) return [];
	const steps = await listOwedSteps(ctx.db, asked);
	const alerts = await listOwedAlerts(ctx.db, asked);
	const cards = new Map<string, Card>([...alerts, ...steps].map((row) => [row.followUp.id, row]));
	const marks = await listMarks(
		ctx.db,
		[...cards.values()].map(({ newborn }) => newborn.id),
		[...cards.keys()]
	);
	const now = ctx.clock.now();
	const withStep = new Set(steps.map(({ followUp }) => followUp.id));
	const rows = [...cards.values()].map((card) => {
		const row = cardOf(card, marks, now);
		const own = alerts.filter(({ followUp }) => followUp.id === row.followUpId);
		const step = withStep.has(row.followUpId) ? stepOf(card, row.assessment, staffId) : [];
		return { ...row, owed: [...step, ...own.map((one) => alertOf(one, staffId))].sort(byUrgency) };
	});
	return inOrder(rows);
}
