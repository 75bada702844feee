import { can, type Action } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { recommendedDecision, type RecommendedDecision } from '../../domain/followup/recommended';
import { directFraction } from '../../domain/guideline';
import type {
	Assessment,
	AssessmentInput,
	DirectFractionFinding,
	Refusal
} from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import { notFound, type AppError } from '../errors';
import { findNewbornRecord, type MeasurementRow } from '../repos/newborns';
import {
	findFollowUpPage,
	listAllMeasurements,
	listHappenings,
	listMergeTargets,
	staffNames,
	type FollowUpPageRow,
	type Happenings
} from '../repos/newborn-view';
import { assessmentInputOf, assessRecord, lastLeftAt } from './assessment';

/** What this person may do on the page; every part that is not allowed is not sent to the browser at all. */
export interface MayDo {
	readonly seeValues: boolean;
	readonly recordValues: boolean;
	readonly decide: boolean;
	readonly settle: boolean;
	readonly seeThread: boolean;
}

const asks: Readonly<Record<keyof MayDo, Action>> = {
	seeValues: 'values.view',
	recordValues: 'values.record',
	decide: 'follow-up.decide',
	settle: 'alert.settle',
	seeThread: 'thread.view'
};

function mayDo(actor: StaffActor, page: FollowUpPageRow): MayDo {
	const { followUp, organisation } = page;
	const resource = {
		organisationId: organisation.id,
		birthSiteId: followUp.birthSiteId,
		clinicId: followUp.clinicId
	};
	const may = (action: Action) => can(actor, action, resource);
	return {
		seeValues: may(asks.seeValues),
		recordValues: may(asks.recordValues),
		decide: may(asks.decide),
		settle: may(asks.settle),
		seeThread: may(asks.seeThread)
	};
}

export interface ValuesView {
	readonly input: AssessmentInput;
	readonly assessment: Assessment | null;
	/** Why the standard gives no result, with what to do instead. */
	readonly refusals: readonly Refusal[];
	readonly liver: DirectFractionFinding;
	readonly recommended: RecommendedDecision | null;
}

type NamedMeasurement = MeasurementRow & { readonly recordedByName: string | null };

function namesAskedFor(
	{ followUp }: FollowUpPageRow,
	things: Happenings,
	values: readonly MeasurementRow[]
): string[] {
	const ids = [
		followUp.nextStepStaffId,
		...values.map((one) => one.recordedBy),
		...things.attempts.map((one) => one.staffId),
		...things.decisions.map((one) => one.decidedBy),
		...things.alerts.flatMap((one) => [one.staffId, one.settledBy]),
		...things.words.map((one) => one.staffId),
		...things.transitions.map((one) => (one.actorKind === 'staff' ? one.actorId : null))
	];
	return ids.filter((id) => id !== null);
}

/**
 * One newborn's page for this person: everything of the follow-up that the table of permissions lets them see.
 * Without the right to the values only the latest one is given; without the right to the thread, no messages.
 * @returns not found also where it belongs to other sites
 */
export async function getNewbornView(ctx: Ctx, actor: StaffActor, followUpId: string) {
	const page = await findFollowUpPage(ctx.db, followUpId);
	if (!page || !can(actor, 'follow-up.view', resourceOfPage(page))) return err(notFound);
	const record = await findNewbornRecord(ctx.db, page.newborn.id);
	if (!record) return err(notFound);
	const may = mayDo(actor, page);
	const now = ctx.clock.now();
	const all = await listAllMeasurements(ctx.db, page.newborn.id);
	const things = await listHappenings(ctx.db, followUpId);
	const names = await staffNames(ctx.db, namesAskedFor(page, things, all));
	const nameOf = (id: string | null) => (id === null ? null : (names.get(id) ?? null));
	const values = valuesView(page, record, now);
	const named = all.map((one): NamedMeasurement => ({ ...one, recordedByName: nameOf(one.recordedBy) }));
	const carerNames = new Map(record.carers.map((carer) => [carer.id, carer.name]));
	const carerName = (id: string | null) => (id === null ? null : (carerNames.get(id) ?? null));
	const targets = may.decide ? await mergeTargets(ctx, page) : [];
	return ok({
		now,
		may,
		page: summaryOfPage(page, nameOf),
		carers: may.seeThread ? record.carers : [],
		weights: may.seeValues ? record.weights : [],
		phototherapy: record.phototherapy,
		measurements: may.seeValues ? named : named.filter((one) => one.status === 'final').slice(-1),
		values: may.seeValues ? values : null,
		latest: latestDifference(values),
		visits: things.visits,
		alerts: things.alerts.map((one) => ({
			...one,
			staffName: nameOf(one.staffId),
			settledByName: nameOf(one.settledBy)
		})),
		checkIns: things.checkIns.map((one) => ({ ...one, carerName: carerName(one.carerId) })),
		attempts: may.seeThread
			? things.attempts.map((one) => ({
					...one,
					carerName: carerName(one.carerId),
					staffName: nameOf(one.staffId)
				}))
			: [],
		messages: may.seeThread ? things.messages.map((one) => messageView(one, carerName(one.carerId))) : [],
		words: may.seeThread
			? things.words.map((one) => ({
					id: one.id,
					at: one.at,
					direction: one.direction,
					body: one.body,
					isAlarming: one.isAlarming,
					name: carerName(one.carerId) ?? nameOf(one.staffId)
				}))
			: [],
		decisions: may.seeValues
			? things.decisions.map(({ assessment: _kept, ...one }) => ({
					...one,
					decidedByName: nameOf(one.decidedBy)
				}))
			: [],
		transitions: things.transitions.map((one) => ({
			id: one.id,
			kind: one.kind,
			fromStage: one.fromStage,
			toStage: one.toStage,
			at: one.at,
			why: may.seeValues || !CLINICAL_WHY.has(one.kind) ? one.why : null,
			by:
				one.actorKind === 'staff'
					? (nameOf(one.actorId) ?? 'A former member of staff')
					: one.actorKind === 'carer'
						? (carerName(one.actorId) ?? 'The family')
						: 'Fadewell, by itself'
		})),
		mergeTargets: targets
	});
}

