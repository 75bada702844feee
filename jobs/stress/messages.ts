import { type ChildProcess, spawn } from 'node:child_process';
import { parseArgs } from 'node:util';
import { and, count, eq, gt, ne, sql } from 'drizzle-orm';
import { type Db, openDatabase } from '../../src/lib/server/db/client';
import { messages } from '../../src/lib/server/db/schema/messaging';
import { insertPlainMessages, insertPlainSites, PLAIN_DOMAIN } from '../bench/plain-messages';
import { type Fakes, startFakes } from '../fakes/fakes';
import { parseFakesSettings } from '../fakes/settings';
import { bundleJobs } from './bundle';
import { ended, environmentOf, STAND_INS } from './support';

/**
 * Kills workers at random moments while they send, and counts at the fakes: nothing may be lost, nothing repeated.
 * `npm run stress:messages -- [--messages 10000] [--kills 200] [--workers 4] [--minutes 30]`
 */

const MAIL_SHARE = 0.2;
const TELEPHONES = 400;
const MAILBOXES = 100;
const LONGEST_WAIT_MILLISECONDS = 5000;

/** Short leases, so that what a killed worker held is taken up within the run. */
const WORKER_TIMES = {
	SEND_BATCH: '10',
	SEND_CONCURRENCY: '5',
	SEND_CALL_SECONDS: '4',
	SEND_LEASE_SECONDS: '8',
	SEND_SETTLE_SECONDS: '2',
	LOG_LEVEL: 'fatal'
};

interface Run {
	readonly messages: number;
	readonly kills: number;
	readonly workers: number;
	readonly deadline: number;
}

function readOptions(): Run {
	const number = (fallback: string) => ({ type: 'string', default: fallback }) as const;
	const { values } = parseArgs({
		options: {
			messages: number('10000'),
			kills: number('200'),
			workers: number('4'),
			minutes: number('30')
		}
	});
	return {
		messages: Number(values.messages),
		kills: Number(values.kills),
		workers: Number(values.workers),
		deadline: Date.now() + Number(values.minutes) * 60_000
	};
}

/** Workers by name; one that is killed is replaced at once. */
class Herd {
	readonly #file: string;
	readonly #env: Record<string, string>;
	readonly #alive = new Map<string, ChildProcess>();
	#named = 0;
	kills = 0;

	constructor(file: string, env: Record<string, string>) {
		this.#file = file;
		this.#env = env;
	}

