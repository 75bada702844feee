import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { parseEnv } from 'node:util';
import { describe, expect, test } from 'vitest';
import { parse } from 'yaml';
import { z } from 'zod';
import { localVariables } from '../../jobs/setup/environment.mjs';
import { DATABASE_NAME, DATABASE_USER, SERVER_SETTINGS } from '../../jobs/setup/mariadb.mjs';
import { choosePorts, DEFAULT_PORTS, LOOPBACK } from '../../jobs/setup/ports.mjs';
import { makeSecrets } from '../../jobs/setup/secrets.mjs';
import { jobCommand } from '../../jobs/setup/stack.mjs';
import { parseConfig } from '../../src/lib/server/config';

const root = resolve(import.meta.dirname, '../..');
const text = (file: string) => readFileSync(resolve(root, file), 'utf8');

const service = z.object({
	image: z.string(),
	network_mode: z.string(),
	command: z.array(z.string()),
	environment: z.record(z.string(), z.string()),
	volumes: z.array(z.string())
});
const compose = z
	.object({ services: z.object({ database: service, fakes: service }).strict() })
	.parse(parse(text('docker-compose.local-fakes.yml')));
const { database, fakes } = compose.services;
const example = parseEnv(text('.env.example'));

describe('docker-compose.local-fakes.yml', () => {
	test('runs the database with the port and the settings of the start command', () => {
		expect(database.command).toEqual([`--port=${DEFAULT_PORTS.database.port}`, ...SERVER_SETTINGS]);
		expect(database.environment).toMatchObject({
			MARIADB_DATABASE: DATABASE_NAME,
			MARIADB_USER: DATABASE_USER
		});
	});

	test('runs the fakes by the command of the start command', () => {
		const { args, env } = jobCommand(root, 'jobs/fakes/main.ts');
		const relative = (path: string) => path.replace('file://', '').replace(`${root}/`, '');
		const [program, ...given] = fakes.command;
		expect(program).toBe('node');
		expect(given.map((arg) => arg.replace('./', ''))).toEqual(args.map(relative));
		expect(fakes.environment.TSX_TSCONFIG_PATH).toBe(relative(env.TSX_TSCONFIG_PATH ?? ''));
	});

	test('gives the fakes the ports of the start command', () => {
		const local = localVariables({ ports: choosePorts({}), secrets: makeSecrets(), dataDir: '/app/.data' });
		const named = ['FAKES_PORT', 'FAKES_SMTP_PORT', 'DATA_DIR'];
		expect(Object.keys(fakes.environment)).toEqual([...named, 'TSX_TSCONFIG_PATH']);
		for (const name of named) expect(fakes.environment[name], name).toBe(local[name]);
	});

	test('keeps everything on the loopback address, and no password in the file', () => {
		expect([database.network_mode, fakes.network_mode]).toEqual(['host', 'host']);
		expect(database.command).toContain(`--bind-address=${LOOPBACK}`);
		expect(database.environment.MARIADB_PASSWORD).toMatch(/^\$\{DATABASE_PASSWORD:\?/);
	});

	test('uses the Node of the project', () => {
		const { engines } = z
			.object({ engines: z.object({ node: z.string() }) })
			.parse(JSON.parse(text('package.json')));
		const [, major] = /^node:(\d+)-/.exec(fakes.image) ?? [];
		expect(engines.node).toContain(`>=${major}.`);
	});
});

describe('.env.example', () => {
	test('is complete once its one blank is filled in, and leads to the services of the compose file', () => {
		expect(() => parseConfig(example)).toThrow(/LINK_SECRET/);
		const config = parseConfig({ ...example, LINK_SECRET: 'x'.repeat(44) });
		expect(config.databaseUrl).toBe(
			`mysql://${DATABASE_USER}:${example.DATABASE_PASSWORD}@${LOOPBACK}:${DEFAULT_PORTS.database.port}/${DATABASE_NAME}`
		);
		expect(config.sms.baseUrl).toBe(`http://${LOOPBACK}:${fakes.environment.FAKES_PORT}`);
		expect(String(config.mail.port)).toBe(fakes.environment.FAKES_SMTP_PORT);
		expect(config.port).toBe(DEFAULT_PORTS.web.port);
		expect(config.demo).toBe(false);
	});
});
