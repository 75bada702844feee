import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';

/**
 * Runs the benchmarks one after the other, each in a process of its own, so that none is measured with the memory of
 * another. `npm run bench` runs all, `npm run bench -- assess` one; what follows its name goes to that benchmark.
 */

/** Each is a file of its own in this folder and prints its own table. */
const BENCHMARKS = ['assess', 'messages'];

/** @returns true when the benchmark ended well. */
async function runBenchmark(name: string, options: readonly string[]): Promise<boolean> {
	console.log(`\n== ${name}\n`);
	const file = fileURLToPath(new URL(`./${name}.ts`, import.meta.url));
	const child = spawn(process.execPath, [...process.execArgv, file, ...options], { stdio: 'inherit' });
	const [code]: unknown[] = await once(child, 'exit');
	if (code !== 0) console.error(`\n${name} did not end well (exit code ${String(code)}).`);
	return code === 0;
}

async function main(): Promise<void> {
	const [only, ...options] = process.argv.slice(2);
	if (only !== undefined && !BENCHMARKS.includes(only)) {
		throw new Error(`There is no benchmark "${only}". Choose from: ${BENCHMARKS.join(', ')}.`);
	}
	for (const name of only === undefined ? BENCHMARKS : [only]) {
		if (!(await runBenchmark(name, options))) process.exitCode = 1;
	}
}

main().catch((error: unknown) => {
	console.error(error instanceof Error ? error.message : error);
	process.exitCode = 1;
});
