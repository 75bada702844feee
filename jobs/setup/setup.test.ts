import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { parseConfig } from '../../src/lib/server/config';
import { localVariables, mergeVariables, readVariables, saveVariables } from './environment.mjs';
import { aptCommand } from './install.mjs';
import { choosePorts, DEFAULT_PORTS, freePorts, isFree } from './ports.mjs';
import { loadSecrets, makeSecrets } from './secrets.mjs';
import { chooseSteps, testSteps } from './test-steps.mjs';

const folder = mkdtempSync(join(tmpdir(), 'fadewell-setup-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe('ports', () => {
	test('are the defaults until the environment moves one', () => {
		expect(choosePorts({})).toEqual({ web: 4310, fakes: 4311, smtp: 4312, database: 4313 });
		expect(choosePorts({ DATABASE_PORT: '5000' })).toMatchObject({ web: 4310, database: 5000 });
	});

	test.each(['0', '65536', '43.5', 'web', '-1'])(
		'refuse %s with a sentence that names the variable',
		(value) => {
			expect(() => choosePorts({ PORT: value })).toThrow(/^PORT is ".*", which is not a port/);
		}
	);

	test('refuse the same number for two services', () => {
		expect(() => choosePorts({ PORT: '4311' })).toThrow('PORT and FAKES_PORT are both 4311');
	});

	test('that are free all differ and can be listened on', async () => {
		const ports = await freePorts(5);
		expect(new Set(ports).size).toBe(5);
		expect(await Promise.all(ports.map(isFree))).toEqual([true, true, true, true, true]);
	});
});

describe('installing Debian packages', () => {
	test('root installs at once, sudo without a password does it, and anybody else is told the command', () => {
		expect(aptCommand({ uid: 0, hasSudo: false }, ['update'])?.[0]).toBe('env');
		expect(aptCommand({ uid: 1000, hasSudo: true }, ['update'])?.slice(0, 2)).toEqual(['sudo', '-n']);
		expect(aptCommand({ uid: 1000, hasSudo: false }, ['update'])).toBeNull();
	});
});

describe('settings of a local stack', () => {
	const local = localVariables({ ports: choosePorts({}), secrets: makeSecrets(), dataDir: folder });

	test('are complete for the web server and the worker', () => {
		expect(parseConfig(local)).toMatchObject({
			origin: `http://127.0.0.1:${DEFAULT_PORTS.web.port}`,
			sms: { baseUrl: `http://127.0.0.1:${DEFAULT_PORTS.fakes.port}` },
			mail: { port: DEFAULT_PORTS.smtp.port },
			demo: true
		});
	});

	test('come back from the file that keeps them, which only its owner can read', () => {
		saveVariables(folder, local);
		expect(readVariables(join(folder, 'env'))).toEqual(local);
		expect(statSync(join(folder, 'env')).mode & 0o777).toBe(0o600);
	});

	test('yield to .env, but never leave the private database', () => {
		const { variables, remarks } = mergeVariables(local, {
			LOG_LEVEL: 'debug',
			DATABASE_URL: 'mysql://elsewhere/x'
		});
		expect(variables).toMatchObject({ LOG_LEVEL: 'debug', DATABASE_URL: local.DATABASE_URL, DEMO: '1' });
		expect(remarks).toHaveLength(1);
	});

	test('drop the demo when messages would reach a real provider', () => {
		const real = mergeVariables(local, {
			TWILIO_ACCOUNT_SID: `AC${'1'.repeat(32)}`,
			TWILIO_AUTH_TOKEN: 'token'
		});
		expect(real.variables.DEMO).toBe('0');
		expect(real.variables.TWILIO_BASE_URL).toBeUndefined();
		expect(mergeVariables(local, { SMTP_HOST: 'mail.example.org' }).variables.DEMO).toBe('0');
	});
});

describe('secrets', () => {
	test('are made once, differ between clones, and only their owner can read them', () => {
		const first = loadSecrets(folder);
		expect(loadSecrets(folder)).toEqual(first);
		expect(makeSecrets().linkSecret).not.toBe(first.linkSecret);
		expect(statSync(join(folder, 'secrets.json')).mode & 0o777).toBe(0o600);
	});

	test('are not replaced without a word when the file is damaged', () => {
		const path = join(folder, 'secrets.json');
		const whole = readFileSync(path, 'utf8');
		writeFileSync(path, whole.slice(0, 40));
		expect(() => loadSecrets(folder)).toThrow(/is damaged/);
		expect(readFileSync(path, 'utf8')).toBe(whole.slice(0, 40));
	});
});

describe('the steps of the test command', () => {
	const steps = testSteps(folder);

	test('have a name of their own each, and the server is built before the steps that start it', () => {
		const ids = steps.map((step) => step.id);
		expect(new Set(ids).size).toBe(ids.length);
		expect(ids.indexOf('build')).toBeLessThan(ids.indexOf('integration'));
		expect(ids.indexOf('build')).toBeLessThan(ids.indexOf('e2e'));
	});

	test('can be chosen by name, in their own order; an unknown name is refused', () => {
		expect(chooseSteps(steps, null)).toEqual(steps);
		expect(chooseSteps(steps, 'e2e, unit').map((step) => step.id)).toEqual(['unit', 'e2e']);
		expect(() => chooseSteps(steps, 'unit,nonsense')).toThrow(/no step "nonsense".*sync.*e2e/);
	});
});
