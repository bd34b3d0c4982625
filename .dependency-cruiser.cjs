/** Import directions of DEVELOPERS.md's layer map. Types count too; Svelte files are read as well. */
const layer = (name, from, allowed) => ({
	name,
	severity: 'error',
	comment: `${name}: see the layer map in DEVELOPERS.md`,
	from: { path: from, pathNot: '\\.test\\.ts$' },
	to: { path: '^(src|fixtures)/', pathNot: allowed }
});
const SERVER = '^src/lib/server/';
const BASE = ['^src/lib/model/', '^src/lib/utils/'];

module.exports = {
	forbidden: [
		{ name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
		{
			name: 'not-to-unresolvable',
			severity: 'error',
			from: { path: '^src/' },
			to: { couldNotResolve: true, pathNot: '^(\\$app|\\$service-worker|\\$env|\\$types|\\./\\$types|virtual:)' }
		},
		layer('model imports nothing of ours', '^src/lib/model/', ['^src/lib/model/']),
		layer('utils import the model only', '^src/lib/utils/', BASE),
		layer('state imports model and utils', '^src/lib/state/', [...BASE, '^src/lib/state/']),
		layer('components import lower tiers', '^src/lib/components/', [
			...BASE,
			'^src/lib/state/',
			'^src/lib/components/',
			'^src/app\\.css'
		]),
		layer('analysis is pure', `${SERVER}analysis/`, [...BASE, `${SERVER}analysis/`]),
		layer('ingest is pure', `${SERVER}ingest/`, [...BASE, `${SERVER}ingest/`]),
		layer('db imports the model', `${SERVER}db/`, [...BASE, `${SERVER}db/`, `${SERVER}config`]),
		layer('repositories import db and the model', `${SERVER}repositories/`, [
			...BASE,
			`${SERVER}repositories/`,
			`${SERVER}db/`
		]),
		layer('auth imports repositories and the model', `${SERVER}auth/`, [
			...BASE,
			`${SERVER}auth/`,
			`${SERVER}repositories/`,
			`${SERVER}config`
		]),
		layer('services stay above the store', `${SERVER}services/`, [
			...BASE,
			`${SERVER}(services|repositories|analysis|ingest|auth|mail|store)/`,
			`${SERVER}jobs/queue`,
			`${SERVER}config`
		]),
		layer('routes call services', '^src/(routes|hooks)', [
			...BASE,
			'^src/routes/',
			'^src/lib/(components|state)/',
			`${SERVER}(services|auth|web)/`,
			`${SERVER}config`,
			'^src/app\\.css'
		]),
		{
			name: 'only charts import LayerChart',
			severity: 'error',
			from: { path: '^src/', pathNot: '^src/lib/components/charts/' },
			to: { path: 'node_modules/layerchart' }
		},
		{
			name: 'what the worker runs knows no SvelteKit',
			severity: 'error',
			from: { path: `^src/(worker|lib/server/(services|repositories|db|auth|jobs|mail|store|analysis|ingest))/` },
			to: { path: ['^\\$app', '^\\$env', '\\.svelte$'] }
		}
	],
	options: {
		doNotFollow: { path: 'node_modules' },
		tsPreCompilationDeps: true,
		tsConfig: { fileName: 'tests/layers/tsconfig.json' },
		exclude: { path: '(^build|^\\.svelte-kit)' },
		enhancedResolveOptions: {
			exportsFields: ['exports'],
			conditionNames: ['svelte', 'import', 'types', 'node', 'default'],
			extensions: ['.ts', '.js', '.mjs', '.svelte', '.json']
		}
	}
};
