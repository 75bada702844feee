import pino from 'pino';

const REDACTED = [
	'name',
	'phone',
	'email',
	'token',
	'password',
	'body',
	'to',
	'*.name',
	'*.phone',
	'*.email',
	'*.token',
	'*.password',
	'*.body',
	'*.to'
];

/** JSON lines without names, telephone numbers, addresses or words of a family. */
export function createLog(level: string, bindings: Record<string, string> = {}) {
	return pino({ level, base: bindings, redact: { paths: REDACTED, censor: '[redacted]' } });
}

export type Log = ReturnType<typeof createLog>;
