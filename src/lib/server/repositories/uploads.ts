import type { Tx } from '$lib/server/db/client';
import { uploadParts, uploads } from '$lib/server/db/schema/logs';
import { and, asc, desc, eq, isNull, lt } from 'drizzle-orm';

/** Logs on their way in parts. */

export type UploadRow = typeof uploads.$inferSelect;
export type PartRow = typeof uploadParts.$inferSelect;

export async function insertUpload(tx: Tx, row: typeof uploads.$inferInsert): Promise<UploadRow> {
	const [stored] = await tx.insert(uploads).values(row).returning();
	if (!stored) throw new Error('the upload was not stored');
	return stored;
}

export async function findUpload(tx: Tx, id: string): Promise<UploadRow | null> {
	const [row] = await tx.select().from(uploads).where(eq(uploads.id, id));
	return row ?? null;
}

/** Uploads of a unit that are not a log yet, newest first. */
export function listOpenUploads(tx: Tx, unitId: string): Promise<UploadRow[]> {
	return tx
		.select()
		.from(uploads)
		.where(and(eq(uploads.unitId, unitId), isNull(uploads.logId)))
		.orderBy(desc(uploads.createdAt));
}

export function listExpiredUploads(tx: Tx, at: Date): Promise<UploadRow[]> {
	return tx.select().from(uploads).where(lt(uploads.expiresAt, at));
}

export async function updateUpload(tx: Tx, id: string, change: Partial<typeof uploads.$inferInsert>): Promise<void> {
	await tx.update(uploads).set(change).where(eq(uploads.id, id));
}

/** Takes an upload away with the rows of its parts. */
export async function deleteUpload(tx: Tx, id: string): Promise<void> {
	await tx.delete(uploads).where(eq(uploads.id, id));
}

/** The parts of an upload, file by file, in order. */
export function listParts(tx: Tx, uploadId: string): Promise<PartRow[]> {
	return tx
		.select()
		.from(uploadParts)
		.where(eq(uploadParts.uploadId, uploadId))
		.orderBy(asc(uploadParts.file), asc(uploadParts.begin));
}

/** Keys of the parts of a unit's open uploads. */
export async function listPartKeys(tx: Tx, unitId: string): Promise<string[]> {
	const rows = await tx
		.select({ key: uploadParts.key })
		.from(uploadParts)
		.innerJoin(
			uploads,
			and(eq(uploads.organisationId, uploadParts.organisationId), eq(uploads.id, uploadParts.uploadId))
		)
		.where(eq(uploads.unitId, unitId));
	return rows.map((row) => row.key);
}

/** Notes a part that is safe in the store; false when another stands at its place already. */
export async function insertPart(tx: Tx, row: typeof uploadParts.$inferInsert): Promise<boolean> {
	const stored = await tx.insert(uploadParts).values(row).onConflictDoNothing().returning({ file: uploadParts.file });
	return stored.length > 0;
}

export async function deleteParts(tx: Tx, uploadId: string): Promise<void> {
	await tx.delete(uploadParts).where(eq(uploadParts.uploadId, uploadId));
}
