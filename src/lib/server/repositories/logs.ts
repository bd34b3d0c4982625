import type { Tx } from '$lib/server/db/client';
import { database } from '$lib/server/db/client';
import { blockTimes, blocks, events, logs, rememberedMappings, textBlocks } from '$lib/server/db/schema/logs';
import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';

/** Uploaded logs of the transaction's organisation, and the mappings people confirmed. */

export type LogRow = typeof logs.$inferSelect;
export type LogChange = Partial<typeof logs.$inferInsert>;

export async function insertLog(tx: Tx, row: typeof logs.$inferInsert): Promise<LogRow> {
	const [stored] = await tx.insert(logs).values(row).returning();
	if (!stored) throw new Error('the log was not stored');
	return stored;
}

export async function findLog(tx: Tx, id: string): Promise<LogRow | null> {
	const [row] = await tx.select().from(logs).where(eq(logs.id, id));
	return row ?? null;
}

export async function findLogByHash(tx: Tx, unitId: string, sha256: string): Promise<LogRow | null> {
	const [row] = await tx
		.select()
		.from(logs)
		.where(and(eq(logs.unitId, unitId), eq(logs.sha256, sha256)));
	return row ?? null;
}

/** The logs of a unit, newest first. */
export function listLogs(tx: Tx, unitId: string): Promise<LogRow[]> {
	return tx.select().from(logs).where(eq(logs.unitId, unitId)).orderBy(desc(logs.ordinal));
}

/** State and counts only, of every log of some units. */
export function listLogStates(tx: Tx, unitIds: readonly string[]) {
	if (unitIds.length === 0) return Promise.resolve([]);
	return tx
		.select({ unitId: logs.unitId, state: logs.state })
		.from(logs)
		.where(inArray(logs.unitId, [...unitIds]));
}

/** When the newest log of each unit came. */
export async function listLastComings(tx: Tx): Promise<Map<string, Date>> {
	const rows = await tx
		.select({ unitId: logs.unitId, at: sql<string>`max(${logs.createdAt})` })
		.from(logs)
		.groupBy(logs.unitId);
	return new Map(rows.map(({ unitId, at }) => [unitId, new Date(at)]));
}

/** Names and units of some logs, by their ids. */
export async function listLogNames(
	tx: Tx,
	ids: readonly string[]
): Promise<Map<string, { name: string; unitId: string }>> {
	if (ids.length === 0) return new Map();
	const rows = await tx
		.select({ id: logs.id, name: logs.name, unitId: logs.unitId })
		.from(logs)
		.where(inArray(logs.id, [...ids]));
	return new Map(rows.map(({ id, ...row }) => [id, row]));
}

export async function updateLog(tx: Tx, id: string, change: LogChange): Promise<void> {
	await tx.update(logs).set(change).where(eq(logs.id, id));
}

export async function deleteLog(tx: Tx, id: string): Promise<void> {
	await tx.delete(logs).where(eq(logs.id, id));
}

/** Takes a log's samples away, so that it can be read anew. */
export async function clearSamples(tx: Tx, logId: string): Promise<void> {
	await tx.delete(blocks).where(eq(blocks.logId, logId));
	await tx.delete(textBlocks).where(eq(textBlocks.logId, logId));
	await tx.delete(blockTimes).where(eq(blockTimes.logId, logId));
	await tx.delete(events).where(eq(events.logId, logId));
}

/** Units that a log has samples or events for: its own and siblings'. */
export async function unitsTouchedBy(tx: Tx, logId: string): Promise<string[]> {
	const found = await tx.execute<{ unit_id: string }>(sql`
		select distinct unit_id from ${blocks} where log_id = ${logId}
		union select distinct unit_id from ${textBlocks} where log_id = ${logId}
		union select distinct unit_id from ${events} where log_id = ${logId}`);
	return found.map((row) => row.unit_id);
}

/** Logs whose work is not finished, over every organisation: what a restarted worker takes up again. */
export async function unfinishedLogs(
	organisationIds: readonly string[],
	withOrganisation: <T>(id: string, work: (tx: Tx) => Promise<T>) => Promise<T>
) {
	const open: { organisationId: string; logId: string }[] = [];
	for (const organisationId of organisationIds) {
		const rows = await withOrganisation(organisationId, (tx) =>
			tx
				.select({ id: logs.id })
				.from(logs)
				.where(inArray(logs.state, ['received', 'reading', 'analysing']))
				.orderBy(asc(logs.ordinal))
		);
		for (const row of rows) open.push({ organisationId, logId: row.id });
	}
	return open;
}

/** The mappings the organisation's people confirmed, those of one site first, then the newest. */
export async function findRemembered(tx: Tx, siteId: string): Promise<(typeof rememberedMappings.$inferSelect)[]> {
	const rows = await tx.select().from(rememberedMappings).orderBy(desc(rememberedMappings.confirmedAt));
	return rows.sort((a, b) => Number(b.siteId === siteId) - Number(a.siteId === siteId));
}

export async function remember(tx: Tx, row: typeof rememberedMappings.$inferInsert): Promise<void> {
	await tx
		.insert(rememberedMappings)
		.values(row)
		.onConflictDoUpdate({
			target: [rememberedMappings.organisationId, rememberedMappings.siteId, rememberedMappings.signature],
			set: { mapping: row.mapping, confirmedBy: row.confirmedBy ?? null, confirmedAt: new Date() }
		});
}

/**
 * Takes a session-level lock by name on a connection of its own, runs `work`, and lets go. A process that is killed
 * lets go at once, so its work can be taken up by another. `wait: false` gives null when another holds it.
 */
export async function withLock<T>(name: string, wait: boolean, work: () => Promise<T>): Promise<T | null> {
	const connection = await database().$client.reserve();
	try {
		if (wait) await connection`select pg_advisory_lock(hashtextextended(${name}, 7))`;
		else {
			const [row] = await connection`select pg_try_advisory_lock(hashtextextended(${name}, 7)) as got`;
			if (!row?.['got']) return null;
		}
		try {
			return await work();
		} finally {
			await connection`select pg_advisory_unlock(hashtextextended(${name}, 7))`;
		}
	} finally {
		connection.release();
	}
}
