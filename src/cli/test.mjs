/**
 * `npm test`: installs what tests need, runs lint, types, layers, unit, database and browser tests, and closes with the
 * plain line "N passed, N failed". Nothing it starts is left running. `--long` runs what takes longer as well.
 */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { installDebian, installPackages } from './lib/packages.mjs';
import { root } from './lib/paths.mjs';
import { run, say } from './lib/run.mjs';

const long = process.argv.includes('--long');
const only = process.argv.slice(2).filter((argument) => !argument.startsWith('--'));
const results = mkdtempSync(join(tmpdir(), 'firstpull-results-'));
const totals = { passed: 0, failed: 0 };

const wanted = (name) => only.length === 0 || only.includes(name);

/** Runs one check that passes or fails as a whole. */
async function check(name, command, args) {
	if (!wanted(name)) return;
	say(`\n— ${name}`);
	try {
		await run(command, args, { cwd: root });
		totals.passed++;
	} catch (error) {
		say(error.message);
		totals.failed++;
	}
}

/** Runs a test runner that leaves its counts in a JSON file; a runner that leaves none counts as one failure. */
async function suite(name, command, args, count, env = {}) {
	if (!wanted(name)) return;
	say(`\n— ${name}`);
	const file = join(results, `${name}.json`);
	const failed = await run(command, args(file), {
		cwd: root,
		env: { ...process.env, ...env, RESULTS_FILE: file }
	}).then(
		() => false,
		() => true
	);
	const counts = existsSync(file) ? count(JSON.parse(readFileSync(file, 'utf8'))) : { passed: 0, failed: 1 };
	totals.passed += counts.passed;
	totals.failed += counts.failed;
	if (failed && counts.failed === 0) totals.failed++;
}

const vitestCounts = (report) => ({
	passed: report.numPassedTests,
	failed: report.numFailedTests + (report.numFailedTestSuites > 0 && report.numFailedTests === 0 ? 1 : 0)
});
const playwrightCounts = ({ stats }) => ({ passed: stats.expected + stats.flaky, failed: stats.unexpected });

async function main() {
	await installPackages();
	if (wanted('browser') && !existsSync('/usr/bin/chromium')) await installDebian(['chromium'], 'Chromium');
	if (wanted('database') && !existsSync('/usr/bin/pdftotext'))
		await installDebian(['poppler-utils'], 'pdftotext, which reads the printed briefs back,');
	await run('npx', ['svelte-kit', 'sync'], { cwd: root });
	// Each of these keeps one core busy, so two run side by side.
	await Promise.all([
		(async () => {
			await check('lint', 'npx', ['eslint', '.']);
			await check('format', 'npx', ['prettier', '--check', '--log-level', 'warn', '.']);
		})(),
		(async () => {
			await check('types', 'npx', ['svelte-check', '--tsconfig', './tsconfig.json', '--fail-on-warnings']);
			await check('layers', 'npx', ['depcruise', '--config', '.dependency-cruiser.cjs', 'src']);
			await check('unused', 'npx', ['knip', '--no-progress']);
		})()
	]);
	const vitest = (project) => (file) => [
		'vitest',
		'run',
		'--project',
		project,
		'--reporter=default',
		'--reporter=json',
		`--outputFile.json=${file}`
	];
	await suite('unit', 'npx', vitest('unit'), vitestCounts);
	await suite('database', 'npx', vitest('database'), vitestCounts);
	const browser = () => ['playwright', 'test', '--config', 'tests/browser/playwright.config.ts'];
	await suite('browser', 'npx', browser, playwrightCounts, long ? { TESTS_LONG: '1' } : {});
	if (long) await check('bench', process.execPath, ['--import', 'tsx', 'tests/bench/bench.ts']);
}

main()
	.catch((error) => {
		console.error(error.message);
		totals.failed++;
	})
	.finally(() => {
		rmSync(results, { recursive: true, force: true });
		say(`\n${totals.passed} passed, ${totals.failed} failed`);
		process.exitCode = totals.failed > 0 ? 1 : 0;
	});
