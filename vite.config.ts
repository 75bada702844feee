import { paraglideVitePlugin } from '@inlang/paraglide-js';
import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';

export default defineConfig({
	plugins: [
		tailwindcss(),
		paraglideVitePlugin({
			project: './src/lib/i18n/project.inlang',
			outdir: './src/lib/paraglide',
			strategy: ['baseLocale']
		}),
		sveltekit()
	],
	server: { fs: { allow: ['.'] } },
	test: {
		projects: [
			{
				extends: true,
				test: {
					name: 'unit',
					environment: 'node',
					include: [
						'src/**/*.test.ts',
						'jobs/**/*.test.ts',
						'tests/arch/**/*.test.ts',
						'tests/golden/**/*.test.ts'
					]
				}
			},
			{
				extends: true,
				test: {
					name: 'integration',
					environment: 'node',
					include: [
						'tests/db/**/*.test.ts',
						'tests/http/**/*.test.ts',
						'tests/crash/**/*.test.ts',
						'tests/messaging/**/*.test.ts'
					],
					globalSetup: ['tests/support/global-database.ts'],
					fileParallelism: false,
					testTimeout: 60_000,
					hookTimeout: 120_000
				}
			}
		]
	}
});
