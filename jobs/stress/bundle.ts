import { rmSync } from 'node:fs';
import { basename } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/**
 * Makes one plain file of each job, which starts in a fraction of the time: workers are killed and started again by the
 * hundred, and a measurement should not hold the translating of TypeScript. Returns their paths in the order asked.
 */
export async function bundleJobs(files: readonly string[]): Promise<string[]> {
	const outDir = fileURLToPath(
		new URL(`../../node_modules/.cache/fadewell-jobs/${process.pid}`, import.meta.url)
	);
	process.once('exit', () => rmSync(outDir, { recursive: true, force: true }));
	const names = files.map((file) => basename(file, '.ts'));
	await build({
		root: ROOT,
		configFile: false,
		logLevel: 'error',
		build: {
			ssr: true,
			outDir,
			target: 'node20',
			emptyOutDir: true,
			minify: false,
			rolldownOptions: { input: Object.fromEntries(files.map((file, index) => [names[index] ?? file, file])) }
		}
	});
	return names.map((name) => `${outDir}/${name}.js`);
}
