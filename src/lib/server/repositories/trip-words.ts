import type { Tx } from '$lib/server/db/client';
import { tripWords } from '$lib/server/db/schema/circle';
import { asc, eq, isNull, or } from 'drizzle-orm';

/** Trade words that name a trip kind, of one unit or of the whole organisation. */

export type TripWordRow = typeof tripWords.$inferSelect;

/** The words in force for a unit: its own first, then the organisation's. */
export async function listTripWords(tx: Tx, unitId: string): Promise<TripWordRow[]> {
	const rows = await tx
		.select()
		.from(tripWords)
		.where(or(eq(tripWords.unitId, unitId), isNull(tripWords.unitId)))
		.orderBy(asc(tripWords.createdAt));
	return rows.sort((a, b) => Number(a.unitId === null) - Number(b.unitId === null));
}

export async function insertTripWord(tx: Tx, row: typeof tripWords.$inferInsert): Promise<TripWordRow> {
	const [stored] = await tx.insert(tripWords).values(row).returning();
	if (!stored) throw new Error('the word was not stored');
	return stored;
}

export async function findTripWord(tx: Tx, id: string): Promise<TripWordRow | null> {
	const [row] = await tx.select().from(tripWords).where(eq(tripWords.id, id));
	return row ?? null;
}

export async function deleteTripWord(tx: Tx, id: string): Promise<void> {
	await tx.delete(tripWords).where(eq(tripWords.id, id));
}
