import type { ChildProcess } from 'node:child_process';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { count, eq } from 'drizzle-orm';
import { afterAll, describe, expect, it } from 'vitest';
import { insertPlainMessages, insertPlainSites } from '../../jobs/bench/plain-messages';
import { applyMigrations } from '../../jobs/migrate';
import { databaseUrl, ensureAccount, prepareData, startMariadb } from '../../jobs/setup/mariadb.mjs';
import { freePorts } from '../../jobs/setup/ports.mjs';
import { ended, startChild } from '../../jobs/stress/support';
import { openDatabase } from '../../src/lib/server/db/client';
import type { Db } from '../../src/lib/server/db/client';
import type { MessageState } from '../../src/lib/domain/messaging/kinds';
import { messages, workers } from '../../src/lib/server/db/schema/messaging';
import { environmentFor, openFakes } from '../messaging/sending-world';
import { openTestDatabase } from '../support/database';

/** Real worker processes, real signals. Waits end by what happens, not by the clock; the limits only bound a failure. */

const LONG = { timeout: 240_000, interval: 200 };
const database = await openTestDatabase();

const countOf = async (db: Db, state: MessageState) =>
	(await db.select({ found: count() }).from(messages).where(eq(messages.state, state)))[0]?.found ?? 0;

const children: ChildProcess[] = [];
afterAll(() => {
	for (const child of children) child.kill('SIGKILL');
});
function startWorker(env: Record<string, string>): ChildProcess {
	const child = startChild('stress/plain-worker.ts', { env });
	children.push(child);
	return child;
}

describe('a worker that is asked to stop', () => {
	it('finishes the calls under way, gives the rest back uncounted, and signs off', async () => {
		const fakes = await openFakes({ latencyMilliseconds: 3000 });
		const siteIds = await insertPlainSites(database.db, 2);
		await insertPlainMessages(database.db, { count: 200, siteIds, channel: 'sms' });
		const worker = startWorker({
			...environmentFor(fakes, database.url),
			SMS_PER_SECOND: '0',
			SEND_CONCURRENCY: '5',
			SEND_CALL_SECONDS: '20',
			STOP_GRACE_SECONDS: '60'
		});
		await expect.poll(() => fakes.store.count, LONG).toBeGreaterThan(5);
		worker.kill('SIGTERM');
		expect(await ended(worker)).toBe(0);
		const sent = await countOf(database.db, 'sent');
		expect(sent).toBe(fakes.store.count);
		expect(sent).toBeLessThan(200);
		expect(await countOf(database.db, 'planned')).toBe(200 - sent);
		const rows = await database.db.select().from(messages).where(eq(messages.state, 'planned'));
		expect(rows.every((row) => row.attempts === 0 && row.lockedBy === null && row.callBeganAt === null)).toBe(
			true
		);
		const [signedOff] = await database.db.select().from(workers);
		expect(signedOff?.stoppedAt).toBeInstanceOf(Date);
	}, 300_000);

	it('ends at once at the second signal', async () => {
		await database.clean();
		const fakes = await openFakes();
		fakes.troubles.order({ channel: 'sms', kind: 'silent', times: 99, seconds: 100 });
		const siteIds = await insertPlainSites(database.db, 1);
		await insertPlainMessages(database.db, { count: 5, siteIds, channel: 'sms' });
		const worker = startWorker({
			...environmentFor(fakes, database.url),
			SEND_CALL_SECONDS: '50',
			STOP_GRACE_SECONDS: '200'
		});
		await expect.poll(() => fakes.store.count, LONG).toBe(5);
		worker.kill('SIGTERM');
		await expect.poll(() => countOf(database.db, 'sending'), LONG).toBe(5);
		worker.kill('SIGINT');
		expect(await ended(worker)).toBe(1);
	}, 300_000);
});

describe('a database that stops in the middle and comes back', () => {
	it('costs nothing and repeats nothing, and the same worker goes on', async () => {
		const folder = mkdtempSync(join(tmpdir(), 'fadewell-stop-'));
		chmodSync(folder, 0o711);
		const base = join(folder, 'mariadb');
		const [port = 0] = await freePorts(1);
		await prepareData(base);
		let server = await startMariadb({ base, port });
		await ensureAccount(server, { password: 'only-for-this-test' });
		const url = databaseUrl({ port, password: 'only-for-this-test' });
		await applyMigrations(url);
		const fakes = await openFakes({ latencyMilliseconds: 100 });
		const { db, close } = openDatabase(url);
		const siteIds = await insertPlainSites(db, 2);
		await insertPlainMessages(db, { count: 240, siteIds, channel: 'sms' });
		const worker = startWorker({
			...environmentFor(fakes, url),
			SMS_PER_SECOND: '40',
			SEND_BATCH: '16',
			SEND_LEASE_SECONDS: '8',
			SEND_CALL_SECONDS: '4',
			SEND_SETTLE_SECONDS: '1'
		});
		for (const share of [40, 120]) {
			await expect.poll(() => fakes.store.count, LONG).toBeGreaterThan(share);
			await server.stop();
			server = await startMariadb({ base, port });
		}
		await expect.poll(() => countOf(db, 'sent').catch(() => 0), LONG).toBe(240);
		expect(worker.exitCode).toBeNull();
		expect(fakes.store.count).toBe(240);
		worker.kill('SIGTERM');
		expect(await ended(worker)).toBe(0);
		await close();
		await server.stop();
		rmSync(folder, { recursive: true, force: true });
	}, 600_000);
});

describe('workers that are killed while they send', () => {
	it('lose nothing and repeat nothing (600 messages, 12 kills -9)', async () => {
		await database.clean();
		const child = startChild('stress/messages.ts', {
			env: { DATABASE_URL: database.url },
			args: ['--messages', '600', '--kills', '12', '--workers', '3', '--minutes', '10'],
			output: 'pipe'
		});
		children.push(child);
		let said = '';
		child.stdout?.on('data', (chunk: Buffer) => (said += chunk.toString('utf8')));
		expect(await ended(child), said).toBe(0);
		expect(said).toContain('12 kills -9');
		expect(said).toContain('0 lost, 0 repeated');
	}, 660_000);
});
