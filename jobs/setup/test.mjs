import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { parseArgs } from 'node:util';
import { fileURLToPath } from 'node:url';
import { buildIsCurrent, buildWeb } from './build.mjs';
import { closingLine, sum } from './counts.mjs';
import { describe } from './explained.mjs';
import {
	CHROMIUM,
	dependenciesAreCurrent,
	ensureSystemPackages,
	installDependencies,
	MARIADB
} from './install.mjs';
import { signalQuietly } from './processes.mjs';
import { phase } from './progress.mjs';
import { chooseSteps, testSteps } from './test-steps.mjs';

/** `npm test`: everything that can be checked, from a fresh clone. `npm test -- --only unit,e2e` runs some steps. */

const root = resolve(fileURLToPath(new URL('../..', import.meta.url)));
const folder = join(root, '.data', 'test');
/** @type {import('node:child_process').ChildProcess | null} */
let current = null;

async function setUp() {
	console.log('\nSet-up');
	await phase('Debian packages', async (note) => {
		const installed = await ensureSystemPackages([MARIADB, CHROMIUM]);
		note(installed.length > 0 ? `installed ${installed.join(', ')}` : 'all there');
	});
	await phase('npm packages', async (note) => {
		if (dependenciesAreCurrent(root)) return note('all there');
		await installDependencies(root);
		note('installed');
	});
	mkdirSync(join(root, '.data'), { recursive: true, mode: 0o711 });
	mkdirSync(folder, { recursive: true });
}

/**
 * Runs a step's command with its output on our terminal, in a process group that is gone when it is.
 * @param {import('./test-steps.mjs').Step} step @returns {Promise<number>} its exit code
 */
function runCommand({ command: [program = '', ...args] = [], env, minutes }) {
	const child = spawn(process.execPath, [join(root, 'node_modules', program), ...args], {
		cwd: root,
		detached: true,
		env: { ...process.env, CI: 'true', ...env },
		stdio: ['ignore', 'inherit', 'inherit']
	});
	current = child;
	const endGroup = () => child.pid !== undefined && signalQuietly(-child.pid, 'SIGKILL');
	return new Promise((done) => {
		const late = setTimeout(() => {
			console.log(`This step was not done after ${minutes} minutes and was ended.`);
			endGroup();
		}, minutes * 60_000);
		const finish = (/** @type {number} */ code) => {
			clearTimeout(late);
			endGroup();
			current = null;
			done(code);
		};
		child.once('error', (error) => {
			console.log(error.message);
			finish(127);
		});
		child.once('exit', (code) => finish(code ?? 128));
	});
}

/** @param {import('./test-steps.mjs').Step} step */
async function runStep(step) {
	if (step.report) rmSync(step.report, { force: true });
	try {
		// When the build was not among the chosen steps, or a source was saved since.
		if (step.needsBuild && !buildIsCurrent(root, step.needsBuild)) await buildWeb(root, step.needsBuild);
		if (step.work === undefined) return await runCommand(step);
		await step.work(root);
		return 0;
	} catch (error) {
		console.log(describe(error));
		return 1;
	}
}

/** @param {import('./test-steps.mjs').Step[]} steps */
async function runAll(steps) {
	const results = [];
	for (const [index, step] of steps.entries()) {
		console.log(`\n[${index + 1}/${steps.length}] ${step.title}`);
		const began = performance.now();
		const code = await runStep(step);
		const report = step.report && existsSync(step.report) ? readFileSync(step.report, 'utf8') : null;
		const counts = step.count({ code, report });
		const seconds = (performance.now() - began) / 1000;
		console.log(
			`${counts.failed === 0 ? '✓' : '✗'} ${step.title}: ${closingLine(counts)} (${seconds.toFixed(1)} s)`
		);
		results.push({ step, counts, seconds });
	}
	return results;
}

/** @param {Awaited<ReturnType<typeof runAll>>} results */
function printSummary(results) {
	console.log('\nSummary');
	for (const { step, counts, seconds } of results) {
		const sign = counts.failed === 0 ? '✓' : '✗';
		const time = `${seconds.toFixed(1)} s`.padStart(8);
		console.log(`  ${sign} ${step.id.padEnd(12)} ${time}   ${closingLine(counts)}`);
	}
	const total = sum(results.map(({ counts }) => counts));
	console.log(`\n${closingLine(total)}`);
	return total;
}

for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
	process.on(signal, () => {
		// The step's own process first: it stops the database and the servers that it started.
		if (current?.pid !== undefined) signalQuietly(current.pid, 'SIGINT');
		console.log('\nStopped.');
		setTimeout(() => process.exit(130), 5000);
		current?.once('exit', () => process.exit(130));
	});
}

try {
	const { values } = parseArgs({ options: { only: { type: 'string' } } });
	const steps = chooseSteps(testSteps(folder), values.only ?? null);
	await setUp();
	const { failed } = printSummary(await runAll(steps));
	process.exitCode = failed === 0 ? 0 : 1;
} catch (error) {
	console.log(`\n${describe(error)}\n\n${closingLine({ passed: 0, failed: 1 })}`);
	process.exitCode = 1;
}
