/** `npm run admin -- …`: works against the database that `npm start` runs, from a second shell. */
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { dataFolder, root } from './lib/paths.mjs';
import { run } from './lib/run.mjs';
import { readState } from './lib/state.mjs';

const state = readState(dataFolder());
const program = join(root, 'build', 'worker', 'admin.js');
const databaseUrl = process.env.DATABASE_URL ?? state?.databaseUrl;
if (!databaseUrl || !existsSync(program)) {
	console.error('Nothing was started from this folder yet: run `npm start` first, or set DATABASE_URL.');
	process.exit(1);
}
const env = {
	...process.env,
	...state?.env,
	DATABASE_URL: databaseUrl,
	DATA_DIR: dataFolder(),
	ORIGIN: process.env.ORIGIN ?? state?.origin
};
run(process.execPath, ['--enable-source-maps', program, ...process.argv.slice(2)], { env, cwd: process.cwd() }).catch(
	() => {
		process.exitCode = 1;
	}
);