/** The reasons of these are clinical and belong to those who may see the values. */
const CLINICAL_WHY = new Set([
	'accepted',
	'overridden',
	'value-recorded',
	'treatment-ended',
	'closed',
	'reopened'
]);

const resourceOfPage = ({ followUp, organisation }: FollowUpPageRow) => ({
	organisationId: organisation.id,
	birthSiteId: followUp.birthSiteId,
	clinicId: followUp.clinicId
});

const mergeTargets = (ctx: Ctx, { followUp, newborn }: FollowUpPageRow) =>
	listMergeTargets(ctx.db, {
		followUpId: followUp.id,
		clinicId: followUp.clinicId,
		bornAt: newborn.bornAt,
		familyName: newborn.familyName
	});

function valuesView(
	{ followUp }: FollowUpPageRow,
	record: NonNullable<Awaited<ReturnType<typeof findNewbornRecord>>>,
	now: Date
): ValuesView {
	const asked = {
		standard: followUp.standard,
		dischargeAt: lastLeftAt(followUp, record),
		now
	};
	const input = assessmentInputOf(record, asked);
	const assessed = assessRecord(record, asked);
	return {
		input,
		assessment: assessed.ok ? assessed.value : null,
		refusals: assessed.ok ? [] : assessed.error,
		liver: assessed.ok ? assessed.value.directFraction : directFraction(input),
		recommended: assessed.ok ? recommendedDecision(assessed.value, now) : null
	};
}

/** The last value's distance to the line, for those who see only that one. */
function latestDifference({ assessment }: ValuesView) {
	const last = assessment?.measurements.at(-1);
	return last ? { difference: last.difference, unit: last.thresholds.unit, trusted: last.trusted } : null;
}

function summaryOfPage(page: FollowUpPageRow, nameOf: (id: string | null) => string | null) {
	const { followUp, newborn, clinic, birthSite, organisation } = page;
	const { windowFromAt, windowUntilAt, windowTest } = followUp;
	return {
		followUpId: followUp.id,
		version: followUp.version,
		stage: followUp.stage,
		round: followUp.round,
		standard: followUp.standard,
		plannedDischargeAt: followUp.plannedDischargeAt,
		handedOverAt: followUp.handedOverAt,
		window:
			windowFromAt && windowUntilAt
				? { from: windowFromAt, until: windowUntilAt, test: windowTest ?? ('judgement' as const) }
				: null,
		laterCheckAt: followUp.laterCheckAt,
		laterCheckAsks: followUp.laterCheckAsks,
		outcome: followUp.outcome,
		closedAt: followUp.closedAt,
		mergedIntoId: followUp.mergedIntoId,
		nextStep:
			followUp.nextStep && followUp.nextStepRole && followUp.nextStepDueAt
				? {
						kind: followUp.nextStep,
						role: followUp.nextStepRole,
						dueAt: followUp.nextStepDueAt,
						climb: followUp.nextStepClimb,
						siteName: followUp.nextStepSiteId === birthSite.id ? birthSite.name : clinic.name,
						staffName: nameOf(followUp.nextStepStaffId)
					}
				: null,
		newborn,
		clinic: {
			id: clinic.id,
			name: clinic.name,
			phone: clinic.phone,
			afterHoursPhone: clinic.afterHoursPhone,
			address: clinic.address,
			timeZone: clinic.timeZone,
			welfareCheck: clinic.policy.welfareCheck
		},
		birthSite,
		organisation
	};
}

function messageView(one: Happenings['messages'][number], carerName: string | null) {
	return {
		id: one.id,
		kind: one.kind,
		channel: one.channel,
		state: one.state,
		runAt: one.runAt,
		sentAt: one.sentAt,
		delivery: one.delivery,
		deliveryError: one.deliveryError,
		lastError: one.lastError,
		carerName
	};
}

export type NewbornView =
	Awaited<ReturnType<typeof getNewbornView>> extends Result<infer View, AppError> ? View : never;
