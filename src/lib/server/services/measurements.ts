import { and, eq } from 'drizzle-orm';
import type { StaffActor } from '../../domain/access/roles';
import type { MeasurementFacts } from '../../domain/followup/discharge';
import { isUrgentDisposition } from '../../domain/followup/transition';
import type { Assessment } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { measurements, weights } from '../db/schema/newborn';
import { invalid, notFound, type AppError } from '../errors';
import type { LoadedFollowUp } from '../repos/follow-ups';
import { findNewbornRecord } from '../repos/newborns';
import { advance } from './advance';
import { raiseAlert } from './alerts';
import { assessRecord, lastLeftAt } from './assessment';
import { changeFollowUp } from './change';

async function assessLoaded(tx: Tx, ctx: Ctx, loaded: LoadedFollowUp): Promise<Result<Assessment, AppError>> {
	const record = await findNewbornRecord(tx, loaded.row.newbornId);
	if (!record) return err(notFound);
	const dischargeAt = lastLeftAt(loaded.row, record);
	const assessed = assessRecord(record, { standard: loaded.row.standard, dischargeAt, now: ctx.clock.now() });
	const refusal = assessed.ok ? undefined : assessed.error[0];
	return assessed.ok
		? assessed
		: err(invalid(refusal?.message ?? 'This value cannot be assessed.', refusal?.field));
}

async function raiseDirectFraction(
	tx: Tx,
	ctx: Ctx,
	loaded: LoadedFollowUp,
	assessment: Assessment
): Promise<void> {
	if (assessment.directFraction.status !== 'raised') return;
	await raiseAlert(tx, ctx, {
		followUpId: loaded.row.id,
		kind: 'direct-fraction-raised',
		role: 'pediatrician',
		siteId: loaded.row.clinicId,
		dueAt: new Date(ctx.clock.now().getTime() + loaded.clinic.policy.decideHours * 3_600_000),
		detail: assessment.directFraction.text.slice(0, 500),
		dedupeKey: `direct-fraction ${loaded.row.id} ${loaded.row.round}`
	});
}

/** Enters a new value after the hand-over, assesses it, and puts the decision before the pediatrician. */
export function recordMeasurement(
	ctx: Ctx,
	actor: StaffActor,
	asked: {
		readonly followUpId: string;
		readonly measurement: MeasurementFacts;
		readonly weightGrams?: number | null;
	}
): Promise<Result<Assessment, AppError>> {
	const { followUpId, measurement, weightGrams } = asked;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['values.record'] }, async (tx, loaded) => {
		const now = ctx.clock.now();
		const entered = { newbornId: loaded.row.newbornId, recordedAt: now, recordedBy: actor.staffId };
		const id = ctx.random.id();
		await tx.insert(measurements).values({ ...measurement, ...entered, id, status: 'final' });
		if (weightGrams) {
			await tx
				.insert(weights)
				.values({ ...entered, id: ctx.random.id(), grams: weightGrams, weighedAt: measurement.measuredAt });
		}
		const assessed = await assessLoaded(tx, ctx, loaded);
		if (!assessed.ok) return assessed;
		await raiseDirectFraction(tx, ctx, loaded, assessed.value);
		const isUrgent = isUrgentDisposition(assessed.value.disposition);
		const saved = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'value-recorded', isUrgent },
			{ actor, detail: { measurementId: id } }
		);
		return saved.ok ? assessed : saved;
	});
}

/** Strikes a value that was entered in error; it stays on record, marked. What it led to is decided anew. */
export function strikeMeasurement(
	ctx: Ctx,
	actor: StaffActor,
	asked: { readonly followUpId: string; readonly measurementId: string; readonly why: string }
): Promise<Result<null, AppError>> {
	const { followUpId, measurementId, why } = asked;
	return changeFollowUp(ctx, { actor, followUpId, actions: ['values.record'] }, async (tx, loaded) => {
		if (!why.trim()) return err(invalid('Say why this value is struck.', 'why'));
		const [struck] = await tx
			.update(measurements)
			.set({ status: 'entered-in-error', struckBecause: why })
			.where(
				and(
					eq(measurements.id, measurementId),
					eq(measurements.newbornId, loaded.row.newbornId),
					eq(measurements.status, 'final')
				)
			);
		if (struck.affectedRows !== 1) return err(notFound);
		const saved = await advance(
			tx,
			ctx,
			loaded,
			{ kind: 'value-recorded', isUrgent: false },
			{ actor, why, detail: { struck: measurementId } }
		);
		return saved.ok ? ok(null) : saved;
	});
}
