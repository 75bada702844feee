import { can, type Resource } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import type { CarerFacts, DischargeFacts } from '../../domain/followup/discharge';
import type { StandardId } from '../../domain/guideline/types';
import { err, ok, type Result } from '../../domain/result';
import { recordAccess } from '../audit/record';
import type { Ctx } from '../context';
import { notAllowed, notFound, type AppError } from '../errors';
import { findDischargePage, findOrganisationRules, listDischargeParts } from '../repos/discharge-pages';
import type { DischargePageRow } from '../repos/discharge-pages';
import { findNewbornRecord, type CarerRow, type NewbornRecord } from '../repos/newborns';
import { listSites, type Site } from '../repos/sites';
import { windowOf } from './discharge-list';

export const dischargeResource = ({ newborn, unit, clinic }: DischargePageRow): Resource => ({
	organisationId: newborn.organisationId,
	birthSiteId: unit.id,
	clinicId: clinic.id
});

export interface DischargeSetting {
	readonly now: Date;
	readonly standard: StandardId;
	readonly unit: SiteView;
	/** Every birth unit at which the actor enters newborns, the one of this page among them. */
	readonly units: readonly SiteView[];
	readonly clinics: readonly SiteView[];
}

interface SiteView {
	readonly id: string;
	readonly name: string;
	readonly timeZone: string;
}

const siteView = ({ id, name, timeZone }: Site) => ({ id, name, timeZone });

/**
 * What a new discharge starts from: a birth unit (the first that the actor may enter at, or the one asked for), the
 * clinics that may go with it, and the standard.
 */
export async function startDischarge(
	ctx: Ctx,
	actor: StaffActor,
	asked: { readonly unitId?: string | null; readonly familyOf?: string | null } = {}
): Promise<Result<DischargeSetting & { readonly family: readonly CarerFacts[] }, AppError>> {
	const rules = await findOrganisationRules(ctx.db, actor.organisationId);
	const sites = await listSites(ctx.db, actor.organisationId);
	const { organisationId } = actor;
	const clinicsFor = (birthSiteId: string): Site[] =>
		sites.filter(
			({ id: clinicId, kind }) =>
				kind === 'clinic' && can(actor, 'discharge.enter', { organisationId, birthSiteId, clinicId })
		);
	const units = sites.filter(({ id, kind }) => kind === 'birth-unit' && clinicsFor(id).length > 0);
	const unit = units.find(({ id }) => id === asked.unitId) ?? units[0];
	if (!rules || !unit) return err(notAllowed);
	return ok({
		now: ctx.clock.now(),
		standard: rules.standard,
		unit: siteView(unit),
		units: units.map(siteView),
		clinics: clinicsFor(unit.id).map(siteView),
		family: asked.familyOf ? await familyOf(ctx, actor, asked.familyOf) : []
	});
}

/** The carers of a twin, where the actor may edit that discharge too. */
async function familyOf(ctx: Ctx, actor: StaffActor, followUpId: string): Promise<CarerFacts[]> {
	const page = await findDischargePage(ctx.db, followUpId);
	if (!page || !can(actor, 'discharge.edit', dischargeResource(page))) return [];
	const record = await findNewbornRecord(ctx.db, page.newborn.id);
	return record?.carers.map(carerFacts) ?? [];
}

const carerFacts = (row: CarerRow): CarerFacts => ({
	name: row.name,
	relation: row.relation,
	phone: row.phone,
	email: row.email,
	language: row.language,
	consentsToSms: row.consentsToSms,
	consentsToMail: row.consentsToMail
});

/** Somebody taken out of the form stays on record without a way to reach them; the first person always shows. */
const isStillFamily = (row: CarerRow): boolean =>
	row.callOrder === 1 || row.phone !== null || row.email !== null || row.consentsToSms || row.consentsToMail;

/** The record in the form in which a nurse states it. */
export function factsOf(page: DischargePageRow, record: NewbornRecord): DischargeFacts {
	const { newborn } = record;
	return {
		recordNumber: newborn.recordNumber,
		familyName: newborn.familyName,
		givenName: newborn.givenName,
		bornAt: newborn.bornAt,
		birthTimeZone: newborn.birthTimeZone,
		gestationalAge: { weeks: newborn.gestationWeeks, days: newborn.gestationDays },
		feeding: newborn.feeding,
		birthWeightGrams: newborn.birthWeightGrams,
		weights: record.weights.map(({ id, weighedAt, grams }) => ({ id, weighedAt, grams })),
		neurotoxicityRisks: newborn.neurotoxicityRisks,
		jaundiceRisks: newborn.jaundiceRisks,
		albuminGramsPerDecilitre: newborn.albuminGramsPerDecilitre,
		directAntiglobulin: newborn.directAntiglobulin,
		measurements: record.measurements.map(({ id, method, measuredAt, total, direct, unit }) => ({
			id,
			method,
			measuredAt,
			total,
			direct,
			unit
		})),
		phototherapy: record.phototherapy.map(({ id, startedAt, endedAt, setting }) => ({
			id,
			startedAt,
			endedAt,
			setting
		})),
		plannedDischargeAt: page.followUp.plannedDischargeAt,
		clinicId: page.clinic.id,
		carers: record.carers.filter(isStillFamily).map(carerFacts)
	};
}

/** One discharge as its page shows it. Looking is recorded. @returns not found also where it is of other sites */
export async function getDischarge(ctx: Ctx, actor: StaffActor, followUpId: string) {
	const page = await findDischargePage(ctx.db, followUpId);
	if (!page || !can(actor, 'discharge.view', dischargeResource(page))) return err(notFound);
	const record = await findNewbornRecord(ctx.db, page.newborn.id);
	if (!record) return err(notFound);
	const { visits } = await listDischargeParts(ctx.db, [page]);
	const sites = await listSites(ctx.db, page.newborn.organisationId);
	const mayEdit = can(actor, 'discharge.edit', dischargeResource(page));
	const facts = factsOf(page, record);
	await recordAccess(ctx.db, ctx, {
		organisationId: page.newborn.organisationId,
		staffId: actor.staffId,
		action: 'discharge.viewed',
		followUpId
	});
	const seesValues = can(actor, 'values.view', dischargeResource(page));
	return ok({
		followUpId,
		now: ctx.clock.now(),
		standard: page.followUp.standard,
		unit: { id: page.unit.id, name: page.unit.name, timeZone: page.unit.timeZone },
		clinics: sites.filter(({ kind }) => kind === 'clinic').map(siteView),
		facts: seesValues ? facts : { ...facts, measurements: facts.measurements.slice(-1) },
		stage: page.followUp.stage,
		disposition: page.followUp.disposition,
		window: windowOf(page),
		handedOverAt: page.followUp.handedOverAt,
		isClosed: page.followUp.closedAt !== null,
		mayEdit: mayEdit && page.followUp.handedOverAt === null && page.followUp.closedAt === null,
		visits,
		clinic: page.clinic
	});
}
