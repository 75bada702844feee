import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const LOADER = new URL('../../node_modules/tsx/dist/loader.mjs', import.meta.url).href;

export interface ChildOptions {
	readonly env: Readonly<Record<string, string>>;
	readonly args?: readonly string[];
	/** What becomes of its output; its errors are always shown. */
	readonly output?: 'ignore' | 'inherit' | 'pipe';
}

/** Starts a file of jobs/ as a process of its own, so that a signal meets the worker itself. */
export function startChild(file: string, { env, args = [], output = 'ignore' }: ChildOptions): ChildProcess {
	const path = fileURLToPath(new URL(`../${file}`, import.meta.url));
	const tsconfig = fileURLToPath(new URL('../tsconfig.json', import.meta.url));
	return spawn(process.execPath, ['--import', LOADER, path, ...args], {
		cwd: ROOT,
		env: { ...process.env, TSX_TSCONFIG_PATH: tsconfig, ...env },
		stdio: ['ignore', output, 'inherit']
	});
}

/** Resolves with the exit code, or the signal that ended it. */
export function ended(child: ChildProcess): Promise<number | string> {
	if (child.exitCode !== null) return Promise.resolve(child.exitCode);
	if (child.signalCode !== null) return Promise.resolve(child.signalCode);
	return new Promise((resolve) => child.once('exit', (code, signal) => resolve(code ?? signal ?? 'gone')));
}

export const STAND_INS = {
	ORIGIN: 'http://127.0.0.1:9',
	LINK_SECRET: 'only-for-measuring-and-breaking-the-outbox',
	TWILIO_ACCOUNT_SID: `AC${'b2'.repeat(16)}`,
	TWILIO_AUTH_TOKEN: 'only-for-measuring',
	TWILIO_FROM_NUMBER: '+12025550100',
	MAIL_FROM: 'Fadewell <follow-up@example.org>',
	FAKES_REPORT_SECONDS: '0'
} as const;

/** The settings of fakes on these ports, and of workers that speak to them. */
export function environmentOf(ports: {
	readonly http: number;
	readonly smtp: number;
}): Record<string, string> {
	return {
		...STAND_INS,
		FAKES_PORT: String(ports.http),
		FAKES_SMTP_PORT: String(ports.smtp),
		FAKES_JOURNAL: '',
		TWILIO_BASE_URL: `http://127.0.0.1:${ports.http}`,
		SMTP_HOST: '127.0.0.1',
		SMTP_PORT: String(ports.smtp),
		MAIL_SENT_LIST_URL: `http://127.0.0.1:${ports.http}/mail/sent`,
		SMS_PER_SECOND: '0',
		MAIL_PER_SECOND: '0'
	};
}
