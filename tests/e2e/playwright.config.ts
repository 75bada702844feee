import { defineConfig } from '@playwright/test';

const report = process.env.PLAYWRIGHT_JSON_OUTPUT_FILE;

/** The stack is started by `start-stack.ts`, which puts its addresses into the environment of the tests. */
export default defineConfig({
	testDir: '.',
	outputDir: '../../test-results',
	globalSetup: './start-stack.ts',
	timeout: 60_000,
	expect: { timeout: 10_000 },
	// One database is shared by all tests, and two cores by everything.
	workers: 1,
	fullyParallel: false,
	retries: 0,
	forbidOnly: process.env.CI !== undefined,
	reporter: report ? [['list'], ['json', { outputFile: report }]] : [['list']],
	use: {
		baseURL: process.env.E2E_ORIGIN,
		locale: 'en-US',
		timezoneId: 'America/Chicago',
		screenshot: 'only-on-failure',
		trace: 'off',
		launchOptions: {
			executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
			args: [
				'--no-sandbox',
				'--disable-gpu',
				'--disable-quic',
				'--no-first-run',
				'--disable-background-networking',
				'--disable-component-update',
				'--disable-sync'
			]
		}
	},
	projects: [{ name: 'chromium', use: { viewport: { width: 1280, height: 800 } } }]
});
