import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { parseArgs } from 'node:util';
import { eq, inArray, min, sql } from 'drizzle-orm';
import { z } from 'zod';
import { type Db, openDatabase } from '../../src/lib/server/db/client';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { bundleJobs } from '../stress/bundle';
import { ended, environmentOf, startChild } from '../stress/support';
import { accepts, freePorts } from '../setup/ports.mjs';
import { insertPlainMessages, insertPlainSites } from './plain-messages';

/**
 * Messages per second through the whole path (claim, SDK, fake, record, each with its durable commit) at 1, 2 and 4 workers,
 * as a ratio to a bare loop over the same SDK and fake with no durability at all, at equal concurrency. Both are measured in
 * turn, several times, and the medians compared.
 * `npm run bench -- messages [--messages 6000] [--rounds 3] [--concurrency 16] [--workers 1,2,4]`
 */

const WARM_UP = 400;
const GOAL = 0.7;

interface Bench {
	readonly db: Db;
	readonly siteIds: readonly string[];
	readonly env: Record<string, string>;
	readonly files: { readonly worker: string; readonly bare: string };
	readonly total: number;
}

const report = z.object({ milliseconds: z.number() });

/** The slowest of the loops tells how long all of them took. */
async function measureBare({ env, files, total }: Bench, workers: number): Promise<number> {
	const children = Array.from({ length: workers }, () =>
		startProcess(files.bare, { ...env, BARE_COUNT: String(Math.ceil(total / workers)) })
	);
	await Promise.all(children.map(word));
	const reports = children.map(word);
	for (const child of children) child.send('go');
	const slowest = Math.max(...(await Promise.all(reports)).map((said) => report.parse(said).milliseconds));
	await Promise.all(children.map(ended));
	return total / (slowest / 1000);
}

/** The next word of a child; a child that ends instead ends the measurement. */
async function word(child: ChildProcess): Promise<unknown> {
	const gone = once(child, 'exit').then(() => {
		throw new Error('a process of the measurement ended early');
	});
	const [said]: unknown[] = await Promise.race([once(child, 'message'), gone]);
	return said;
}

/** From the first call that began to the last outcome that was committed, by the database's clock. */
async function measureWorkers(bench: Bench, workers: number): Promise<number> {
	const { db, env, files, siteIds, total } = bench;
	const children = Array.from({ length: workers }, () => startProcess(files.worker, env));
	await insertPlainMessages(db, { count: WARM_UP * workers, siteIds, channel: 'sms' });
	await untilSent(db);
	await db.delete(messages);
	const far = new Date(Date.now() + 86_400_000);
	await insertPlainMessages(db, {
		count: total,
		siteIds,
		channel: 'sms',
		runAt: far,
		expiresAt: new Date(2 * Number(far) - Date.now())
	});
	await db.update(messages).set({ runAt: new Date(Date.now() - 1000) });
	await untilSent(db);
	const lastAt = await databaseClock(db);
	const [first] = await db.select({ at: min(messages.callBeganAt) }).from(messages);
	for (const child of children) child.kill('SIGTERM');
	await Promise.all(children.map(ended));
	await db.delete(messages);
	return total / ((lastAt - Number(first?.at)) / 1000);
}

/** Looks for any message that is left by the claim index, which costs the database next to nothing. */
async function untilSent(db: Db): Promise<void> {
	const isLeft = inArray(messages.state, ['planned', 'sending', 'unknown']);
	for (;;) {
		const left = await db.select({ state: messages.state }).from(messages).where(isLeft).limit(1);
		if (left.length === 0) return;
		await new Promise((resolve) => setTimeout(resolve, 25));
	}
}

async function databaseClock(db: Db): Promise<number> {
	const [row] = await db
		.select({ now: sql`utc_timestamp(3)`.mapWith(messages.sentAt) })
		.from(messages)
		.where(eq(messages.state, 'sent'))
		.limit(1);
	return Number(row?.now);
}

function startProcess(file: string, env: Record<string, string>): ChildProcess {
	return spawn(process.execPath, [file], {
		env: { ...process.env, ...env },
		stdio: ['ignore', 'ignore', 'inherit', 'ipc']
	});
}

const median = (values: readonly number[]): number =>
	[...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

async function compare(bench: Bench, workers: number, rounds: number): Promise<number> {
	const bare: number[] = [];
	const whole: number[] = [];
	for (let round = 0; round < rounds; round++) {
		bare.push(await measureBare(bench, workers));
		whole.push(await measureWorkers(bench, workers));
	}
	const ratio = median(whole) / median(bare);
	const [wholeText, bareText] = [median(whole), median(bare)].map((rate) =>
		String(Math.round(rate)).padStart(8)
	);
	console.log(`${String(workers).padStart(7)} ${wholeText}/s ${bareText}/s ${ratio.toFixed(2).padStart(8)}`);
	return ratio;
}

async function main(): Promise<void> {
	const { values } = parseArgs({
		options: {
			messages: { type: 'string', default: '6000' },
			rounds: { type: 'string', default: '3' },
			concurrency: { type: 'string', default: '16' },
			workers: { type: 'string', default: '1,2,4' }
		}
	});
	const databaseUrl = process.env.DATABASE_URL;
	if (!databaseUrl) throw new Error('DATABASE_URL is not set; run it as `npm run bench -- messages`.');
	const [http = 0, smtp = 0] = await freePorts(2);
	const env = {
		...environmentOf({ http, smtp }),
		DATABASE_URL: databaseUrl,
		SEND_CONCURRENCY: values.concurrency,
		LOG_LEVEL: 'error'
	};
	const fakes = startChild('fakes/main.ts', { env });
	const { db, close } = openDatabase(databaseUrl);
	try {
		while (!(await accepts(http))) await new Promise((resolve) => setTimeout(resolve, 100));
		const [worker = '', bare = ''] = await bundleJobs([
			'jobs/stress/plain-worker.ts',
			'jobs/bench/bare-loop.ts'
		]);
		const siteIds = await insertPlainSites(db, 3);
		const bench: Bench = { db, siteIds, env, files: { worker, bare }, total: Number(values.messages) };
		console.log(
			`${values.messages} SMS, ${values.concurrency} calls at a time in each process, median of ${values.rounds}`
		);
		console.log('workers whole path   bare loop    ratio');
		const ratios: number[] = [];
		for (const workers of values.workers.split(',').map(Number)) {
			ratios.push(await compare(bench, workers, Number(values.rounds)));
		}
		console.log(
			`Goal: at least ${GOAL}. ${ratios.every((ratio) => ratio >= GOAL) ? 'Reached.' : 'Not reached.'}`
		);
	} finally {
		await close();
		fakes.kill('SIGTERM');
		await ended(fakes);
	}
}

main().catch((error: unknown) => {
	console.error(error instanceof Error ? error.message : error);
	process.exitCode = 1;
});
