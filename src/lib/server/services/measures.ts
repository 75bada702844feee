import { mayEver, sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import { convert, thresholdsAt } from '../../domain/guideline';
import { measure, type MeasuredFollowUp, type Measures } from '../../domain/measures/measures';
import type { Ctx } from '../context';
import { countOverdue, listMeasured } from '../repos/measures';
import { listSites, type Site } from '../repos/sites';

const HOUR = 3_600_000;
const DAY = 24 * HOUR;
/** A value counts to a visit when its sample was taken from two hours before the arrival to a day after it. */
const BEFORE_ARRIVAL = 2 * HOUR;
const AFTER_ARRIVAL = DAY;

type Loaded = Awaited<ReturnType<typeof listMeasured>>;

/** The sites whose measures this person may see: the own ones, or all of the organisation. */
export async function listMeasuredSites(
	ctx: Ctx,
	actor: StaffActor
): Promise<Pick<Site, 'id' | 'kind' | 'name'>[]> {
	const sites = await listSites(ctx.db, actor.organisationId);
	const own = new Set(sitesWhere(actor, 'measures.view-site'));
	const isAll = mayEver(actor, 'measures.view-all');
	return sites.filter(({ id }) => isAll || own.has(id)).map(({ id, kind, name }) => ({ id, kind, name }));
}

function firstVisitDifference(
	{ followUp, newborn }: Loaded['rows'][number],
	arrivedAt: Date | null | undefined,
	values: Loaded['measurements']
): number | null {
	if (!arrivedAt) return null;
	const from = arrivedAt.getTime() - BEFORE_ARRIVAL;
	const until = arrivedAt.getTime() + AFTER_ARRIVAL;
	const taken = values.filter(
		({ measuredAt }) => measuredAt.getTime() >= from && measuredAt.getTime() <= until
	);
	const value = taken.find(({ method }) => method === 'serum') ?? taken[0];
	if (!value) return null;
	const lines = thresholdsAt(
		{
			standard: followUp.standard,
			gestationalAge: { weeks: newborn.gestationWeeks, days: newborn.gestationDays },
			neurotoxicityRisks: newborn.neurotoxicityRisks,
			albuminGramsPerDecilitre: newborn.albuminGramsPerDecilitre ?? undefined
		},
		(value.measuredAt.getTime() - newborn.bornAt.getTime()) / HOUR
	);
	if (!lines.ok) return null;
	const { phototherapy, unit } = lines.value;
	const total = convert({ value: value.total, unit: value.unit }, unit).value;
	return Math.round((phototherapy - total) * 10) / 10;
}

function grouped<Row>(rows: readonly Row[], keyOf: (row: Row) => string): Map<string, Row[]> {
	const groups = new Map<string, Row[]>();
	for (const row of rows) {
		const group = groups.get(keyOf(row));
		if (group) group.push(row);
		else groups.set(keyOf(row), [row]);
	}
	return groups;
}

function measured(loaded: Loaded): MeasuredFollowUp[] {
	const visitsOf = grouped(loaded.visits, ({ followUpId }) => followUpId);
	const attemptsOf = grouped(loaded.attempts, ({ followUpId }) => followUpId);
	const valuesOf = grouped(loaded.measurements, ({ newbornId }) => newbornId);
	return loaded.rows.flatMap((row) => {
		const { followUp, newborn } = row;
		if (!followUp.handedOverAt) return [];
		const visits = visitsOf.get(followUp.id) ?? [];
		const kept = visits.find(({ state }) => state === 'arrived');
		return [
			{
				id: followUp.id,
				handedOverAt: followUp.handedOverAt,
				outcome: followUp.outcome,
				round: followUp.round,
				windowUntilAt: followUp.windowUntilAt,
				visits: visits.map((visit) => ({ ...visit, isConfirmed: visit.confirmedAt !== null })),
				reachedAt: (attemptsOf.get(followUp.id) ?? []).map(({ at }) => at),
				firstVisitDifference: firstVisitDifference(row, kept?.arrivedAt, valuesOf.get(newborn.id) ?? [])
			}
		];
	});
}

export interface SiteMeasures {
	readonly site: Pick<Site, 'id' | 'kind' | 'name'>;
	readonly from: Date;
	readonly until: Date;
	readonly measures: Measures;
	/** As of now, whatever the period. */
	readonly open: number;
	readonly overdue: number;
}

/** The measures of one site over the last days; null where the person may not see the site's. */
export async function getMeasures(
	ctx: Ctx,
	actor: StaffActor,
	{ siteId, days }: { readonly siteId: string; readonly days: number }
): Promise<SiteMeasures | null> {
	const sites = await listMeasuredSites(ctx, actor);
	const site = sites.find(({ id }) => id === siteId);
	if (!site) return null;
	const now = ctx.clock.now();
	const from = new Date(now.getTime() - days * DAY);
	const loaded = await listMeasured(ctx.db, { site, from, until: now });
	const owed = await countOverdue(ctx.db, { site, now });
	return { site, from, until: now, measures: measure(measured(loaded), now), ...owed };
}
