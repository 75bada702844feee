import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { startTicks } from './processes.mjs';

/**
 * @typedef {{ name: string, pid: number, ticks: number | null }} ProcessMark A process, named for good by its id and
 *   the moment it was started.
 * @typedef {{ owner: ProcessMark, children: ProcessMark[] }} LockContent
 * @typedef {{ kind: 'held', pid: number } | { kind: 'stale', orphans: ProcessMark[] }} LockVerdict
 */

/**
 * Judges a lock that is already there. It is held while its owner lives; otherwise it is stale, and children that
 * outlived their owner are orphans to be stopped.
 * @param {string} text What the lock file holds; anything unreadable counts as stale.
 * @param {(pid: number) => number | null} ticksOf When a process was started, null when there is none.
 * @returns {LockVerdict}
 */
export function judgeLock(text, ticksOf) {
	const content = parseLock(text);
	if (content === null) return { kind: 'stale', orphans: [] };
	const alive = (/** @type {ProcessMark} */ mark) => mark.ticks !== null && ticksOf(mark.pid) === mark.ticks;
	if (alive(content.owner)) return { kind: 'held', pid: content.owner.pid };
	return { kind: 'stale', orphans: content.children.filter(alive) };
}

/** @param {string} text @returns {LockContent | null} */
function parseLock(text) {
	try {
		const value = JSON.parse(text);
		const isMark = (/** @type {unknown} */ mark) =>
			typeof mark === 'object' &&
			mark !== null &&
			'pid' in mark &&
			Number.isInteger(mark.pid) &&
			'ticks' in mark;
		if (!isMark(value.owner) || !Array.isArray(value.children) || !value.children.every(isMark)) return null;
		return value;
	} catch {
		return null;
	}
}

/**
 * Takes the lock at `path`, also over a stale one.
 * @param {string} path
 * @returns {{ taken: true, orphans: ProcessMark[], wasStale: boolean, add: (name: string, pid: number) => void, release: () => void }
 *   | { taken: false, pid: number }}
 */
export function takeLock(path) {
	/** @type {LockContent} */
	const content = { owner: mark('start', process.pid), children: [] };
	let wasStale = false;
	/** @type {ProcessMark[]} */
	let orphans = [];
	for (;;) {
		try {
			writeFileSync(path, JSON.stringify(content), { flag: 'wx', mode: 0o600 });
			break;
		} catch (error) {
			if (!(error instanceof Error && 'code' in error && error.code === 'EEXIST')) throw error;
		}
		const text = readOrNull(path);
		if (text === null) continue;
		const verdict = judgeLock(text, startTicks);
		if (verdict.kind === 'held') return { taken: false, pid: verdict.pid };
		if (!moveAway(path, text)) continue;
		wasStale = true;
		orphans = verdict.orphans;
	}
	const save = () => {
		writeFileSync(`${path}.new`, JSON.stringify(content), { mode: 0o600 });
		renameSync(`${path}.new`, path);
	};
	return {
		taken: true,
		orphans,
		wasStale,
		add: (name, pid) => {
			content.children.push(mark(name, pid));
			save();
		},
		release: () => rmSync(path, { force: true })
	};
}

/** @param {string} name @param {number} pid @returns {ProcessMark} */
function mark(name, pid) {
	return { name, pid, ticks: startTicks(pid) };
}

/**
 * Removes the lock that was judged, and no newer one that another process put there in between.
 * @param {string} path @param {string} judged
 */
function moveAway(path, judged) {
	const aside = `${path}.stale-${process.pid}`;
	try {
		renameSync(path, aside);
	} catch {
		return false;
	}
	const isTheOne = readOrNull(aside) === judged;
	if (!isTheOne) linkSync(aside, path);
	rmSync(aside, { force: true });
	return isTheOne;
}

/** @param {string} path */
function readOrNull(path) {
	try {
		return readFileSync(path, 'utf8');
	} catch {
		return null;
	}
}
