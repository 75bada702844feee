import { customType, datetime } from 'drizzle-orm/mysql-core';

/** Random record id: 16 lower-case base-32 characters; binary collation, so look-ups never fold case or trailing spaces. */
export const recordId = customType<{ data: string }>({
	dataType: () => 'varchar(16) character set ascii collate ascii_bin'
});

/** Machine word (hash, key, provider's id) compared byte by byte. */
export const asciiWord = customType<{ data: string; config: { length: number }; configRequired: true }>({
	dataType: (config) => `varchar(${config.length}) character set ascii collate ascii_bin`
});

/** Instant in UTC, to the millisecond. */
export const instant = () => datetime({ mode: 'date', fsp: 3 });
