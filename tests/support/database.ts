import { randomBytes } from 'node:crypto';
import mysql from 'mysql2/promise';
import { afterAll, inject } from 'vitest';
import { applyMigrations } from '../../jobs/migrate';
import { type Db, openDatabase } from '../../src/lib/server/db/client';

export interface TestDatabase {
	/** For child processes that a test starts: their DATABASE_URL. */
	readonly url: string;
	readonly db: Db;
	readonly pool: mysql.Pool;
	/** Empties every table; call it in `beforeEach`. */
	readonly clean: () => Promise<void>;
}

/**
 * A database of one test file's own, made by the real migrations on the run's private MariaDB and dropped when the
 * file is done. Call it once at the top of the file: `const database = await openTestDatabase();`
 */
export async function openTestDatabase(): Promise<TestDatabase> {
	const server = inject('mariadbUrl');
	const name = `test_${randomBytes(6).toString('hex')}`;
	await onServer(server, `create database ${name}`);
	const url = new URL(server);
	url.pathname = `/${name}`;
	await applyMigrations(url.href);
	const { db, pool, close } = openDatabase(url.href);
	afterAll(async () => {
		await close();
		await onServer(server, `drop database ${name}`);
	});
	return { url: url.href, db, pool, clean: () => deleteAllRows(pool, name) };
}

async function onServer(url: string, sql: string): Promise<void> {
	const connection = await mysql.createConnection({ uri: url });
	try {
		await connection.query(sql);
	} finally {
		await connection.end();
	}
}

/** DELETE in one transaction: about 2 ms for 25 tables, where TRUNCATE takes 35 ms. */
async function deleteAllRows(pool: mysql.Pool, name: string): Promise<void> {
	const connection = await pool.getConnection();
	try {
		const [tables] = await connection.query<mysql.RowDataPacket[]>(
			`select table_name as name from information_schema.tables
			 where table_schema = ? and table_type = 'BASE TABLE' and table_name <> '__drizzle_migrations'`,
			[name]
		);
		await connection.query('set foreign_key_checks = 0');
		await connection.beginTransaction();
		for (const table of tables) await connection.query('delete from ??', [table.name]);
		await connection.commit();
	} finally {
		await connection.query('set foreign_key_checks = 1');
		connection.release();
	}
}
