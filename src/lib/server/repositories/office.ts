import { database, type Tx } from '$lib/server/db/client';
import { sql } from 'drizzle-orm';

/** What the office page sees across tables: jobs of the queue, and everything for an export. */

export type JobRow = {
	id: string;
	name: string;
	state: string;
	data: Record<string, unknown>;
	tries: number;
	error: string | null;
	createdAt: string;
	startedAt: string | null;
	completedAt: string | null;
};

/** An office's jobs, newest first; done ones of the last day only. */
export async function listJobs(organisationId: string, limit: number): Promise<JobRow[]> {
	const rows = await database().execute(sql`
		select id, name, state::text as state, data, retry_count as tries,
			coalesce(output->>'message', output->>'value') as error,
			created_on as "createdAt", started_on as "startedAt", completed_on as "completedAt"
		from queue.job
		where data->>'organisationId' = ${organisationId}
			and (state <> 'completed' or completed_on > now() - interval '1 day')
		order by created_on desc limit ${limit}`);
	return rows.map((row) => ({
		...(row as JobRow),
		createdAt: new Date(String(row['createdAt'])).toISOString(),
		startedAt: row['startedAt'] ? new Date(String(row['startedAt'])).toISOString() : null,
		completedAt: row['completedAt'] ? new Date(String(row['completedAt'])).toISOString() : null
	}));
}

/** Samples are left out: they come back from the originals; and so is what is only on its way in. */
const LEFT_OUT: ReadonlySet<string> = new Set([
	'blocks',
	'block_times',
	'text_blocks',
	'uploads',
	'upload_parts',
	'idempotency',
	'tokens',
	'sessions',
	'api_keys',
	'members'
]);

/** Names of the tables that hold an office's rows. */
export async function tenantTables(tx: Tx): Promise<string[]> {
	const rows = await tx.execute(sql`
		select table_name from information_schema.columns
		where table_schema = 'public' and column_name = 'organisation_id' order by table_name`);
	return rows.map((row) => String(row['table_name'])).filter((name) => !LEFT_OUT.has(name));
}

/** Every row of a table that the transaction's organisation has, as JSON text, some at a time, of one instant. */
export async function* dumpTable(tx: Tx, table: string): AsyncGenerator<string[]> {
	await tx.execute(sql`declare dump no scroll cursor for select to_jsonb(t)::text as row from ${sql.identifier(table)} t
		where organisation_id = current_setting('app.organisation')::uuid`);
	for (;;) {
		const rows = await tx.execute(sql`fetch 500 from dump`);
		if (rows.length === 0) break;
		yield rows.map((row) => String(row['row']));
	}
	await tx.execute(sql`close dump`);
}

/** Where the bytes of mail attachments and of uploads that are not whole yet are kept. */
export async function listLooseKeys(tx: Tx): Promise<string[]> {
	const rows = await tx.execute(sql`
		select key from upload_parts where organisation_id = current_setting('app.organisation')::uuid
		union all
		select attachment->>'key' from mails, jsonb_array_elements(attachments) as attachment
		where organisation_id = current_setting('app.organisation')::uuid`);
	return rows.map((row) => String(row['key']));
}
