import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, Explained } from './explained.mjs';
import { BUILD_SOURCES, fingerprint } from './fingerprint.mjs';
import { run } from './processes.mjs';

/** Inside the built folder, which a new build empties first: a stamp never outlives what it vouches for. */
const STAMP = '.fingerprint';

/** @param {string} root */
function sourcesFingerprint(root) {
	return fingerprint(root, BUILD_SOURCES, [process.version]);
}

/**
 * True when `folder` holds the web server built from the present sources.
 * @param {string} root @param {string} folder
 */
export function buildIsCurrent(root, folder) {
	// The jobs read the compiled texts as well, and those are not part of the built folder.
	if (!existsSync(join(root, 'src', 'lib', 'paraglide', 'runtime.js'))) return false;
	try {
		return readFileSync(join(folder, STAMP), 'utf8') === sourcesFingerprint(root);
	} catch {
		return false;
	}
}

/**
 * Builds the web server into `folder`.
 * @param {string} root @param {string} folder
 * @param {{ signal?: AbortSignal, onOutput?: (text: string) => void }} [options]
 */
export async function buildWeb(root, folder, { signal, onOutput } = {}) {
	const before = sourcesFingerprint(root);
	const vite = join(root, 'node_modules', 'vite', 'bin', 'vite.js');
	const done = await run(process.execPath, [vite, 'build'], {
		cwd: root,
		env: { ...process.env, NODE_ENV: 'production', NO_COLOR: '1', BUILD_DIR: folder },
		signal,
		onOutput
	});
	if (done.code !== 0) {
		throw new Explained(`Building failed:\n${done.output.trim().split('\n').slice(-40).join('\n')}`);
	}
	// Of the sources as they were at the start: a file saved meanwhile must lead to a new build.
	writeFileSync(join(folder, STAMP), before);
}

/**
 * Compiles the message catalogues alone; the build does it by itself.
 * @param {string} root @param {{ signal?: AbortSignal }} [options]
 */
export async function compileTexts(root, { signal } = {}) {
	const program = join(root, 'node_modules', '@inlang', 'paraglide-js', 'bin', 'run.js');
	const args = ['compile', '--project', './src/lib/i18n/project.inlang', '--outdir', './src/lib/paraglide'];
	const done = await run(process.execPath, [program, ...args, '--strategy', 'baseLocale'], {
		cwd: root,
		signal
	});
	if (done.code !== 0) throw new Explained(`Compiling the texts failed:\n${done.output.trim()}`);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	const root = resolve(dirname(fileURLToPath(import.meta.url)), '..', '..');
	try {
		await buildWeb(root, join(root, 'build'), { onOutput: (text) => process.stdout.write(text) });
	} catch (error) {
		console.error(describe(error));
		process.exitCode = 1;
	}
}
