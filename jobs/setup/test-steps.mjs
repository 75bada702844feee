import { join } from 'node:path';
import { compileTexts } from './build.mjs';
import { countPlaywright, countStep, countVitest } from './counts.mjs';
import { Explained } from './explained.mjs';

/**
 * @typedef {object} Step One part of `npm test`.
 * @property {string} id The name for `--only`.
 * @property {string} title
 * @property {string[]} [command] Under node_modules, run by this Node.
 * @property {(root: string) => Promise<void>} [work] In place of a command.
 * @property {Record<string, string>} [env]
 * @property {string} [needsBuild] The folder that must hold a current build of the web server.
 * @property {string} [report] The file its JSON report is written to.
 * @property {(outcome: import('./counts.mjs').Outcome) => import('./counts.mjs').Counts} count
 * @property {number} minutes When it has to be done; a step that hangs fails instead of holding up the rest.
 */

/**
 * Every step, in order: the cheap ones first, and the built server before those that start it.
 * @param {string} folder For reports and the built server; in no way of a running product.
 * @returns {Step[]}
 */
export function testSteps(folder) {
	const buildDir = join(folder, 'build');
	const vitest = (/** @type {string} */ project) => {
		const report = join(folder, `${project}.json`);
		return {
			command: [
				...['vitest/vitest.mjs', 'run', '--project', project],
				...['--reporter=default', '--reporter=json', `--outputFile.json=${report}`]
			],
			report,
			count: countVitest
		};
	};
	const browserReport = join(folder, 'e2e.json');
	return [
		{
			id: 'sync',
			title: 'Generated types',
			command: ['@sveltejs/kit/svelte-kit.js', 'sync'],
			count: countStep,
			minutes: 15
		},
		{ id: 'texts', title: 'Message catalogues compile', work: compileTexts, count: countStep, minutes: 30 },
		{
			id: 'format',
			title: 'Format',
			command: ['prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.'],
			count: countStep,
			minutes: 15
		},
		{
			id: 'lint',
			title: 'Lint',
			command: ['eslint/bin/eslint.js', '-c', 'tests/lint/eslint.config.js', '--max-warnings', '0', '.'],
			count: countStep,
			minutes: 45
		},
		{
			id: 'imports',
			title: 'What may import what',
			command: [
				...['dependency-cruiser/bin/dependency-cruise.mjs', '--config', '.dependency-cruiser.cjs'],
				...['--output-type', 'err-long', 'src', 'jobs', 'tests']
			],
			count: countStep,
			minutes: 15
		},
		{
			id: 'check',
			title: 'Types of the web server',
			command: ['svelte-check/bin/svelte-check', '--tsconfig', './tsconfig.json', '--fail-on-warnings'],
			count: countStep,
			minutes: 45
		},
		{
			id: 'tsc',
			title: 'Types of the jobs and tests',
			command: ['typescript/bin/tsc', '-p', 'jobs/tsconfig.json', '--noEmit'],
			count: countStep,
			minutes: 45
		},
		{
			id: 'schema',
			title: 'Schema and migrations agree',
			work: async (root) => (await import('./schema-check.mjs')).checkMigrations(root, folder),
			count: countStep,
			minutes: 15
		},
		{ id: 'unit', title: 'Unit tests', ...vitest('unit'), minutes: 30 },
		{
			id: 'build',
			title: 'Build of the web server',
			work: async (root) => {
				const { buildWeb } = await import('./build.mjs');
				await buildWeb(root, buildDir);
			},
			count: countStep,
			minutes: 45
		},
		{
			id: 'integration',
			title: 'Integration tests, against a real MariaDB',
			...vitest('integration'),
			env: { BUILD_DIR: buildDir },
			needsBuild: buildDir,
			minutes: 45
		},
		{
			id: 'e2e',
			title: 'End-to-end tests, in Chromium',
			command: ['@playwright/test/cli.js', 'test', '-c', 'tests/e2e/playwright.config.ts'],
			env: {
				BUILD_DIR: buildDir,
				PLAYWRIGHT_JSON_OUTPUT_FILE: browserReport,
				PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: '1'
			},
			needsBuild: buildDir,
			report: browserReport,
			count: countPlaywright,
			minutes: 45
		}
	];
}

/**
 * The steps that were asked for.
 * @param {Step[]} steps @param {string | null} only Names with commas between; null for all.
 * @returns {Step[]}
 * @throws Explained naming what there is to choose from, when a name is unknown
 */
export function chooseSteps(steps, only) {
	if (only === null) return steps;
	const wanted = only.split(',').map((name) => name.trim());
	const unknown = wanted.filter((name) => !steps.some((step) => step.id === name));
	if (unknown.length > 0) {
		throw new Explained(
			`There is no step "${unknown.join('", "')}". Choose from: ${steps.map((step) => step.id).join(', ')}.`
		);
	}
	return steps.filter((step) => wanted.includes(step.id));
}
