import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** Makes one plain file of a worker, which starts in a fraction of the time: hundreds are killed and started again. */
export async function bundleWorker(): Promise<string> {
	const outDir = fileURLToPath(new URL('../../node_modules/.cache/fadewell-stress', import.meta.url));
	await build({
		root: ROOT,
		configFile: false,
		logLevel: 'error',
		build: { ssr: 'jobs/stress/plain-worker.ts', outDir, target: 'node20', emptyOutDir: true, minify: false }
	});
	return `${outDir}/plain-worker.js`;
}
