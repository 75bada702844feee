import { drizzle } from 'drizzle-orm/mysql2';
import mysql from 'mysql2/promise';
import * as followUp from './schema/follow-up';
import * as messaging from './schema/messaging';
import * as newborn from './schema/newborn';
import * as organisation from './schema/organisation';
import * as staff from './schema/staff';
import * as strayText from './schema/stray-text';

const schema = { ...organisation, ...staff, ...newborn, ...followUp, ...messaging, ...strayText };

/** Opens a pool whose sessions speak UTC. Close it before the process ends, or the process does not. */
export function openDatabase(url: string, connectionLimit = 10) {
	const pool = mysql.createPool({ uri: url, timezone: 'Z', connectionLimit, connectTimeout: 5_000 });
	const db = drizzle(pool, { schema, mode: 'default', casing: 'snake_case' });
	return { db, pool, close: () => pool.end() };
}

export type Database = ReturnType<typeof openDatabase>;
export type Db = Database['db'];
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];
/** Reads run the same inside and outside a transaction. */
export type Reader = Db | Tx;
