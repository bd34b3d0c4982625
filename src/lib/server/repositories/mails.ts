import type { Tx } from '$lib/server/db/client';
import { mails } from '$lib/server/db/schema/circle';
import { and, desc, eq, inArray, lt, or, isNull, sql } from 'drizzle-orm';

/** Messages of the transaction's organisation: the outbox. */

export type MailRow = typeof mails.$inferSelect;
export type NewMail = typeof mails.$inferInsert;

/** Puts a message into the outbox; null when one with the same key is there already. */
export async function insertMail(tx: Tx, row: NewMail): Promise<string | null> {
	const [stored] = await tx.insert(mails).values(row).onConflictDoNothing().returning({ id: mails.id });
	return stored?.id ?? null;
}

export async function findMail(tx: Tx, id: string): Promise<MailRow | null> {
	const [row] = await tx.select().from(mails).where(eq(mails.id, id));
	return row ?? null;
}

/** The newest messages first. */
export function listMails(tx: Tx, limit: number): Promise<MailRow[]> {
	return tx.select().from(mails).orderBy(desc(mails.createdAt)).limit(limit);
}

/** Subjects of some messages, by their ids. */
export async function listSubjects(tx: Tx, ids: readonly string[]): Promise<Map<string, string>> {
	if (ids.length === 0) return new Map();
	const rows = await tx
		.select({ id: mails.id, subject: mails.subject })
		.from(mails)
		.where(inArray(mails.id, [...ids]));
	return new Map(rows.map((row) => [row.id, row.subject]));
}

export async function updateMail(tx: Tx, id: string, change: Partial<NewMail>): Promise<void> {
	await tx.update(mails).set(change).where(eq(mails.id, id));
}

/** Counts one try and says what came of it. */
export async function markTried(tx: Tx, id: string, at: Date, error: string | null): Promise<void> {
	await tx
		.update(mails)
		.set({
			tries: sql`${mails.tries} + 1`,
			triedAt: at,
			...(error === null ? { state: 'sent' as const, sentAt: at, error: null } : { state: 'failed' as const, error })
		})
		.where(eq(mails.id, id));
}

/** Messages that wait since before an instant without a try: their job was lost. */
export async function listForgotten(tx: Tx, before: Date): Promise<string[]> {
	const rows = await tx
		.select({ id: mails.id })
		.from(mails)
		.where(
			and(eq(mails.state, 'queued'), lt(mails.createdAt, before), or(isNull(mails.triedAt), lt(mails.triedAt, before)))
		);
	return rows.map((row) => row.id);
}
