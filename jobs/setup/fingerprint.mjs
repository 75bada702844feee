import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { join, relative, sep } from 'node:path';

/** Everything that the built web server is made of. */
export const BUILD_SOURCES = Object.freeze([
	'src',
	'static',
	'svelte.config.js',
	'vite.config.ts',
	'tailwind.config.ts',
	'tsconfig.json',
	'package.json',
	'package-lock.json'
]);

/** Generated from other sources, or not part of the build. */
const LEFT_OUT = [
	/^src\/lib\/paraglide\//,
	/\.test\.ts$/,
	/project\.inlang\/(cache|\.meta\.json|README\.md|\.gitignore)/
];

/**
 * A digest of the names and contents of files, the same on every machine with the same files.
 * @param {string} root
 * @param {readonly string[]} sources Files and folders under `root`; one that does not exist counts as absent.
 * @param {readonly string[]} [also] Other facts that the result depends on, such as the version of Node.
 * @returns {string} hexadecimal
 */
export function fingerprint(root, sources, also = []) {
	const hash = createHash('sha256');
	for (const fact of also) hash.update(`fact ${fact.length} ${fact}`);
	for (const source of sources) {
		for (const file of filesUnder(root, join(root, source)).sort()) {
			const content = readFileSync(join(root, file));
			hash.update(`file ${file} ${content.length} `);
			hash.update(content);
		}
	}
	return hash.digest('hex');
}

/** @param {string} root @param {string} path @returns {string[]} paths under `root`, with forward slashes */
function filesUnder(root, path) {
	if (!existsSync(path)) return [];
	const name = relative(root, path).split(sep).join('/');
	if (statSync(path).isDirectory()) {
		if (LEFT_OUT.some((pattern) => pattern.test(`${name}/`))) return [];
		return readdirSync(path).flatMap((entry) => filesUnder(root, join(path, entry)));
	}
	return LEFT_OUT.some((pattern) => pattern.test(name)) ? [] : [name];
}
