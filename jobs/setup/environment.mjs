import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { parseEnv } from 'node:util';
import { databaseUrl } from './mariadb.mjs';
import { DEFAULT_PORTS, LOOPBACK } from './ports.mjs';

/** @typedef {Record<string, string>} Variables */

/**
 * Settings from the git-ignored `.env` at the top of the project; none when there is no such file.
 * @param {string} root @returns {Variables}
 */
export function readDotEnv(root) {
	return readVariables(join(root, '.env'));
}

/** @param {string} path @returns {Variables} */
export function readVariables(path) {
	if (!existsSync(path)) return {};
	/** @type {Variables} */
	const variables = {};
	for (const [name, value] of Object.entries(parseEnv(readFileSync(path, 'utf8')))) {
		if (value !== undefined) variables[name] = value;
	}
	return variables;
}

/**
 * The settings of a local stack: the private database, the fakes, and the web server on loopback.
 * @param {{ ports: Record<import('./ports.mjs').PortName, number>, secrets: import('./secrets.mjs').Secrets, dataDir: string }} local
 * @returns {Variables}
 */
export function localVariables({ ports, secrets, dataDir }) {
	const origin = `http://${LOOPBACK}:${ports.web}`;
	return {
		DATABASE_URL: databaseUrl({ port: ports.database, password: secrets.databasePassword }),
		ORIGIN: origin,
		HOST: LOOPBACK,
		PORT: String(ports.web),
		PUBLIC_BASE_URL: origin,
		LINK_SECRET: secrets.linkSecret,
		TWILIO_ACCOUNT_SID: secrets.smsAccount,
		TWILIO_AUTH_TOKEN: secrets.smsToken,
		TWILIO_FROM_NUMBER: '+12025550100',
		TWILIO_BASE_URL: `http://${LOOPBACK}:${ports.fakes}`,
		FAKES_PORT: String(ports.fakes),
		FAKES_SMTP_PORT: String(ports.smtp),
		SMTP_HOST: LOOPBACK,
		SMTP_PORT: String(ports.smtp),
		MAIL_SENT_LIST_URL: `http://${LOOPBACK}:${ports.fakes}/mail/sent`,
		MAIL_FROM: 'Fadewell <follow-up@example.org>',
		LOG_LEVEL: 'info',
		DEMO: '1',
		DATA_DIR: dataDir,
		SHUTDOWN_TIMEOUT: '5',
		BODY_SIZE_LIMIT: '4M'
	};
}

/**
 * Lays the person's `.env` over the local settings; its ports are in them already. The database stays the private one,
 * and with a real provider in place of a fake the demo is off: its newborns' messages must not leave this machine.
 * @param {Variables} local @param {Variables} own
 * @returns {{ variables: Variables, remarks: string[] }}
 */
export function mergeVariables(local, own) {
	const { DATABASE_URL: foreignDatabase, ...rest } = own;
	for (const { variable } of Object.values(DEFAULT_PORTS)) delete rest[variable];
	const variables = { ...local, ...rest };
	const remarks = [];
	if (foreignDatabase !== undefined) {
		remarks.push('DATABASE_URL of .env is not used: npm start works on its private database only.');
	}
	const ownSms = 'TWILIO_ACCOUNT_SID' in own && !('TWILIO_BASE_URL' in own);
	const ownMail = 'SMTP_HOST' in own && own.SMTP_HOST !== LOOPBACK;
	if (ownSms) delete variables.TWILIO_BASE_URL;
	if (ownMail && !('MAIL_SENT_LIST_URL' in own)) delete variables.MAIL_SENT_LIST_URL;
	if (ownSms || ownMail) {
		variables.DEMO = '0';
		remarks.push('.env names a real provider, so the demo is off: no invented message leaves this machine.');
	}
	return { variables, remarks };
}

/**
 * Leaves the settings where `npm run worker`, `npm run demo` and the like find them.
 * @param {string} dataDir @param {Variables} variables
 */
export function saveVariables(dataDir, variables) {
	const text = Object.entries(variables).map(([name, value]) => `${name}=${quote(value)}\n`);
	writeFileSync(join(dataDir, 'env'), text.join(''), { mode: 0o600 });
}

/** @param {string} value */
function quote(value) {
	return /^[\w.:/@+-]*$/.test(value) ? value : `"${value.replaceAll('"', '')}"`;
}
