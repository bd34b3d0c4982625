/** Starts the whole product on free ports with its own data folder, clock fixed, and waits until the demo is read. */
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync, chmodSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freePort } from '../../../src/cli/lib/postgres.mjs';
import { FIXED_NOW, PASSWORD } from './product';

const READ_WITHIN_MS = 6 * 60_000;

async function cookieOf(origin: string): Promise<string> {
	const body = new URLSearchParams({ email: 'owner@firstpull.test', password: PASSWORD });
	const answer = await fetch(`${origin}/sign-in`, { method: 'POST', body, headers: { origin }, redirect: 'manual' });
	return (answer.headers.get('set-cookie') ?? '').split(';')[0] ?? '';
}

async function allRead(origin: string, cookie: string): Promise<boolean> {
	const answer = await fetch(`${origin}/api/units?view=summary`, { headers: { cookie } });
	if (!answer.ok) return false;
	const { units } = (await answer.json()) as { units: { logs: { ready: number; reading: number } }[] };
	return units.length >= 8 && units.every((unit) => unit.logs.ready > 0 && unit.logs.reading === 0);
}

async function until(what: string, within: number, test: () => Promise<boolean>): Promise<void> {
	const end = Date.now() + within;
	while (Date.now() < end) {
		if (await test().catch(() => false)) return;
		await new Promise((done) => setTimeout(done, 1000));
	}
	throw new Error(`${what} took longer than ${within / 1000} s`);
}

export default async function setup(): Promise<() => Promise<void>> {
	// While tests are written, they may run against a system that was started by hand with the same clock.
	if (process.env.FIRSTPULL_ORIGIN) return () => Promise.resolve();
	const folder = mkdtempSync(join(tmpdir(), 'firstpull-browser-'));
	chmodSync(folder, 0o755);
	const port = await freePort();
	const origin = `http://127.0.0.1:${port}`;
	const env = { ...process.env, DATA_DIR: folder, PORT: String(port), HOST: '127.0.0.1', ORIGIN: origin, FIXED_NOW };
	const product: ChildProcess = spawn(process.execPath, ['src/cli/start.mjs'], {
		env,
		stdio: ['ignore', 'ignore', 'inherit']
	});
	const stop = async (): Promise<void> => {
		const ended = new Promise((done) => product.once('exit', done));
		product.kill('SIGTERM');
		await ended;
		rmSync(folder, { recursive: true, force: true });
	};
	try {
		await until('starting', READ_WITHIN_MS, async () => (await fetch(`${origin}/readyz`)).ok);
		let cookie = '';
		await until('signing in', 60_000, async () => (cookie = await cookieOf(origin)) !== '');
		await until('reading the demo', READ_WITHIN_MS, () => allRead(origin, cookie));
	} catch (error) {
		await stop();
		throw error;
	}
	process.env.FIRSTPULL_ORIGIN = origin;
	process.env.FIRSTPULL_DATA = folder;
	return stop;
}
