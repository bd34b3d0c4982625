import { join } from 'node:path';
import { root } from './paths.mjs';

// Any number, as long as every process that migrates asks for the same one.
const MIGRATION_LOCK = 7_236_941;

/** Brings the database at `url` to the newest migration; two processes at once wait for each other. */
export async function migrate(url) {
	const { default: postgres } = await import('postgres');
	const { drizzle } = await import('drizzle-orm/postgres-js');
	const { migrate: apply } = await import('drizzle-orm/postgres-js/migrator');
	const sql = postgres(url, { max: 1, onnotice: () => undefined });
	try {
		await sql`select pg_advisory_lock(${MIGRATION_LOCK})`;
		await apply(drizzle(sql), { migrationsFolder: join(root, 'drizzle') });
	} finally {
		await sql.end();
	}
}
