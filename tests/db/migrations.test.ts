import { afterAll, describe, expect, test } from 'vitest';
import type { RowDataPacket } from 'mysql2/promise';
import { applyMigrations } from '../../jobs/migrate';
import { openTestDatabase } from '../support/database';

describe('the migrations', async () => {
	const database = await openTestDatabase();
	afterAll(() => database.clean());

	const tables = async () => {
		const [rows] = await database.pool.query<RowDataPacket[]>(
			'select table_name as name from information_schema.tables where table_schema = database() order by 1'
		);
		return rows.map((row) => String(row.name));
	};

	test('make the tables, once, however often and by however many they are run', async () => {
		const before = await tables();
		expect(before.length).toBeGreaterThan(5);
		const [applied] = await database.pool.query<RowDataPacket[]>(
			'select count(*) as n from __drizzle_migrations'
		);

		await Promise.all([
			applyMigrations(database.url),
			applyMigrations(database.url),
			applyMigrations(database.url)
		]);

		expect(await tables()).toEqual(before);
		const [again] = await database.pool.query<RowDataPacket[]>(
			'select count(*) as n from __drizzle_migrations'
		);
		expect(again).toEqual(applied);
	});

	test('leave every connection in UTC', async () => {
		const [rows] = await database.pool.query<RowDataPacket[]>(
			'select timestampdiff(second, utc_timestamp(), now()) as behind'
		);
		expect(rows[0]?.behind).toBe(0);
	});
});
