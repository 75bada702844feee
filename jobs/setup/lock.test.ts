import { mkdtempSync, readFileSync, rmSync, writeFileSync, existsSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, describe, expect, test } from 'vitest';
import { judgeLock, takeLock } from './lock.mjs';
import { startTicks } from './processes.mjs';

const lockOf = (owner: object, children: object[] = []) => JSON.stringify({ owner, children });
const owner = { name: 'start', pid: 100, ticks: 5000 };
const web = { name: 'web', pid: 101, ticks: 5001 };
const worker = { name: 'worker', pid: 102, ticks: 5002 };
const living = (processes: Record<number, number>) => (pid: number) => processes[pid] ?? null;

describe('a lock that is already there', () => {
	test('is held while its owner lives', () => {
		expect(judgeLock(lockOf(owner, [web]), living({ 100: 5000, 101: 5001 }))).toEqual({
			kind: 'held',
			pid: 100
		});
	});

	test('is stale when the owner is gone', () => {
		expect(judgeLock(lockOf(owner), living({}))).toEqual({ kind: 'stale', orphans: [] });
	});

	test('is stale when the id of the owner was given to another process', () => {
		expect(judgeLock(lockOf(owner), living({ 100: 7777 }))).toEqual({ kind: 'stale', orphans: [] });
	});

	test('names the children that outlived the owner, and no stranger with the id of one', () => {
		const verdict = judgeLock(lockOf(owner, [web, worker]), living({ 101: 5001, 102: 9999 }));
		expect(verdict).toEqual({ kind: 'stale', orphans: [web] });
	});

	test.each([
		['empty', ''],
		['cut off', '{"owner":{"pid":1'],
		['something else', '{"owner":7,"children":[]}']
	])('is stale when it is %s', (_, text) =>
		expect(judgeLock(text, living({ 1: 1 }))).toEqual({ kind: 'stale', orphans: [] })
	);
});

describe('taking the lock', () => {
	const folder = mkdtempSync(join(tmpdir(), 'fadewell-lock-'));
	const path = join(folder, 'start.lock');
	afterEach(() => rmSync(path, { force: true }));
	afterAll(() => rmSync(folder, { recursive: true }));

	test('is refused while this very process holds it, and works again after the release', () => {
		const first = takeLock(path);
		expect(first.taken).toBe(true);
		expect(takeLock(path)).toEqual({ taken: false, pid: process.pid });
		if (first.taken) first.release();
		expect(existsSync(path)).toBe(false);
		expect(takeLock(path).taken).toBe(true);
	});

	test('works over a stale one and reports the orphans', () => {
		// Our parent is a process that surely lives, in the place of a child that was left over.
		const orphan = { name: 'web', pid: process.ppid, ticks: startTicks(process.ppid) };
		writeFileSync(path, lockOf({ ...owner, pid: process.pid, ticks: 1 }, [orphan]));
		expect(takeLock(path)).toMatchObject({ taken: true, wasStale: true, orphans: [orphan] });
	});

	test('keeps the children in the file, for whoever comes after a crash', () => {
		const lock = takeLock(path);
		if (lock.taken) lock.add('worker', process.pid);
		expect(JSON.parse(readFileSync(path, 'utf8'))).toMatchObject({
			owner: { pid: process.pid },
			children: [{ name: 'worker', pid: process.pid, ticks: startTicks(process.pid) }]
		});
	});
});
