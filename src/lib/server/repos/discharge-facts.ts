import { and, eq, gt, inArray, notInArray } from 'drizzle-orm';
import { DateTime } from 'luxon';
import type { DischargeFacts } from '../../domain/followup/discharge';
import type { Ctx } from '../context';
import type { Tx } from '../db/client';
import { carers, measurements, newborns, phototherapyCourses, weights } from '../db/schema/newborn';
import type { MeasurementRow } from './newborns';

/** Columns of a newborn that the discharge form states. */
export function newbornColumns(facts: DischargeFacts) {
	return {
		recordNumber: facts.recordNumber,
		familyName: facts.familyName,
		givenName: facts.givenName,
		bornAt: facts.bornAt,
		birthTimeZone: facts.birthTimeZone,
		bornOn: DateTime.fromJSDate(facts.bornAt, { zone: facts.birthTimeZone }).toISODate() ?? '',
		gestationWeeks: facts.gestationalAge.weeks,
		gestationDays: facts.gestationalAge.days,
		feeding: facts.feeding,
		birthWeightGrams: facts.birthWeightGrams,
		neurotoxicityRisks: [...facts.neurotoxicityRisks],
		jaundiceRisks: [...facts.jaundiceRisks],
		albuminGramsPerDecilitre: facts.albuminGramsPerDecilitre,
		directAntiglobulin: facts.directAntiglobulin
	};
}

interface Saving {
	readonly newbornId: string;
	readonly facts: DischargeFacts;
	readonly staffId: string;
}

async function saveCarers(tx: Tx, ctx: Ctx, { newbornId, facts }: Saving): Promise<void> {
	const existing = await tx.select().from(carers).where(eq(carers.newbornId, newbornId));
	for (const [index, carer] of facts.carers.entries()) {
		const callOrder = index + 1;
		const old = existing.find((c) => c.callOrder === callOrder);
		const consentedAt =
			carer.consentsToSms || carer.consentsToMail ? (old?.consentedAt ?? ctx.clock.now()) : null;
		if (old)
			await tx
				.update(carers)
				.set({ ...carer, consentedAt })
				.where(eq(carers.id, old.id));
		else await tx.insert(carers).values({ ...carer, id: ctx.random.id(), newbornId, callOrder, consentedAt });
	}
	// A carer with messages on record stays as a row: taking a person out ends the consent instead.
	await tx
		.update(carers)
		.set({ consentsToSms: false, consentsToMail: false, phone: null, email: null })
		.where(and(eq(carers.newbornId, newbornId), gt(carers.callOrder, facts.carers.length)));
}

const isSame = (row: MeasurementRow, m: DischargeFacts['measurements'][number]) =>
	row.method === m.method &&
	row.measuredAt.getTime() === m.measuredAt.getTime() &&
	row.total === m.total &&
	row.direct === m.direct &&
	row.unit === m.unit;

/** A changed or removed value is struck and stays on record; what replaces it is a new row. */
async function saveMeasurements(tx: Tx, ctx: Ctx, { newbornId, facts, staffId }: Saving): Promise<void> {
	const rows = await tx
		.select()
		.from(measurements)
		.where(and(eq(measurements.newbornId, newbornId), eq(measurements.status, 'final')));
	const struck = rows.filter((row) => !facts.measurements.some((m) => isSame(row, m)));
	if (struck.length > 0) {
		await tx
			.update(measurements)
			.set({ status: 'entered-in-error', struckBecause: 'Corrected on the discharge form.' })
			.where(
				inArray(
					measurements.id,
					struck.map((row) => row.id)
				)
			);
	}
	const added = facts.measurements.filter((m) => !rows.some((row) => isSame(row, m)));
	if (added.length === 0) return;
	const recordedAt = ctx.clock.now();
	await tx.insert(measurements).values(
		added.map((m) => ({
			...m,
			id: ctx.random.id(),
			newbornId,
			status: 'final' as const,
			recordedAt,
			recordedBy: staffId
		}))
	);
}

async function saveWeights(tx: Tx, ctx: Ctx, { newbornId, facts, staffId }: Saving): Promise<void> {
	await tx.delete(weights).where(eq(weights.newbornId, newbornId));
	if (facts.weights.length === 0) return;
	const recordedAt = ctx.clock.now();
	await tx.insert(weights).values(
		facts.weights.map(({ weighedAt, grams }) => ({
			id: ctx.random.id(),
			newbornId,
			weighedAt,
			grams,
			recordedAt,
			recordedBy: staffId
		}))
	);
}

async function savePhototherapy(tx: Tx, ctx: Ctx, { newbornId, facts, staffId }: Saving): Promise<void> {
	const kept = facts.phototherapy.flatMap((course) => (course.id ? [course.id] : []));
	const ofNewborn = eq(phototherapyCourses.newbornId, newbornId);
	await tx
		.delete(phototherapyCourses)
		.where(kept.length > 0 ? and(ofNewborn, notInArray(phototherapyCourses.id, kept)) : ofNewborn);
	const recordedAt = ctx.clock.now();
	for (const { id, ...course } of facts.phototherapy) {
		if (id)
			await tx
				.update(phototherapyCourses)
				.set(course)
				.where(and(ofNewborn, eq(phototherapyCourses.id, id)));
		else
			await tx
				.insert(phototherapyCourses)
				.values({ ...course, id: ctx.random.id(), newbornId, recordedAt, recordedBy: staffId });
	}
}

/** Saves what hangs on a newborn, in the caller's transaction. */
export async function saveDischargeFacts(tx: Tx, ctx: Ctx, saving: Saving): Promise<void> {
	await saveCarers(tx, ctx, saving);
	await saveMeasurements(tx, ctx, saving);
	await saveWeights(tx, ctx, saving);
	await savePhototherapy(tx, ctx, saving);
}

export async function insertNewborn(
	tx: Tx,
	ctx: Ctx,
	asked: { readonly organisationId: string; readonly birthSiteId: string; readonly facts: DischargeFacts }
): Promise<string> {
	const id = ctx.random.id();
	const { facts, ...owner } = asked;
	await tx.insert(newborns).values({ ...owner, ...newbornColumns(facts), id, createdAt: ctx.clock.now() });
	return id;
}

export async function updateNewborn(tx: Tx, newbornId: string, facts: DischargeFacts): Promise<void> {
	await tx.update(newborns).set(newbornColumns(facts)).where(eq(newborns.id, newbornId));
}
