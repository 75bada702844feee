import { cpSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { Explained } from './explained.mjs';
import { run } from './processes.mjs';

const IN_STEP = 'No schema changes, nothing to migrate';

/**
 * Holds the migrations against the tables in the source: generating once more, into a copy, must find nothing to do.
 * The generator's exit code is no help (it is 0 even when it gave up with a question), so its words and the folder
 * are looked at.
 * @param {string} root @param {string} folder For the copy.
 * @throws Explained when they differ
 */
export async function checkMigrations(root, folder) {
	const work = join(folder, 'migrations');
	rmSync(work, { recursive: true, force: true });
	mkdirSync(work, { recursive: true });
	const copy = join(work, 'drizzle');
	cpSync(join(root, 'drizzle'), copy, { recursive: true });
	const before = readdirSync(copy, { recursive: true }).length;
	const config = join(work, 'drizzle.config.ts');
	const original = relative(work, join(root, 'drizzle.config.ts'));
	const out = relative(root, copy);
	writeFileSync(
		config,
		`import config from '${original}';\nexport default { ...config, out: './${out}' };\n`
	);
	const generator = join(root, 'node_modules', 'drizzle-kit', 'bin.cjs');
	const done = await run(process.execPath, [generator, 'generate', '--config', relative(root, config)], {
		cwd: root
	});
	const after = readdirSync(copy, { recursive: true }).length;
	rmSync(work, { recursive: true, force: true });
	if (done.code === 0 && done.output.includes(IN_STEP) && after === before) return;
	throw new Explained(
		'The tables in src/lib/server/db/schema and the migrations in drizzle/ differ.\n' +
			`Run npm run db:generate, read the SQL it writes, and commit both. The generator said:\n${done.output.trim()}`
	);
}
