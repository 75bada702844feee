import js from '@eslint/js';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import typescript from 'typescript-eslint';
import svelteConfig from '../../svelte.config.js';

/** Run from the top of the project: `eslint -c tests/lint/eslint.config.js --max-warnings 0 .` */

const noEnvironment = {
	selector: "MemberExpression[object.name='process'][property.name='env']",
	message: 'Settings are read once, in src/lib/server/config.ts.'
};
const noClock = [
	{
		selector: "NewExpression[callee.name='Date'][arguments.length=0]",
		message: 'The current time is given by the caller (Ctx.clock), so that a result can be repeated.'
	},
	{
		selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']",
		message: 'The current time is given by the caller (Ctx.clock), so that a result can be repeated.'
	},
	{
		selector:
			"CallExpression[callee.object.name='DateTime'][callee.property.name=/^(now|utc|local)$/][arguments.length=0]",
		message: 'The current time is given by the caller (Ctx.clock), so that a result can be repeated.'
	},
	{
		selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']",
		message: 'Randomness is given by the caller, so that a result can be repeated.'
	}
];
/** @type {import('eslint').Linter.RulesRecord} */
const noAssertions = {
	'@typescript-eslint/consistent-type-assertions': ['error', { assertionStyle: 'never' }]
};

export default typescript.config(
	{
		ignores: [
			'**/node_modules/',
			'.svelte-kit/',
			'build/',
			'.data/',
			'src/lib/paraglide/',
			'test-results/',
			'playwright-report/',
			'coverage/',
			'drizzle/'
		]
	},
	js.configs.recommended,
	...typescript.configs.recommended,
	...svelte.configs.recommended,
	{
		languageOptions: {
			globals: { ...globals.browser, ...globals.node },
			parserOptions: { projectService: true, extraFileExtensions: ['.svelte'] }
		},
		linterOptions: { reportUnusedDisableDirectives: 'error' },
		rules: {
			// The compiler knows every name, also the generated ones.
			'no-undef': 'off',
			eqeqeq: ['error', 'always'],
			'no-console': 'error',
			'@typescript-eslint/no-explicit-any': 'error',
			'@typescript-eslint/no-non-null-assertion': 'error',
			'@typescript-eslint/no-floating-promises': 'error',
			'@typescript-eslint/no-misused-promises': 'error',
			'@typescript-eslint/await-thenable': 'error',
			'@typescript-eslint/switch-exhaustiveness-check': [
				'error',
				{ considerDefaultExhaustiveForUnions: true, requireDefaultForNonUnion: false }
			],
			'@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }]
		}
	},
	{
		// Without types: with them each component costs the linter one and a half seconds, five minutes in all, and
		// components are to show, not to wait; svelte-check reads their types.
		...typescript.configs.disableTypeChecked,
		files: ['**/*.svelte'],
		languageOptions: { parserOptions: { parser: typescript.parser, svelteConfig, projectService: false } }
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: { parserOptions: { parser: typescript.parser, svelteConfig } },
		rules: {
			'svelte/button-has-type': 'error',
			'svelte/no-target-blank': 'error',
			'svelte/no-at-html-tags': 'error',
			'svelte/require-each-key': 'error',
			// The product is served at the root of its own origin: there is no base path to add to a link.
			'svelte/no-navigation-without-resolve': 'off'
		}
	},
	{
		files: ['src/**/*.ts', 'src/**/*.svelte'],
		rules: { 'no-restricted-syntax': ['error', noEnvironment] }
	},
	{
		files: [
			'src/lib/domain/**/*.ts',
			'src/lib/schemas/**/*.ts',
			'src/lib/format/**/*.ts',
			'src/lib/server/**/*.ts'
		],
		ignores: ['**/*.test.ts'],
		rules: { 'no-restricted-syntax': ['error', noEnvironment, ...noClock] }
	},
	{
		// The places that style allows to touch what the others are given.
		files: ['src/lib/server/config.ts', 'src/lib/server/clock.ts', 'src/lib/server/random.ts'],
		rules: { 'no-restricted-syntax': 'off' }
	},
	{
		files: ['src/lib/domain/**/*.ts'],
		ignores: ['**/*.test.ts', 'src/lib/domain/ids.ts'],
		rules: noAssertions
	},
	{
		// Programs for the terminal and the tests' own tools talk to a person.
		files: ['jobs/**', 'tests/**', '*.{js,ts}'],
		rules: { 'no-console': 'off' }
	},
	{
		// Outside every tsconfig: plain configuration, linted without types.
		...typescript.configs.disableTypeChecked,
		files: ['*.{js,cjs}', '.*.cjs', '*.config.ts', 'tests/lint/*', 'jobs/fakes/telephones/*.js'],
		languageOptions: { parserOptions: { projectService: false } }
	},
	{
		files: ['**/*.cjs', '**/.*.cjs'],
		languageOptions: { sourceType: 'commonjs' },
		rules: { '@typescript-eslint/no-require-imports': 'off' }
	}
);
