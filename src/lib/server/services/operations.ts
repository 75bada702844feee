import journal from '../../../../drizzle/meta/_journal.json';
import type { StaffActor } from '../../domain/access/roles';
import type { MessageState } from '../../domain/messaging/kinds';
import type { Ctx } from '../context';
import { describeFailure } from '../failure';
import {
	countMessages,
	countOpenFindings,
	dueMessages,
	lastHeardAt,
	newestMigration,
	listDeadMessages,
	listOpenFindings,
	listTicks,
	listTroubledSenders,
	listWorkers,
	type DeadMessage,
	type Sender,
	type Tick,
	type WatchFinding,
	type Worker
} from '../repos/operations';
import { listSites } from '../repos/sites';

/** Without a sign of life for this long, a worker counts as silent. */
export const SILENT_AFTER_SECONDS = 120;
const HOUR = 3_600_000;

export interface OperationsScreen {
	readonly workers: readonly (Worker & { readonly isSilent: boolean })[];
	readonly ticks: readonly Tick[];
	readonly senders: readonly Sender[];
	readonly messages: readonly { readonly state: MessageState; readonly count: number }[];
	readonly due: { readonly count: number; readonly oldestAt: Date | null };
	readonly dead: readonly DeadMessage[];
	readonly findings: readonly (WatchFinding & { readonly siteName: string | null })[];
	readonly now: Date;
}

/** How the machinery fares: no name, no number and no words of any family. */
export async function getOperations(ctx: Ctx, actor: StaffActor): Promise<OperationsScreen> {
	const now = ctx.clock.now();
	const sites = await listSites(ctx.db, actor.organisationId);
	const siteIds = sites.map(({ id }) => id);
	const [workers, ticks, senders, messages, due, dead, findings] = await Promise.all([
		listWorkers(ctx.db, new Date(now.getTime() - 48 * HOUR)),
		listTicks(ctx.db),
		listTroubledSenders(ctx.db, now),
		countMessages(ctx.db, siteIds),
		dueMessages(ctx.db, now),
		listDeadMessages(ctx.db, siteIds, 50),
		listOpenFindings(ctx.db, 100)
	]);
	const siteNames = new Map(sites.map(({ id, name }) => [id, name]));
	return {
		workers: workers.map((worker) => ({ ...worker, isSilent: isSilent(worker.heardAt, now) })),
		ticks,
		senders,
		messages,
		due,
		dead,
		findings: findings
			.filter(({ siteId }) => siteId === null || siteNames.has(siteId))
			.map((finding) => ({ ...finding, siteName: siteNames.get(finding.siteId ?? '') ?? null })),
		now
	};
}

const isSilent = (heardAt: Date, now: Date): boolean =>
	now.getTime() - heardAt.getTime() > SILENT_AFTER_SECONDS * 1000;

export interface Health {
	readonly isWell: boolean;
	/** Seconds since any running worker was heard from; null where none ever was. */
	readonly workerHeardSecondsAgo: number | null;
	readonly openFindings: number;
	readonly messagesDue: number;
	/** Seconds that the oldest due message has waited; 0 where none waits. */
	readonly oldestDueSeconds: number;
	readonly messagesDead: number;
}

/** The same for a machine that watches: counts only. */
export async function getHealth(ctx: Ctx): Promise<Health> {
	const now = ctx.clock.now();
	const [heardAt, openFindings, due, byState] = await Promise.all([
		lastHeardAt(ctx.db),
		countOpenFindings(ctx.db),
		dueMessages(ctx.db, now),
		countMessages(ctx.db)
	]);
	const secondsSince = (at: Date): number => Math.max(0, Math.round((now.getTime() - at.getTime()) / 1000));
	return {
		isWell: heardAt !== null && !isSilent(heardAt, now) && openFindings === 0,
		workerHeardSecondsAgo: heardAt === null ? null : secondsSince(heardAt),
		openFindings,
		messagesDue: due.count,
		oldestDueSeconds: due.oldestAt === null ? 0 : secondsSince(due.oldestAt),
		messagesDead: byState.find(({ state }) => state === 'dead')?.count ?? 0
	};
}

/** Whether the database answers and has every migration that this version was built with. */
export async function isDatabaseReady(ctx: Ctx): Promise<boolean> {
	const wanted = Math.max(...journal.entries.map(({ when }) => when));
	try {
		const newest = await newestMigration(ctx.db);
		return newest !== null && newest >= wanted;
	} catch (error) {
		ctx.log.warn({ failure: describeFailure(error) }, 'the database is not ready');
		return false;
	}
}
