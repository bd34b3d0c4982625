import { config } from '$lib/server/config';
import { sql } from 'drizzle-orm';
import { drizzle } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';

function open(url: string, max: number) {
	const connection = postgres(url, { max, onnotice: () => undefined, prepare: true });
	return { connection, db: drizzle(connection, { casing: 'snake_case' }) };
}
type Opened = ReturnType<typeof open>;

export type Database = Opened['db'];
/** A transaction, bound to one organisation by {@link withOrganisation}. */
export type Tx = Parameters<Parameters<Database['transaction']>[0]>[0];

let opened: Opened | undefined;

/** The process's connection pool, opened at first use. Only identity tables may be read through it directly. */
export function database(): Database {
	opened ??= open(config().DATABASE_URL, 12);
	return opened.db;
}

/** Runs `work` in a transaction that sees the rows of one organisation and no others. */
export function withOrganisation<T>(organisationId: string, work: (tx: Tx) => Promise<T>): Promise<T> {
	return database().transaction(async (tx) => {
		await tx.execute(sql`select set_config('app.organisation', ${organisationId}, true)`);
		return work(tx);
	});
}

/** Is the database reachable? */
export async function databaseAnswers(): Promise<boolean> {
	try {
		await database().execute(sql`select 1`);
		return true;
	} catch {
		return false;
	}
}

/** Closes the pool; the next use opens a new one. */
export async function closeDatabase(): Promise<void> {
	const closing = opened;
	opened = undefined;
	await closing?.connection.end({ timeout: 5 });
}
