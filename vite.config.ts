import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { builtinModules } from 'node:module';
import { fileURLToPath } from 'node:url';
import { readFileSync } from 'node:fs';
import { defineConfig, type ViteUserConfig } from 'vitest/config';

const dependencies = Object.keys(
	(
		JSON.parse(readFileSync(new URL('./package.json', import.meta.url), 'utf8')) as {
			dependencies: Record<string, string>;
		}
	).dependencies
);
const lib = fileURLToPath(new URL('./src/lib', import.meta.url));

/** The worker process and its threads are a second server build without SvelteKit: plain Node modules under build/worker. */
const worker: ViteUserConfig = {
	resolve: { alias: { $lib: lib } },
	build: {
		ssr: true,
		target: 'node20',
		outDir: 'build/worker',
		emptyOutDir: true,
		rollupOptions: {
			input: {
				worker: 'src/worker/worker.ts',
				'read-thread': 'src/worker/read-thread.ts',
				admin: 'src/worker/admin.ts',
				demo: 'src/worker/demo.ts'
			},
			external: [...builtinModules, /^node:/, ...dependencies, ...dependencies.map((name) => new RegExp(`^${name}/`))],
			output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name]-[hash].js' }
		}
	}
};

const web: ViteUserConfig = {
	plugins: [tailwindcss(), sveltekit()],
	// Small fonts must stay files: inlined data: URLs would need a wider content security policy.
	build: { assetsInlineLimit: (path) => (path.endsWith('.woff2') ? false : undefined) },
	test: {
		testTimeout: 30_000,
		hookTimeout: 60_000,
		projects: [
			{
				extends: true,
				test: {
					name: 'unit',
					environment: 'node',
					include: ['src/**/*.test.ts', 'fixtures/**/*.test.ts', 'tests/layers/**/*.test.ts']
				}
			},
			{
				extends: true,
				test: {
					name: 'database',
					environment: 'node',
					include: ['tests/database/**/*.test.ts'],
					globalSetup: 'tests/database/support/server.ts',
					pool: 'forks',
					maxWorkers: 2
				}
			}
		]
	}
};

export default defineConfig(({ mode }) => (mode === 'worker' ? worker : web));
