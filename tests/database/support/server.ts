/** One PostgreSQL for all database tests, with a migrated template that each test file clones. */
import { mkdtempSync, rmSync, chmodSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import postgres from 'postgres';
import type { TestProject } from 'vitest/node';
import { migrate } from '../../../src/cli/lib/migrate.mjs';
import { startPostgres } from '../../../src/cli/lib/postgres.mjs';

declare module 'vitest' {
	export interface ProvidedContext {
		adminUrl: string;
	}
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
	const folder = mkdtempSync(join(tmpdir(), 'firstpull-test-'));
	chmodSync(folder, 0o755);
	const server = await startPostgres(join(folder, 'postgres'), {
		fsync: 'off',
		synchronous_commit: 'off',
		full_page_writes: 'off'
	});
	await migrate(server.url);
	const sql = postgres(server.adminUrl, { max: 1 });
	await sql.unsafe('alter database firstpull is_template true');
	await sql.end();
	project.provide('adminUrl', server.adminUrl);
	return async () => {
		await server.stop();
		rmSync(folder, { recursive: true, force: true });
	};
}
