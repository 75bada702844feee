import { sitesWhere } from '../../domain/access/can';
import type { StaffActor } from '../../domain/access/roles';
import {
	QUEUE_GROUPS,
	firstDueAt,
	inQueueOrder,
	laterChecksUntil,
	owedByDesk,
	queueGroupsOf,
	type QueueFacts,
	type QueueGroup
} from '../../domain/followup/desk-queue';
import type { QueueRow, QueueView } from '../../schemas/desk-view';
import type { Ctx } from '../context';
import {
	listCandidatesById,
	listClinics,
	listOpenAlerts,
	listQueueCandidates,
	loadDeskFacts,
	type AlertRow
} from '../repos/queue';
import { deskRows } from './desk-rows';
import { listStrays } from './stray-view';

export interface QueueAsked {
	/** One of the actor's clinics; absent or unknown: all of them. */
	readonly clinicId?: string | undefined;
	readonly group?: QueueGroup | undefined;
	/** How many rows at most. */
	readonly limit: number;
}

interface Standing {
	readonly facts: QueueFacts;
	readonly groups: readonly QueueGroup[];
}

type Candidate = Awaited<ReturnType<typeof listQueueCandidates>>[number];

function groupAlerts(alerts: readonly AlertRow[]): Map<string, AlertRow[]> {
	const byFollowUp = new Map<string, AlertRow[]>();
	for (const alert of alerts) {
		byFollowUp.set(alert.followUpId, [...(byFollowUp.get(alert.followUpId) ?? []), alert]);
	}
	return byFollowUp;
}

async function listCandidates(
	ctx: Ctx,
	asked: { clinicIds: readonly string[]; alerts: readonly AlertRow[]; now: Date }
): Promise<Candidate[]> {
	const { clinicIds, alerts, now } = asked;
	const byStage = await listQueueCandidates(ctx.db, {
		clinicIds,
		now,
		laterChecksUntil: laterChecksUntil(now)
	});
	const known = new Set(byStage.map(({ followUpId }) => followUpId));
	const missing = new Set(alerts.filter(owedByDesk).map(({ followUpId }) => followUpId));
	const ids = [...missing].filter((id) => !known.has(id));
	return ids.length === 0 ? byStage : [...byStage, ...(await listCandidatesById(ctx.db, ids))];
}

function standingOf(candidates: readonly Candidate[], alerts: readonly AlertRow[], now: Date): Standing[] {
	const byFollowUp = groupAlerts(alerts);
	return candidates.flatMap(({ handedOverAt, ...rest }) => {
		const facts = {
			...rest,
			isHandedOver: handedOverAt !== null,
			alerts: byFollowUp.get(rest.followUpId) ?? []
		};
		const groups = queueGroupsOf(facts, now);
		return groups.length === 0 ? [] : [{ facts, groups }];
	});
}

function countGroups(standing: readonly Standing[]): Record<QueueGroup, number> {
	const count = (group: QueueGroup) => standing.filter(({ groups }) => groups.includes(group)).length;
	return {
		'needs-call': count('needs-call'),
		'did-not-come': count('did-not-come'),
		'needs-visit': count('needs-visit'),
		'not-confirmed': count('not-confirmed'),
		undelivered: count('undelivered')
	};
}

async function rowsOf(
	ctx: Ctx,
	asked: { ids: readonly string[]; alerts: readonly AlertRow[]; standing: readonly Standing[]; now: Date }
): Promise<QueueRow[]> {
	const facts = await loadDeskFacts(ctx.db, asked.ids);
	if (!facts) return [];
	const byId = new Map(asked.standing.map((one) => [one.facts.followUpId, one]));
	return deskRows(facts, asked).flatMap((row) => {
		const standing = byId.get(row.followUpId);
		return standing ? [{ ...row, groups: standing.groups, firstDueAt: firstDueAt(standing.facts) }] : [];
	});
}

/**
 * The front desk's queue over the actor's clinics: counts of every group, and the rows of the chosen one in the
 * order of the work. The number of statements does not grow with the rows.
 */
export async function getQueue(ctx: Ctx, actor: StaffActor, asked: QueueAsked): Promise<QueueView> {
	const now = ctx.clock.now();
	const own = sitesWhere(actor, 'queue.view');
	const clinics = own.length === 0 ? [] : await listClinics(ctx.db, own);
	const chosen = clinics.find(({ id }) => id === asked.clinicId);
	const clinicIds = chosen ? [chosen.id] : clinics.map(({ id }) => id);
	const alerts = clinicIds.length === 0 ? [] : await listOpenAlerts(ctx.db, clinicIds);
	const candidates = clinicIds.length === 0 ? [] : await listCandidates(ctx, { clinicIds, alerts, now });
	const standing = standingOf(candidates, alerts, now);
	const group = QUEUE_GROUPS.find((known) => known === asked.group) ?? null;
	const inGroup = standing.filter(({ groups }) => group === null || groups.includes(group));
	const ordered = inQueueOrder(
		inGroup.map(({ facts }) => facts),
		now
	).map(({ followUpId }) => followUpId);
	const strays = await listStrays(ctx, actor);
	return {
		nowAt: now,
		strays: strays.numbers,
		hasMoreStrays: strays.hasMore,
		clinics: clinics.map(({ id, name, timeZone }) => ({ id, name, timeZone })),
		clinicId: chosen?.id ?? null,
		group,
		counts: countGroups(standing),
		all: standing.length,
		total: ordered.length,
		rows: await rowsOf(ctx, { ids: ordered.slice(0, asked.limit), alerts, standing, now })
	};
}
