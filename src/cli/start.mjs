/**
 * `npm start`: installs, starts PostgreSQL on loopback, migrates, builds when stale, loads the demo once, and serves
 * until Ctrl-C or SIGTERM. Runs before anything is installed, so only Node's own modules are imported up here.
 */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { buildWhenStale } from './lib/build.mjs';
import { migrate } from './lib/migrate.mjs';
import { installPackages } from './lib/packages.mjs';
import { dataFolder, databaseFolder, root } from './lib/paths.mjs';
import { freePort, portIsFree, startPostgres } from './lib/postgres.mjs';
import { pause, say } from './lib/run.mjs';
import { writeState } from './lib/state.mjs';

const children = new Map();
let stopping = false;

function launch(name, file, env) {
	const child = spawn(process.execPath, ['--enable-source-maps', join(root, file)], {
		cwd: root,
		env,
		stdio: 'inherit'
	});
	children.set(name, child);
	child.once('exit', (code, signal) => {
		children.delete(name);
		if (stopping || (code === 0 && name === 'demo')) return;
		say(`The ${name} process ended (${signal ?? `code ${code}`}).`);
		if (name !== 'demo') void restart(name, file, env);
	});
	return child;
}

/** A process that dies is started again, not faster than once a second. */
async function restart(name, file, env) {
	await pause(1000);
	if (!stopping) launch(name, file, env);
}

async function answers(url) {
	for (let tries = 0; tries < 300; tries++) {
		const ready = await fetch(`${url}/readyz`)
			.then((answer) => answer.ok)
			.catch(() => false);
		if (ready) return;
		if (stopping) return;
		await pause(200);
	}
	throw new Error(`${url} does not answer.`);
}

async function stop(postgres, code = 0) {
	if (stopping) return;
	stopping = true;
	if (code === 0) say('Stopping …');
	const ended = [...children.values()].map((child) => new Promise((done) => child.once('exit', done)));
	for (const child of children.values()) child.kill('SIGTERM');
	await Promise.race([Promise.all(ended), pause(15_000)]);
	for (const child of children.values()) child.kill('SIGKILL');
	await postgres?.stop();
	process.exit(code);
}

let own = null;

async function main() {
	const host = process.env.HOST || '127.0.0.1';
	const port = Number(process.env.PORT || 3000);
	await portIsFree(host, port);
	await installPackages();
	const data = dataFolder();
	own = process.env.DATABASE_URL ? null : await startPostgres(databaseFolder(data));
	for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void stop(own));
	const databaseUrl = process.env.DATABASE_URL ?? own.url;
	await migrate(databaseUrl);
	await buildWhenStale();
	const local = `http://${host === '0.0.0.0' ? '127.0.0.1' : host}:${port}`;
	const env = {
		...process.env,
		NODE_ENV: 'production',
		DATABASE_URL: databaseUrl,
		DATA_DIR: data,
		HOST: host,
		PORT: String(port),
		ORIGIN: process.env.ORIGIN || local,
		BODY_SIZE_LIMIT: 'Infinity',
		SHUTDOWN_TIMEOUT: '10'
	};
	const services = await import('./lib/local-services.mjs').then((module) => module.startLocalServices(env, freePort));
	Object.assign(env, services.env);
	writeState(data, { databaseUrl, origin: env.ORIGIN, local, env: services.env });
	launch('web', 'build/index.js', env);
	launch('worker', 'build/worker/worker.js', env);
	await answers(local);
	if (stopping) return;
	say(`\nFirstpull is at ${env.ORIGIN}\n`);
	launch('demo', 'build/worker/demo.js', { ...env, FIRSTPULL_LOCAL: local });
}

main().catch(async (error) => {
	console.error(error.message);
	if (process.env.DEBUG) console.error(error);
	await stop(own, 1);
});
