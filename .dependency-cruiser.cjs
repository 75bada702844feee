/** What may import what; DEVELOPERS.md draws the map. Run: npm run lint, or npm test -- --only imports. */

const TESTS = '\\.test\\.ts$';
const SERVER = '^src/lib/server/';
const WEB_ONLY = `${SERVER}(http/|auth/guard|app-context)`;

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
	forbidden: [
		{
			name: 'no-cycles',
			comment: 'Two files that need each other cannot be read, tested or moved apart.',
			severity: 'error',
			from: {},
			to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } }
		},
		{
			name: 'no-unresolved',
			comment: 'An import that leads nowhere fails only when that line is reached.',
			severity: 'error',
			from: { pathNot: ['^\\.svelte-kit/'] },
			to: { couldNotResolve: true, pathNot: ['^\\$app/', '^\\$env/', '^\\./\\$types', 'paraglide'] }
		},
		{
			name: 'domain-is-pure',
			comment:
				'The core decides from values alone, so that a result can be repeated and checked years later.',
			severity: 'error',
			from: { path: '^src/lib/domain/', pathNot: TESTS },
			to: {
				pathNot: [
					'^src/lib/domain/',
					'^node_modules/(luxon|@types/luxon|@lhncbc/ucum-lhc|libphonenumber-js|csv-parse|sms-segments-calculator|text-readability)/',
					'^src/lib/i18n/messages/'
				]
			}
		},
		{
			name: 'schemas-know-domain-only',
			comment: 'A form schema is shared with the browser: it may not pull the server or the interface along.',
			severity: 'error',
			from: { path: '^src/lib/schemas/', pathNot: TESTS },
			to: {
				path: '^src/',
				pathNot: ['^src/lib/(schemas|domain|format|i18n)/'],
				dependencyTypesNot: ['type-only']
			}
		},
		{
			name: 'words-and-formats-know-domain-only',
			comment: 'Texts and formats are used by the worker and by pages alike, so they stand on neither.',
			severity: 'error',
			from: { path: '^src/lib/(i18n|format)/', pathNot: TESTS },
			to: { path: '^src/', pathNot: ['^src/lib/(i18n|format|domain|paraglide)/'] }
		},
		{
			name: 'interface-never-reaches-the-server',
			comment: 'A component that imports server code could carry a secret into the browser.',
			severity: 'error',
			from: { path: ['^src/lib/ui/', '\\.svelte$', '^src/routes/.*\\+(page|layout)\\.ts$'], pathNot: TESTS },
			to: { path: [SERVER, '^src/routes/.*\\.server\\.ts$', '^jobs/'] }
		},
		{
			name: 'repos-hold-sql-only',
			comment: 'A repository that called a service or a provider would decide or send inside a query.',
			severity: 'error',
			from: { path: `${SERVER}repos/` },
			to: { path: `${SERVER}(services|providers|http)/` }
		},
		{
			name: 'services-know-no-vendor',
			comment:
				'A service saves a change and its messages together; a vendor called there would be called before the commit.',
			severity: 'error',
			from: { path: `${SERVER}services/`, pathNot: TESTS },
			to: {
				path: [`${SERVER}http/`, `${SERVER}providers/(?!.*port)`, '^node_modules/(mysql2|twilio|nodemailer)/']
			}
		},
		{
			name: 'providers-know-no-database',
			comment:
				'A provider sends what it is given: nothing is looked up or written while a message is on its way.',
			severity: 'error',
			from: { path: `${SERVER}providers/` },
			to: { path: [`${SERVER}(db|repos|services)/`, '^node_modules/(drizzle-orm|mysql2)/'] }
		},
		{
			name: 'sql-builder-in-its-places',
			comment: 'Whoever may build SQL can go round the checks of site and state, so only these folders may.',
			severity: 'error',
			from: {
				path: ['^src/', '^jobs/'],
				pathNot: [
					`${SERVER}(db|repos|services|outbox|audit|auth)/`,
					'^jobs/(migrate|demo|bench|stress)',
					TESTS
				]
			},
			to: { path: '^node_modules/(drizzle-orm|mysql2)/', dependencyTypesNot: ['type-only'] }
		},
		{
			name: 'routes-go-through-services',
			comment:
				'A route that reads or writes the database itself leaves no audit line and asks nobody for leave.',
			severity: 'error',
			from: { path: '^src/(routes/|hooks)' },
			to: { path: [`${SERVER}(repos|db)/`, '^node_modules/(drizzle-orm|mysql2)/'] }
		},
		{
			name: 'server-knows-no-framework',
			comment: 'The worker runs the same server code without SvelteKit.',
			severity: 'error',
			from: {
				path: [SERVER, '^src/lib/(domain|schemas|format)/', '^jobs/'],
				pathNot: [TESTS, WEB_ONLY]
			},
			to: { path: ['^\\$(app|env|lib)', '^src/routes/', '^node_modules/@sveltejs/kit/'] }
		},
		{
			name: 'web-parts-stay-in-the-web',
			comment: 'Guards and HTTP answers make sense in a request only; services and jobs run without one.',
			severity: 'error',
			from: { path: [`${SERVER}(services|repos|outbox|providers|audit|db)/`, '^jobs/'], pathNot: TESTS },
			to: { path: WEB_ONLY }
		},
		{
			name: 'vendors-behind-their-ports',
			comment: 'A vendor is replaced, or faked, in one place.',
			severity: 'error',
			from: { path: '^(src|jobs)/', pathNot: [`${SERVER}providers/`, '^jobs/fakes/', TESTS] },
			to: { path: '^node_modules/(twilio|nodemailer)/' }
		},
		{
			name: 'sessions-in-one-module',
			comment:
				'The session libraries are no longer maintained by their authors: they must be replaceable in one place.',
			severity: 'error',
			from: {
				path: '^(src|jobs)/',
				pathNot: [`${SERVER}auth/`, `${SERVER}random\\.ts$`, `${SERVER}repos/sessions\\.ts$`]
			},
			to: { path: '^node_modules/(lucia|oslo|@lucia-auth)/', dependencyTypesNot: ['type-only'] }
		},
		{
			name: 'fakes-stay-out-of-the-product',
			comment:
				'What stands in for a provider on a desk must not be reachable where real parents are written to.',
			severity: 'error',
			from: { path: '^src/' },
			to: { path: '^jobs/' }
		},
		{
			name: 'setup-needs-nothing-installed',
			comment: 'The start and test commands run before npm ci: Node built-ins and each other, no package.',
			severity: 'error',
			from: { path: '^jobs/setup/', pathNot: TESTS },
			to: { pathNot: '^jobs/setup/', dependencyTypesNot: ['core'] }
		},
		{
			name: 'nothing-imports-tests',
			comment: 'Test tools must not end up in what is run for real.',
			severity: 'error',
			from: { path: '^(src|jobs)/', pathNot: TESTS },
			to: { path: ['^tests/', TESTS] }
		}
	],
	options: {
		doNotFollow: { path: ['node_modules'] },
		exclude: { path: ['^src/lib/paraglide/', '^\\.svelte-kit/', '^build/', '^\\.data/'] },
		tsPreCompilationDeps: 'specify',
		webpackConfig: { fileName: 'tests/lint/resolve.cjs' },
		enhancedResolveOptions: {
			exportsFields: ['exports'],
			conditionNames: ['svelte', 'import', 'node', 'default', 'types'],
			extensions: ['.ts', '.mjs', '.js', '.svelte', '.json'],
			mainFields: ['module', 'main', 'types']
		},
		skipAnalysisNotInRules: true
	}
};
