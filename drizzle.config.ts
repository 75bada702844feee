import { defineConfig } from 'drizzle-kit';

export default defineConfig({
	dialect: 'mysql',
	schema: './src/lib/server/db/schema/*.ts',
	out: './drizzle',
	casing: 'snake_case'
});
