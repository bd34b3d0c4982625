import type { Tx } from '$lib/server/db/client';
import { photos } from '$lib/server/db/schema/circle';
import { asc, eq } from 'drizzle-orm';

/** Photos of the transaction's organisation; the pictures themselves are in the object store. */

export type PhotoRow = typeof photos.$inferSelect;

export function listPhotos(tx: Tx, unitId: string): Promise<PhotoRow[]> {
	return tx.select().from(photos).where(eq(photos.unitId, unitId)).orderBy(asc(photos.createdAt));
}

export async function findPhoto(tx: Tx, id: string): Promise<PhotoRow | null> {
	const [row] = await tx.select().from(photos).where(eq(photos.id, id));
	return row ?? null;
}

export async function findPhotoByClientKey(tx: Tx, clientKey: string): Promise<PhotoRow | null> {
	const [row] = await tx.select().from(photos).where(eq(photos.clientKey, clientKey));
	return row ?? null;
}

/** Keeps a photo once: a second one with the same client key gives the first back. */
export async function insertPhoto(
	tx: Tx,
	row: typeof photos.$inferInsert
): Promise<{ row: PhotoRow; repeated: boolean }> {
	const [stored] = await tx.insert(photos).values(row).onConflictDoNothing().returning();
	if (stored) return { row: stored, repeated: false };
	const first = row.clientKey ? await findPhotoByClientKey(tx, row.clientKey) : null;
	if (!first) throw new Error('the photo was not stored');
	return { row: first, repeated: true };
}
