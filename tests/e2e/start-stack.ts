import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildIsCurrent, buildWeb } from '../../jobs/setup/build.mjs';
import { openTemporaryStack } from '../../jobs/setup/temporary-stack.mjs';

const root = resolve(fileURLToPath(new URL('../..', import.meta.url)));

/**
 * Starts the product for a run of browser tests, and hands its addresses to them through the environment:
 * E2E_ORIGIN (web server), E2E_FAKES (the parents' telephones), E2E_DATABASE_URL, E2E_DATA_DIR (holds
 * demo-sign-ins.txt and the logs).
 */
export default async function startStack(): Promise<() => Promise<void>> {
	const build = process.env.BUILD_DIR ?? resolve(root, 'build');
	if (process.env.BUILD_DIR === undefined && !buildIsCurrent(root, build)) {
		console.log('Building the web server …');
		await buildWeb(root, build);
	}
	const stack = await openTemporaryStack({ root, build });
	process.env.E2E_ORIGIN = stack.origin;
	process.env.E2E_FAKES = stack.fakesUrl;
	process.env.E2E_DATABASE_URL = stack.databaseUrl;
	process.env.E2E_DATA_DIR = stack.dataDir;
	return stack.close;
}
