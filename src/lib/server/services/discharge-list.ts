import { DateTime } from 'luxon';
import { can, mayEver, sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { missingForDischarge, type MissingThing } from '../../domain/followup/discharge-missing';
import type { NextStepKind, Stage } from '../../domain/followup/states';
import type { StandardId } from '../../domain/guideline/types';
import type { Ctx } from '../context';
import { listDischargePages, listDischargeParts, type DischargePageRow } from '../repos/discharge-pages';

type Parts = Awaited<ReturnType<typeof listDischargeParts>>;

/** A newborn on the unit's list, with what the list shows and draws. */
export interface DischargeRow {
	readonly followUpId: string;
	readonly familyName: string;
	readonly givenName: string;
	readonly recordNumber: string;
	readonly unitName: string;
	readonly clinicName: string;
	readonly stage: Stage;
	readonly nextStep: { readonly kind: NextStepKind; readonly dueAt: Date } | null;
	readonly missing: readonly MissingThing[];
	readonly plannedDischargeAt: Date;
	readonly handedOverAt: Date | null;
	readonly standard: StandardId;
	readonly bornAt: Date;
	readonly timeZone: string;
	readonly gestationalAge: { readonly weeks: number; readonly days: number };
	readonly neurotoxicityRisks: DischargePageRow['newborn']['neurotoxicityRisks'];
	readonly albuminGramsPerDecilitre: number | null;
	readonly window: DischargeWindow | null;
	readonly measurements: Parts['measurements'];
	readonly phototherapy: Parts['courses'];
	readonly visits: Parts['visits'];
}

export interface DischargeWindow {
	readonly from: Date;
	readonly until: Date;
	readonly test: NonNullable<DischargePageRow['followUp']['windowTest']>;
}

export function windowOf({ followUp }: DischargePageRow): DischargeWindow | null {
	const { windowFromAt, windowUntilAt, windowTest } = followUp;
	return windowFromAt && windowUntilAt
		? { from: windowFromAt, until: windowUntilAt, test: windowTest ?? 'judgement' }
		: null;
}

function rowOf(page: DischargePageRow, parts: Parts, seesValues: boolean): DischargeRow {
	const { followUp, newborn, unit, clinic } = page;
	const ofNewborn = <T extends { newbornId: string }>(list: T[]) =>
		list.filter(({ newbornId }) => newbornId === newborn.id);
	const measured = ofNewborn(parts.measurements);
	const visits = parts.visits.filter(({ followUpId }) => followUpId === followUp.id);
	return {
		followUpId: followUp.id,
		familyName: newborn.familyName,
		givenName: newborn.givenName,
		recordNumber: newborn.recordNumber,
		unitName: unit.name,
		clinicName: clinic.name,
		stage: followUp.stage,
		nextStep:
			followUp.nextStep && followUp.nextStepDueAt
				? { kind: followUp.nextStep, dueAt: followUp.nextStepDueAt }
				: null,
		missing: missingForDischarge({
			disposition: followUp.disposition,
			hasValue: measured.length > 0,
			hasBirthWeight: newborn.birthWeightGrams !== null,
			carers: ofNewborn(parts.carers),
			hasVisit: visits.some(({ isOpen }) => isOpen === true),
			handedOver: followUp.handedOverAt !== null
		}),
		plannedDischargeAt: followUp.plannedDischargeAt,
		handedOverAt: followUp.handedOverAt,
		standard: followUp.standard,
		bornAt: newborn.bornAt,
		timeZone: unit.timeZone,
		gestationalAge: { weeks: newborn.gestationWeeks, days: newborn.gestationDays },
		neurotoxicityRisks: newborn.neurotoxicityRisks,
		albuminGramsPerDecilitre: newborn.albuminGramsPerDecilitre,
		window: windowOf(page),
		measurements: seesValues ? measured : measured.slice(-1),
		phototherapy: ofNewborn(parts.courses),
		visits
	};
}

/** Newborns of the actor's sites that still go home from here, earliest discharge first, and those handed over today. */
export async function listDischarges(ctx: Ctx, actor: StaffActor) {
	const now = ctx.clock.now();
	const siteIds = sitesWhere(actor, 'discharge.view');
	// A day is the unit's own; the widest zone difference is cut to each row's zone below.
	const handedOverFrom = DateTime.fromJSDate(now).minus({ days: 1 }).toJSDate();
	const found =
		siteIds.length === 0
			? []
			: await listDischargePages(ctx.db, { organisationId: actor.organisationId, siteIds, handedOverFrom });
	const shown = found.filter(({ followUp, unit }) => {
		if (!followUp.handedOverAt) return true;
		const zone = { zone: unit.timeZone };
		return DateTime.fromJSDate(followUp.handedOverAt, zone).hasSame(DateTime.fromJSDate(now, zone), 'day');
	});
	const parts = await listDischargeParts(ctx.db, shown);
	const rows = shown.map((page) => {
		const { organisationId } = page.newborn;
		const resource = { organisationId, birthSiteId: page.unit.id, clinicId: page.clinic.id };
		return rowOf(page, parts, can(actor, 'values.view', resource));
	});
	return { now, rows, mayEnter: mayEver(actor, 'discharge.enter') };
}
