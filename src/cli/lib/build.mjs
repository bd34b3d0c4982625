import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { capture, say } from './run.mjs';

const stamp = join(root, 'build', '.sources');
const SOURCES = [
	'src',
	'static',
	'fixtures',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'tsconfig.json'
];

function* files(path) {
	const full = join(root, path);
	if (!existsSync(full)) return;
	let entries;
	try {
		entries = readdirSync(full, { withFileTypes: true });
	} catch {
		yield path;
		return;
	}
	for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
		const below = join(path, entry.name);
		if (entry.isDirectory()) yield* files(below);
		else yield below;
	}
}

/** A hash over everything a build is made from. */
function sourcesHash() {
	const hash = createHash('sha256');
	for (const source of SOURCES) {
		for (const file of files(source)) {
			if (/\.(test\.ts|md)$/.test(file)) continue;
			hash.update(file).update(readFileSync(join(root, file)));
		}
	}
	return hash.digest('hex');
}

/** Runs a build step; what it prints is shown only when it fails, because bundlers warn of what is not ours. */
async function quietly(args) {
	const { code, output } = await capture('npx', args, { cwd: root, env: { ...process.env, NODE_ENV: 'production' } });
	if (code !== 0) throw new Error(`npx ${args.join(' ')} failed:\n${output}`);
}

/** Builds the web and worker programs unless the build on disk is made from these very sources. */
export async function buildWhenStale() {
	const now = sourcesHash();
	if (existsSync(stamp) && readFileSync(stamp, 'utf8') === now) return;
	say('Building …');
	await quietly(['vite', 'build', '--logLevel', 'error']);
	await quietly(['vite', 'build', '--mode', 'worker', '--logLevel', 'error']);
	writeFileSync(stamp, now);
}
