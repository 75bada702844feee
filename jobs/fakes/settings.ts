import { z } from 'zod';

const port = (fallback: number) => z.coerce.number().int().min(0).max(65535).default(fallback);

const environment = z.object({
	FAKES_HOST: z.string().default('127.0.0.1'),
	FAKES_PORT: port(4311),
	FAKES_SMTP_PORT: port(4312),
	TWILIO_ACCOUNT_SID: z.string().regex(/^AC[0-9a-f]{32}$/, 'AC and 32 hexadecimal digits'),
	TWILIO_AUTH_TOKEN: z.string().min(1),
	TWILIO_FROM_NUMBER: z.string(),
	ORIGIN: z.url().optional(),
	/** Where a text message of a parent is posted to; by default the product's own endpoint. */
	FAKES_INBOUND_URL: z.url().optional(),
	/** A text message counts as delivered after this long; 0 for no reports at all. */
	FAKES_REPORT_SECONDS: z.coerce.number().min(0).default(2),
	/** Longest time that the SMS service takes to answer, drawn for each call. */
	FAKES_LATENCY_MS: z.coerce.number().min(0).default(0),
	/** File that keeps what was sent over a restart; empty for none. By default in DATA_DIR. */
	FAKES_JOURNAL: z.string().optional(),
	DATA_DIR: z.string().optional()
});

export interface FakesSettings {
	readonly host: string;
	/** 0 takes any free port. */
	readonly port: number;
	readonly smtpPort: number;
	readonly accountSid: string;
	readonly authToken: string;
	/** The product's own number: telephones answer to it. */
	readonly fromNumber: string;
	readonly inboundUrl: string | null;
	readonly reportSeconds: number;
	readonly latencyMilliseconds: number;
	readonly journal: string | null;
}

/** @throws ZodError naming what is missing or malformed. */
export function parseFakesSettings(env: Readonly<Record<string, string | undefined>>): FakesSettings {
	const parsed = environment.parse(env);
	const inbound =
		parsed.ORIGIN === undefined ? null : `${parsed.ORIGIN.replace(/\/+$/, '')}/webhooks/sms/inbound`;
	return {
		host: parsed.FAKES_HOST,
		port: parsed.FAKES_PORT,
		smtpPort: parsed.FAKES_SMTP_PORT,
		accountSid: parsed.TWILIO_ACCOUNT_SID,
		authToken: parsed.TWILIO_AUTH_TOKEN,
		fromNumber: parsed.TWILIO_FROM_NUMBER,
		inboundUrl: parsed.FAKES_INBOUND_URL ?? inbound,
		reportSeconds: parsed.FAKES_REPORT_SECONDS,
		latencyMilliseconds: parsed.FAKES_LATENCY_MS,
		journal: journalOf(parsed)
	};
}

function journalOf({ FAKES_JOURNAL: file, DATA_DIR: folder }: z.output<typeof environment>): string | null {
	if (file !== undefined) return file === '' ? null : file;
	return folder === undefined || folder === '' ? null : `${folder}/fakes.jsonl`;
}
