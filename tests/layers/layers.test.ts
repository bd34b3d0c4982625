import { execFileSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';

/** The import rules themselves: each must catch what it forbids, in .svelte files and for types too. */
const root = resolve(import.meta.dirname, '../..');
const folders: string[] = [];
afterAll(() => folders.forEach((folder) => rmSync(folder, { recursive: true, force: true })));

/** Names of the rules that a small tree of files breaks. */
function broken(files: Record<string, string>): string[] {
	const folder = mkdtempSync(join(tmpdir(), 'firstpull-layers-'));
	folders.push(folder);
	for (const [name, text] of Object.entries({ 'src/app.d.ts': 'export {};', ...files })) {
		mkdirSync(dirname(join(folder, name)), { recursive: true });
		writeFileSync(join(folder, name), text);
	}
	cpSync(join(root, '.dependency-cruiser.cjs'), join(folder, '.dependency-cruiser.cjs'));
	cpSync(join(root, 'tests/layers/tsconfig.json'), join(folder, 'tests/layers/tsconfig.json'));
	symlinkSync(join(root, 'node_modules'), join(folder, 'node_modules'));
	const run = ['--config', '.dependency-cruiser.cjs', '--output-type', 'json', 'src'];
	const options = {
		cwd: folder,
		encoding: 'utf8',
		maxBuffer: 64 * 1024 ** 2,
		stdio: 'pipe'
	} as const;
	let output: string;
	try {
		output = execFileSync(join(root, 'node_modules/.bin/depcruise'), run, options);
	} catch (error) {
		output = (error as { stdout: string }).stdout;
	}
	const { summary } = JSON.parse(output) as { summary: { violations: { rule: { name: string } }[] } };
	return [...new Set(summary.violations.map(({ rule }) => rule.name))].sort();
}

describe('the layer rules', () => {
	it('let a sound tree pass', () => {
		const files = {
			'src/lib/model/a.ts': 'export type A = number;',
			'src/lib/server/repositories/b.ts': "import type { A } from '$lib/model/a';\nexport const b: A = 1;",
			'src/lib/server/services/c.ts': "import { b } from '$lib/server/repositories/b';\nexport const c = b;"
		};
		expect(broken(files)).toEqual([]);
	});

	it('keep the model to itself, types included', () => {
		const files = {
			'src/lib/utils/a.ts': 'export type A = 1;',
			'src/lib/model/b.ts': "import type { A } from '../utils/a';\nexport type B = A;"
		};
		expect(broken(files)).toEqual(['model imports nothing of ours']);
	});

	it('keep routes away from the store, in Svelte files too', () => {
		const files = {
			'src/lib/server/db/client.ts': 'export const db = 1;',
			'src/routes/+page.svelte': '<script lang="ts">\n\timport { db } from \'$lib/server/db/client\';\n</script>\n{db}'
		};
		expect(broken(files)).toContain('routes call services');
	});

	it('keep the analysis pure and find cycles', () => {
		const files = {
			'src/lib/server/repositories/r.ts': 'export const r = 1;',
			'src/lib/server/analysis/a.ts':
				"import { r } from '$lib/server/repositories/r';\nimport { b } from './b';\nexport const a = r + b;",
			'src/lib/server/analysis/b.ts': "import { a } from './a';\nexport const b = 1;\nexport const c = () => a;"
		};
		expect(broken(files)).toEqual(['analysis is pure', 'no-cycles']);
	});
});
