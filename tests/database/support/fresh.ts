import { randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import postgres from 'postgres';
import { afterAll, beforeAll, inject } from 'vitest';

/**
 * Gives the calling test file a fresh database (a clone of the migrated template) and an empty data folder. The
 * product's modules are imported by the tests only after that, because they read their settings once.
 */
export function useFreshDatabase(): void {
	const adminUrl = inject('adminUrl');
	const name = `test_${randomUUID().replaceAll('-', '')}`;
	let folder = '';
	beforeAll(async () => {
		const sql = postgres(adminUrl, { max: 1, onnotice: () => undefined });
		await sql.unsafe(`create database ${name} template firstpull owner firstpull`);
		await sql.end();
		folder = await mkdtemp(join(tmpdir(), 'firstpull-data-'));
		const url = new URL(adminUrl);
		url.username = 'firstpull';
		url.pathname = `/${name}`;
		process.env.DATABASE_URL = url.href;
		process.env.DATA_DIR = folder;
		process.env.DEMO = 'off';
	});
	afterAll(async () => {
		const { closeQueue } = await import('$lib/server/jobs/queue');
		const { closeDatabase } = await import('$lib/server/repositories/transaction');
		await closeQueue();
		await closeDatabase();
		const sql = postgres(adminUrl, { max: 1, onnotice: () => undefined });
		await sql.unsafe(`drop database ${name} with (force)`);
		await sql.end();
		await rm(folder, { recursive: true, force: true });
	});
}
