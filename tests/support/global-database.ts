import type { TestProject } from 'vitest/node';
import { openTemporaryDatabase } from '../../jobs/setup/temporary-database.mjs';

declare module 'vitest' {
	interface ProvidedContext {
		/** Address of the private MariaDB of this run; its account may create databases. */
		mariadbUrl: string;
	}
}

/** One private MariaDB for a whole run. */
export default async function startForRun(project: TestProject): Promise<() => Promise<void>> {
	const database = await openTemporaryDatabase();
	project.provide('mariadbUrl', database.url);
	return database.close;
}
