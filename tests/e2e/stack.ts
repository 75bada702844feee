/** What `start-stack.ts` left for the tests of this run. */

function given(name: string): string {
	const value = process.env[name];
	if (!value) throw new Error(`${name} is not set: run the tests with -c tests/e2e/playwright.config.ts.`);
	return value;
}

/** Address of the web server. */
export const origin = (): string => given('E2E_ORIGIN');

/** Address of the parents' telephones and of the fake SMS service. */
export const fakesUrl = (): string => given('E2E_FAKES');

/** The database of this run, for looking (never for preparing what a person would do in the browser). */
export const databaseUrl = (): string => given('E2E_DATABASE_URL');

/** Folder with the demo's sign-ins (`demo-sign-ins.txt`) and the logs (`web.log`, `worker.log`, `fakes.log`). */
export const dataDir = (): string => given('E2E_DATA_DIR');
