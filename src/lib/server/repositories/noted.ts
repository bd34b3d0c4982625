import type { Tx } from '$lib/server/db/client';
import { noted } from '$lib/server/db/schema/logs';
import { asc, eq } from 'drizzle-orm';

/** What people typed of starts without a trend log. */

export type NotedRow = typeof noted.$inferSelect;

/** A unit's entries, oldest first. */
export function listNoted(tx: Tx, unitId: string): Promise<NotedRow[]> {
	return tx.select().from(noted).where(eq(noted.unitId, unitId)).orderBy(asc(noted.at), asc(noted.createdAt));
}

/** Stores an entry once: a second one with the same client key gives the first back. */
export async function insertNoted(
	tx: Tx,
	row: typeof noted.$inferInsert
): Promise<{ row: NotedRow; repeated: boolean }> {
	const [stored] = await tx.insert(noted).values(row).onConflictDoNothing().returning();
	if (stored) return { row: stored, repeated: false };
	const [first] = await tx
		.select()
		.from(noted)
		.where(eq(noted.clientKey, row.clientKey ?? ''));
	if (!first) throw new Error('the entry was not stored');
	return { row: first, repeated: true };
}

export async function findNoted(tx: Tx, id: string): Promise<NotedRow | null> {
	const [row] = await tx.select().from(noted).where(eq(noted.id, id));
	return row ?? null;
}

export async function deleteNoted(tx: Tx, id: string): Promise<void> {
	await tx.delete(noted).where(eq(noted.id, id));
}