	add(): void {
		const name = `w${++this.#named}`;
		const child = spawn(process.execPath, [this.#file], {
			env: { ...process.env, ...this.#env, WORKER_ID: name },
			stdio: ['ignore', 'ignore', 'inherit']
		});
		this.#alive.set(name, child);
		child.once('exit', (code, signal) => {
			this.#alive.delete(name);
			if (signal !== 'SIGKILL' && code !== 0)
				console.error(`a worker ended by itself with ${code ?? signal}`);
		});
	}

	/** Kills one of the named workers with a signal that it cannot notice. */
	async killOneOf(names: readonly string[]): Promise<void> {
		const alive = names.flatMap((name) => this.#alive.get(name) ?? []);
		const victim = alive[Math.floor(Math.random() * alive.length)];
		if (victim === undefined) return;
		victim.kill('SIGKILL');
		await ended(victim);
		this.kills++;
		this.add();
	}

	async stop(): Promise<void> {
		const all = [...this.#alive.values()];
		for (const child of all) child.kill('SIGTERM');
		await Promise.all(all.map(ended));
	}
}

async function main(): Promise<number> {
	const run = readOptions();
	const databaseUrl = process.env.DATABASE_URL;
	if (!databaseUrl) throw new Error('DATABASE_URL is not set; run it as `npm run stress:messages`.');
	const fakes = await startFakes({
		...parseFakesSettings({ ...STAND_INS, FAKES_PORT: '0', FAKES_SMTP_PORT: '0', FAKES_JOURNAL: '' }),
		latencyMilliseconds: 60
	});
	const { db, close } = openDatabase(databaseUrl);
	const planned = await plan(db, run.messages);
	const env = {
		...environmentOf({ http: Number(new URL(fakes.url).port), smtp: fakes.smtpPort }),
		...WORKER_TIMES,
		DATABASE_URL: databaseUrl
	};
	const [worker = ''] = await bundleJobs(['jobs/stress/plain-worker.ts']);
	const herd = new Herd(worker, env);
	for (let worker = 0; worker < run.workers; worker++) herd.add();
	const began = Date.now();
	await killWhileSending(herd, run, { db, fakes });
	const left = await untilAllSent(db, run.deadline);
	await herd.stop();
	const verdict = judge(planned, fakes);
	const again = await countClaimedAgain(db);
	await close();
	await fakes.close();
	const seconds = Math.round((Date.now() - began) / 1000);
	console.log(
		`${run.messages} messages, ${herd.kills} kills -9 in ${seconds} s; ${again} messages were in a killed worker's hands.`
	);
	if (left > 0) console.log(`${left} messages were not sent when the time was over.`);
	console.log(`${verdict.lost} lost, ${verdict.repeated} repeated at the fakes.`);
	const enough = herd.kills >= run.kills;
	if (!enough) console.log(`Only ${herd.kills} of ${run.kills} kills were made.`);
	return left === 0 && enough && verdict.lost === 0 && verdict.repeated === 0 ? 0 : 1;
}

async function plan(db: Db, total: number): Promise<ReadonlySet<string>> {
	const siteIds = await insertPlainSites(db, 3);
	const mails = Math.round(total * MAIL_SHARE);
	const sms = await insertPlainMessages(db, {
		count: total - mails,
		siteIds,
		channel: 'sms',
		// Few telephones with many messages each: only the mark in the text tells them apart.
		to: (index) => `+1202555${String(1000 + (index % TELEPHONES))}`
	});
	const mail = await insertPlainMessages(db, {
		count: mails,
		siteIds,
		channel: 'mail',
		to: (index) => `family-${index % MAILBOXES}@${PLAIN_DOMAIN}`
	});
	return new Set([...sms, ...mail]);
}

/**
 * The next kill comes when the fakes have taken a random number of further messages, so the kills are spread over the whole
 * run on a fast machine and a slow one alike. Only workers with messages in their hands are killed: others tell nothing.
 */
async function killWhileSending(
	herd: Herd,
	run: Run,
	{ db, fakes }: { db: Db; fakes: Fakes }
): Promise<void> {
	const apart = run.messages / run.kills;
	while (herd.kills < run.kills && Date.now() < run.deadline) {
		const taken = fakes.store.count;
		if (taken >= run.messages) return;
		const waitFor = Math.min(taken + Math.random() * apart * 1.6, run.messages - 1);
		const patience = Date.now() + LONGEST_WAIT_MILLISECONDS;
		while (fakes.store.count < waitFor && Date.now() < patience) await pause(2);
		const before = herd.kills;
		await herd.killOneOf(await busyWorkers(db));
		if (herd.kills === before || herd.kills % 20 !== 0) continue;
		console.log(`${herd.kills} kills, ${await countUnsent(db)} messages to go`);
	}
}

async function busyWorkers(db: Db): Promise<string[]> {
	const rows = await db
		.selectDistinct({ token: messages.lockedBy })
		.from(messages)
		.where(and(eq(messages.state, 'sending'), gt(messages.lockedUntil, sql`utc_timestamp(3)`)));
	// `w7-k3fa/sms12` was claimed by w7.
	return rows.map(({ token }) => token?.split('-')[0] ?? '');
}

async function untilAllSent(db: Db, deadline: number): Promise<number> {
	for (;;) {
		const left = await countUnsent(db);
		if (left === 0 || Date.now() > deadline) return left;
		await pause(500);
	}
}

async function countUnsent(db: Db): Promise<number> {
	const [row] = await db.select({ left: count() }).from(messages).where(ne(messages.state, 'sent'));
	return row?.left ?? 0;
}

async function countClaimedAgain(db: Db): Promise<number> {
	const [row] = await db
		.select({ again: count() })
		.from(messages)
		.where(sql`${gt(messages.claims, 1)} or ${eq(messages.lastError, 'its worker stopped')}`);
	return row?.again ?? 0;
}

/** What arrived at the fakes against what was planned, by the mark of each text and the Message-ID of each mail. */
function judge(planned: ReadonlySet<string>, fakes: Fakes): { lost: number; repeated: number } {
	const marks = [...fakes.store.smses].map(({ body }) => /\((\w+)\)$/.exec(body)?.[1] ?? '');
	const mails = fakes.store.mails.map(({ messageId }) => messageId.slice(1, 7));
	const arrived = new Map<string, number>();
	for (const mark of [...marks, ...mails]) arrived.set(mark, (arrived.get(mark) ?? 0) + 1);
	const lost = [...planned].filter((id) => !arrived.has(id.slice(0, 6))).length;
	const repeated = [...arrived.values()].filter((times) => times > 1).length;
	return { lost, repeated };
}

const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

main().then(
	(code) => process.exit(code),
	(error: unknown) => {
		console.error(error);
		process.exit(1);
	}
);
