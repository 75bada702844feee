import { hostname } from 'node:os';
import { systemClock } from '../src/lib/server/clock';
import { type Config, getConfig } from '../src/lib/server/config';
import type { Ctx } from '../src/lib/server/context';
import { openDatabase } from '../src/lib/server/db/client';
import { createLog } from '../src/lib/server/log';
import type { Outbox, Renderer } from '../src/lib/server/outbox/port';
import { noteAlive, noteStopped } from '../src/lib/server/outbox/workers';
import { openProviders } from '../src/lib/server/providers/index';
import { systemRandom } from '../src/lib/server/random';
import { type SendingLoop, startSending } from './loop';
import { startPeriodic, type TimedTick } from './periodic';
import { parseJobSettings } from './settings';

export interface WorkerParts {
	readonly render: Renderer;
	readonly raiseAlert: Outbox['raiseAlert'];
	/** Ticks beside those of sending itself. */
	readonly ticks: (ctx: Ctx) => readonly TimedTick[];
}

/**
 * A worker's whole life, from the environment to the exit code. SIGTERM and SIGINT let it finish what is under way and give
 * the rest back; a second signal ends it at once.
 */
export async function runWorker({ render, raiseAlert, ticks }: WorkerParts): Promise<void> {
	const config = getConfig();
	const { outbox: settings, mailSentListUrl, stopGraceSeconds } = parseJobSettings(process.env);
	const workerId = nameOf(config);
	const database = openDatabase(config.databaseUrl, 12);
	const log = createLog(config.logLevel, { process: 'worker', worker: workerId });
	const ctx: Ctx = { db: database.db, clock: systemClock, random: systemRandom, log, config };
	const providers = openProviders(config, {
		timeoutMilliseconds: settings.callSeconds * 1000,
		connections: settings.concurrency,
		mailSentListUrl
	});
	const statusUrl = (messageId: string) => `${config.publicBaseUrl}/webhooks/sms/status?message=${messageId}`;
	const outbox: Outbox = { ctx, providers, render, raiseAlert, settings, workerId, statusUrl };
	const sending = startSending(outbox);
	const stopTicks = startPeriodic(ctx, workerId, [...ownTicks(ctx, workerId, sending), ...ticks(ctx)]);
	log.info('the worker runs');
	await signalled();
	log.info('the worker stops');
	await withinGrace(Promise.all([sending.stop(), stopTicks()]), stopGraceSeconds);
	await noteStopped(ctx, workerId).catch((error: unknown) => log.warn({ err: error }, 'the sign-off failed'));
	providers.sms.close();
	providers.mail.close();
	await database.close();
}

const nameOf = (config: Config): string =>
	(config.workerId ?? `${hostname().slice(0, 16)}-${process.pid}`).slice(0, 24) +
	`-${systemRandom.id().slice(0, 4)}`;

const ownTicks = (ctx: Ctx, workerId: string, sending: SendingLoop): TimedTick[] => [
	{ name: 'dispatch', at: '* * * * * *', everySeconds: 1, isLocal: true, run: async () => sending.poke() },
	{
		name: 'alive',
		at: '*/10 * * * * *',
		everySeconds: 10,
		isLocal: true,
		run: () => noteAlive(ctx, workerId)
	},
	// Rows are leased, so every worker may look after the others' lost answers.
	{
		name: 'reconcile',
		at: '*/5 * * * * *',
		everySeconds: 5,
		isLocal: true,
		run: () => sending.lookAfterOthers()
	}
];

function signalled(): Promise<void> {
	return new Promise((resolve) => {
		let isStopping = false;
		for (const signal of ['SIGTERM', 'SIGINT'] as const) {
			process.on(signal, () => {
				if (isStopping) process.exit(1);
				isStopping = true;
				resolve();
			});
		}
	});
}

/** Calls end by their own time-out; the grace only covers a database that does not answer. What is left is found by others. */
async function withinGrace(work: Promise<unknown>, seconds: number): Promise<void> {
	let timer: NodeJS.Timeout | undefined;
	const over = new Promise<void>((resolve) => (timer = setTimeout(resolve, seconds * 1000)));
	await Promise.race([work, over]).finally(() => clearTimeout(timer));
}
