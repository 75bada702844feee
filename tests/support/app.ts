import { spawn } from 'node:child_process';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll } from 'vitest';
import { buildIsCurrent, buildWeb } from '../../jobs/setup/build.mjs';
import { freePorts } from '../../jobs/setup/ports.mjs';
import { testEnvironment } from './context';

const root = resolve(fileURLToPath(new URL('../..', import.meta.url)));

export interface App {
	/** Where it listens. */
	readonly address: string;
	/** What it believes its own origin to be; forms have to name it. */
	readonly origin: string;
	/** Every line it wrote so far. */
	readonly output: () => string;
	readonly stop: () => Promise<void>;
}

/** The built server's folder: `BUILD_DIR`, else `build/`, made anew when the sources changed since. */
async function builtServer(): Promise<string> {
	const given = process.env.BUILD_DIR;
	const folder = given ?? join(root, 'build');
	if (given === undefined && !buildIsCurrent(root, folder)) await buildWeb(root, folder);
	return folder;
}

/**
 * Starts the built web server over a test's database, on a free port, and waits until it answers; it stops with the
 * test file. Call it at the top of the file, where hooks can still be added: `const app = await startApp(database.url);`
 */
export async function startApp(databaseUrl: string, extra: Record<string, string> = {}): Promise<App> {
	const build = await builtServer();
	const [port] = await freePorts(1);
	if (port === undefined) throw new Error('The system gave no port.');
	const address = `http://127.0.0.1:${port}`;
	const env = { ...testEnvironment(databaseUrl), ORIGIN: address, LOG_LEVEL: 'warn', ...extra };
	const child = spawn(process.execPath, [build], {
		env: { PATH: process.env.PATH, NODE_ENV: 'production', HOST: '127.0.0.1', PORT: String(port), ...env },
		stdio: ['ignore', 'pipe', 'pipe']
	});
	let output = '';
	child.stdout.on('data', (text: Buffer) => (output += text.toString()));
	child.stderr.on('data', (text: Buffer) => (output += text.toString()));
	const ended = new Promise<void>((done) => child.once('exit', () => done()));
	const stop = async (): Promise<void> => {
		child.kill('SIGTERM');
		await ended;
	};
	afterAll(stop);
	await waitUntilItAnswers(
		`${address}/health/live`,
		() => child.exitCode !== null,
		() => output
	);
	return { address, origin: env.ORIGIN, output: () => output, stop };
}

/** Asks again as soon as the last question failed: the only thing to wait for is the port. */
async function waitUntilItAnswers(url: string, hasEnded: () => boolean, output: () => string): Promise<void> {
	for (let tries = 0; tries < 600; tries++) {
		if (hasEnded()) throw new Error(`The server ended before it answered:\n${output()}`);
		try {
			if ((await fetch(url)).ok) return;
		} catch {
			await new Promise((again) => setTimeout(again, 50));
		}
	}
	throw new Error(`The server did not answer:\n${output()}`);
}
