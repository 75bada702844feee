import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/mysql2';
import { migrate } from 'drizzle-orm/mysql2/migrator';
import mysql from 'mysql2/promise';

const MIGRATIONS = fileURLToPath(new URL('../drizzle', import.meta.url));
const LOCK_WAIT_SECONDS = 120;

/**
 * Brings the database at `url` to the newest migration in `drizzle/`, while no other process does the same:
 * table changes are not transactional in MariaDB, so two at once would leave a half-made schema.
 * @throws when the lock is not given within two minutes, or with the database's own words when a migration fails.
 */
export async function applyMigrations(url: string): Promise<void> {
	if (!existsSync(join(MIGRATIONS, 'meta', '_journal.json'))) {
		throw new Error('There are no migrations in drizzle/. Make them with: npm run db:generate');
	}
	const connection = await mysql.createConnection({ uri: url, timezone: 'Z' });
	try {
		const lock = lockName(url);
		const [rows] = await connection.query<mysql.RowDataPacket[]>('select get_lock(?, ?) as held', [
			lock,
			LOCK_WAIT_SECONDS
		]);
		if (rows[0]?.held !== 1) {
			throw new Error(`Another process has been migrating this database for ${LOCK_WAIT_SECONDS} seconds.`);
		}
		// The lock belongs to the connection: the server gives it back even if this process dies here.
		await migrate(drizzle(connection), { migrationsFolder: MIGRATIONS });
		await connection.query('do release_lock(?)', [lock]);
	} finally {
		await connection.end();
	}
}

/** Named locks belong to the whole server and hold at most 64 characters, hence the database's name as a digest. */
function lockName(url: string): string {
	const database = new URL(url).pathname.slice(1);
	return `fadewell-migrate-${createHash('sha256').update(database).digest('hex').slice(0, 16)}`;
}

async function main(): Promise<void> {
	const url = process.env.DATABASE_URL;
	if (!url) throw new Error('DATABASE_URL is not set.');
	await applyMigrations(url);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	main().catch((error: unknown) => {
		const cause = error instanceof Error && error.cause instanceof Error ? error.cause.message : '';
		console.error(`Migrating failed: ${error instanceof Error ? error.message : String(error)}`);
		if (cause) console.error(`The database said: ${cause}`);
		process.exitCode = 1;
	});
}
