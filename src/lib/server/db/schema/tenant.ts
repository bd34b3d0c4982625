import { sql } from 'drizzle-orm';
import { pgPolicy, uuid } from 'drizzle-orm/pg-core';
import { organisations } from './identity';

/** First part of every tenant table's key: the row-level security and distribution column. */
export const organisationId = () =>
	uuid()
		.notNull()
		.references(() => organisations.id, { onDelete: 'cascade' });

/**
 * Rows are visible and writable only inside a transaction that has set `app.organisation` (see client.ts).
 * A connection that has set nothing sees no row.
 */
export const ownRows = () =>
	pgPolicy('own_rows', {
		for: 'all',
		using: sql`organisation_id = nullif(current_setting('app.organisation', true), '')::uuid`,
		withCheck: sql`organisation_id = nullif(current_setting('app.organisation', true), '')::uuid`
	});
