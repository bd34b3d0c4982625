/** `npm run admin -- …`: works against the database that `npm start` runs, from a second shell. */
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { dataFolder, root } from './lib/paths.mjs';
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
const child = spawn(process.execPath, ['--enable-source-maps', program, ...process.argv.slice(2)], {
	env,
	cwd: process.cwd(),
	stdio: 'inherit'
});
// Who ends this command ends its work too: a watch goes on until then.
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
child.once('exit', (code) => {
	process.exitCode = code ?? 1;
});
