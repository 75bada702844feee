import { z } from 'zod';

/**
 * Every setting of the web server and the jobs, read from the environment once, on first use.
 * The only reader of `process.env` under src/: whoever needs a setting takes it from `getConfig()`.
 */

const port = z.coerce.number().int().min(1).max(65535);
const url = z.url({ protocol: /^https?$/ }).transform((value) => value.replace(/\/+$/, ''));
const optionalText = z
	.string()
	.optional()
	.transform((value) => (value === undefined || value.trim() === '' ? undefined : value));
const flag = z.enum(['0', '1']).transform((value) => value === '1');

const environment = z
	.object({
		DATABASE_URL: z.url({ protocol: /^(mysql|mariadb)$/ }),
		ORIGIN: url,
		HOST: z.string().min(1).default('127.0.0.1'),
		PORT: port.default(4310),
		LINK_SECRET: z.string().min(32, 'at least 32 characters'),
		TWILIO_ACCOUNT_SID: z.string().regex(/^AC[0-9a-f]{32}$/, 'AC and 32 hexadecimal digits'),
		TWILIO_AUTH_TOKEN: z.string().min(1),
		TWILIO_FROM_NUMBER: z.string().regex(/^\+[1-9]\d{6,14}$/, 'a number in E.164 form, such as +12025550100'),
		TWILIO_BASE_URL: url.optional(),
		SMTP_HOST: z.string().min(1),
		SMTP_PORT: port,
		SMTP_USER: optionalText,
		SMTP_PASS: optionalText,
		MAIL_FROM: z.string().min(3),
		WORKER_ID: optionalText,
		LOG_LEVEL: z.enum(['silent', 'fatal', 'error', 'warn', 'info', 'debug', 'trace']).default('info'),
		PUBLIC_BASE_URL: url.optional(),
		DEMO: flag.default(false),
		DATA_DIR: z.string().min(1).default('.data')
	})
	.transform((env) => ({
		databaseUrl: env.DATABASE_URL,
		/** Where staff reach the web server; cookies are `Secure` exactly when it is https. */
		origin: env.ORIGIN,
		host: env.HOST,
		port: env.PORT,
		/** Where parents' links point; the origin unless a reverse proxy gives parents another name. */
		publicBaseUrl: env.PUBLIC_BASE_URL ?? env.ORIGIN,
		/** Key of the keyed hash under which parents' link tokens are stored. */
		linkSecret: env.LINK_SECRET,
		sms: {
			accountSid: env.TWILIO_ACCOUNT_SID,
			authToken: env.TWILIO_AUTH_TOKEN,
			fromNumber: env.TWILIO_FROM_NUMBER,
			/** Set when messages go to a local fake instead of the provider. */
			baseUrl: env.TWILIO_BASE_URL
		},
		mail: {
			host: env.SMTP_HOST,
			port: env.SMTP_PORT,
			user: env.SMTP_USER,
			pass: env.SMTP_PASS,
			from: env.MAIL_FROM
		},
		/** Names this worker in claims; the worker makes one up when it is absent. */
		workerId: env.WORKER_ID,
		logLevel: env.LOG_LEVEL,
		/** True where the demo's invented newborns and sign-ins exist. */
		demo: env.DEMO,
		/** Folder for local files that are not in the database, such as the demo's sign-ins. */
		dataDir: env.DATA_DIR
	}));

export type Config = Readonly<z.output<typeof environment>>;

/**
 * Turns an environment into settings.
 * @throws Error naming every variable that is missing or malformed, and what was expected; values are never repeated.
 */
export function parseConfig(env: Readonly<Record<string, string | undefined>>): Config {
	const parsed = environment.safeParse(env);
	if (parsed.success) return parsed.data;
	const lines = parsed.error.issues.map((issue) => {
		const name = issue.path.join('.');
		return env[name] === undefined ? `  ${name} is not set` : `  ${name}: ${issue.message}`;
	});
	throw new Error(
		`The environment is not complete:\n${lines.join('\n')}\nSee .env.example for what each one means.`
	);
}

let cached: Config | undefined;

/** The settings of this process. Lazy, so that building and type checking need no environment. */
export function getConfig(): Config {
	cached ??= parseConfig(process.env);
	return cached;
}
